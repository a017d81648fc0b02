import type { BuyOwed } from '#shared/domain/ledger/owed.ts';
import { hasReached } from '#shared/domain/buys/states.ts';
import type { BuyHeader, BuyList, BuyPerson } from '#shared/schemas/buys.ts';
import { select, type Tx } from '../../config/database.ts';
import { canDraftBuy } from '../../policies/buys.ts';
import { presentBuyHeader } from '../../presenters/buys/presentBuyHeader.ts';
import { presentBuySummary } from '../../presenters/buys/presentBuySummary.ts';
import type { BuyFactsRow, BuyMoney } from '../../presenters/buys/rows.ts';
import { findBuyActor, type BuyActor, type ClubActor } from '../actors.ts';
import { owedOfBuy } from '../ledger/owed.ts';
import { notFound } from '../problem.ts';
import { findBuyFacts } from './findBuyFacts.ts';

/** The buys of a club that this member can see, newest first; those who left see the ones they are part of. */
export async function listBuys(actor: ClubActor): Promise<BuyList> {
  const all = await findBuyFacts(actor.club.id, actor.membershipId);
  const rows = actor.status === 'active' ? all : all.filter((row) => row.mine_mg > 0);
  const money = await moneyOf(rows, actor.membershipId);
  return {
    buys: rows.map((row) => presentBuySummary(row, money.get(row.id) ?? noMoney, actor)),
    mayDraft: canDraftBuy(actor),
  };
}

const noMoney: BuyMoney = { unpaid: 0, myOpenMinor: 0, refundsWaiting: 0 };

/** What the books say of the buys in which money is asked for or waits to go back. */
async function moneyOf(
  rows: readonly BuyFactsRow[],
  membershipId: string,
  tx?: Tx,
): Promise<Map<string, BuyMoney>> {
  const money = new Map<string, BuyMoney>();
  const running = rows.filter(
    ({ state }) => state === 'cancelled' || (hasReached(state, 'locked') && state !== 'settled'),
  );
  for (const row of running) {
    const owed = [...(await owedOfBuy(row.id, tx))];
    const count = (test: (owed: BuyOwed, memberId: string) => boolean) =>
      owed.filter(([memberId, own]) => test(own, memberId)).length;
    money.set(row.id, {
      unpaid: count((own, id) => own.openMinor > 0 && !row.vouched_for.includes(id)),
      myOpenMinor: owed.find(([memberId]) => memberId === membershipId)?.[1].openMinor ?? 0,
      refundsWaiting: row.state === 'cancelled' ? count((own) => own.creditMinor > 0) : 0,
    });
  }
  return money;
}

interface PersonRow {
  part: 'organiser' | 'helper';
  membership_id: string;
  name: string;
  takes_cash: boolean;
}

/** A buy's head as this actor sees it. */
export async function readBuyHeader(actor: BuyActor, tx?: Tx): Promise<BuyHeader> {
  const buyId = actor.buy.id;
  const [[row], people, changes, [clock]] = await Promise.all([
    findBuyFacts(actor.club.id, actor.membershipId, buyId, tx),
    select<PersonRow>(
      `select part, membership_id, m.display_name as name, takes_cash from (
         select 'organiser' as part, membership_id, false as takes_cash from buy_organisers where buy_id = :buyId
         union all
         select 'helper', membership_id, takes_cash from buy_helpers where buy_id = :buyId) x
       join memberships m on m.id = x.membership_id order by m.display_name, m.id`,
      { buyId },
      tx,
    ),
    select<{ terms_version: number; summary: string; at: Date; by: string | null }>(
      `select t.terms_version, t.summary, t.at, m.display_name as by from terms_changes t
       left join memberships m on m.id = t.changed_by_id
       join buys b on b.id = t.buy_id and t.at >= b.opened_at
       where t.buy_id = :buyId and t.detail->>'quiet' is null order by t.terms_version desc, t.at desc limit 100`,
      { buyId },
      tx,
    ),
    select<{ now: Date }>('select clock_timestamp() as now', {}, tx),
  ]);
  if (!row || !clock) throw notFound('This buy');
  const money = await moneyOf([row], actor.membershipId, tx);
  const person = ({ membership_id, name }: PersonRow): BuyPerson => ({
    membershipId: membership_id,
    name,
  });
  return presentBuyHeader(
    row,
    {
      coOrganisers: people.filter(({ part }) => part === 'organiser').map(person),
      helpers: people
        .filter(({ part }) => part === 'helper')
        .map((helper) => ({ ...person(helper), takesCash: helper.takes_cash })),
      changes,
      now: clock.now,
      money: money.get(buyId) ?? noMoney,
    },
    actor,
  );
}

/** The head after an act, with the actor's part looked up anew. */
export async function readBuyHeaderAgain(actor: ClubActor, buyId: string): Promise<BuyHeader> {
  const again = await findBuyActor(actor, buyId);
  if (!again) throw notFound('This buy');
  return readBuyHeader(again);
}
