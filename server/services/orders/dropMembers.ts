import type { DropBody, QuoteEffect } from '#shared/schemas/orders.ts';
import { execute, type Tx } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import type { By } from '../actorName.ts';
import type { ActorClub, BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, changeTerms, withBuy } from '../buys/withBuy.ts';
import { owedOfBuy } from '../ledger/owed.ts';
import { invalid, wrongState } from '../problem.ts';
import { expectedShares, nothingBilled, shareChanges } from './expectedShares.ts';
import { ordersPlaced } from './findOrders.ts';
import { loadOrderBook, type OrderBook } from './orderBook.ts';
import { planWithout, type NewEstimate } from './planAnew.ts';
import { applyPriceLimit } from './priceLimit.ts';
import { tellBuyChanged } from './tellBuy.ts';
import { tellDropped } from './tellDropped.ts';
import { nameSome } from './whoWaits.ts';

/**
 * Takes members out of a locked buy under its lock, with the estimate computed for the others. Nobody is asked for more
 * by it: what rises comes with the final share, what falls is asked no more.
 */
export async function dropUnderLock(
  buy: Buy,
  club: ActorClub,
  drop: {
    memberIds: ReadonlySet<string>;
    reason: string;
    summary: string;
    estimate: NewEstimate;
    action: string;
  },
  by: By,
  tx: Tx,
): Promise<void> {
  const before = await loadOrderBook(buy.id, tx);
  const oldShares = expectedShares(before, nothingBilled);
  const ids = [...drop.memberIds];
  const values = { buyId: buy.id, ids, reason: drop.reason };
  await execute(
    `update pledges set dropped_at = clock_timestamp(), dropped_reason = :reason, version = version + 1,
       changed_sheet_version = :sheetVersion, updated_at = now()
     where buy_id = :buyId and membership_id in (:ids) and dropped_at is null`,
    { ...values, sheetVersion: buy.sheetVersion + 1 },
    tx,
  );
  await execute(
    `update buy_members set dropped_at = clock_timestamp(), dropped_reason = :reason, due_minor = 0,
       over_limit_minor = null, agreed_at = null, version = version + 1, updated_at = now()
     where buy_id = :buyId and membership_id in (:ids)`,
    values,
    tx,
  );
  const { plan, request, sheet } = drop.estimate;
  for (const { memberId, totalMinor } of sheet.members) {
    await execute(
      `update buy_members set due_minor = least(due_minor, :totalMinor), version = version + 1, updated_at = now()
       where buy_id = :buyId and membership_id = :memberId and due_minor > :totalMinor`,
      { buyId: buy.id, memberId, totalMinor },
      tx,
    );
  }
  buy.plan = plan;
  buy.planVersion = buy.sheetVersion + 1;
  await changeTerms(buy, drop.summary, by, tx);
  await execute(
    `insert into snapshots (buy_id, kind, terms_version, request, sheet, plan, terms)
     values (:buyId, 'estimate', :termsVersion, :request, :sheet, :plan, :terms)`,
    {
      buyId: buy.id,
      termsVersion: buy.termsVersion,
      request: JSON.stringify(request),
      sheet: JSON.stringify(sheet),
      plan: JSON.stringify(plan),
      terms: JSON.stringify({ ...before.terms, termsVersion: buy.termsVersion }),
    },
    tx,
  );
  const after = await loadOrderBook(buy.id, tx);
  const newShares = expectedShares(after, nothingBilled);
  await applyPriceLimit(buy, club, after, newShares, tx);
  await tellDropped(buy, club, { ...drop, before, oldShares, newShares }, tx);
  await writeAudit(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    by,
    action: drop.action,
    subject: { type: 'buy', id: buy.id },
    after: { members: ids.map((id) => before.members.get(id)?.name ?? id), reason: drop.reason },
  });
  tellBuyChanged(buy, 'terms', tx);
}

function checkMembers(book: OrderBook, memberIds: readonly string[]): void {
  for (const id of memberIds) {
    const member = book.members.get(id);
    if (!member || member.dropped) {
      throw invalid({ memberIds: 'One of these is not in this buy any more.' });
    }
  }
}

/** What dropping members would do to the others' shares; writes nothing. */
export async function checkDrop(
  actor: BuyActor,
  memberIds: readonly string[],
): Promise<QuoteEffect> {
  const buy = await Buy.findByPk(actor.buy.id, { rejectOnEmpty: true });
  const book = await loadOrderBook(buy.id);
  checkMembers(book, memberIds);
  const gone = new Set(memberIds);
  const { plan, sheet, pledges } = await planWithout(book, gone, buy.planOverride);
  const before = expectedShares(book, nothingBilled);
  const staying: OrderBook = {
    ...book,
    members: new Map([...book.members].filter(([id]) => !gone.has(id))),
    pledges,
    plan,
    sheet,
  };
  const after = new Map(sheet.members.map((member) => [member.memberId, member.totalMinor]));
  const shares = shareChanges(staying, before, after, buy.priceLimitPermille);
  return {
    shares,
    oldTotalMinor: book.plan.totalMinor,
    newTotalMinor: plan.totalMinor,
    mustAgree: shares.filter(({ overLimit, agreed }) => overLimit && !agreed).length,
  };
}

/** An organiser drops members who haven't paid, before any order is placed. What they did pay becomes their credit. */
export async function dropMembers(actor: BuyActor, body: DropBody): Promise<void> {
  const seen = await Buy.findByPk(actor.buy.id, { rejectOnEmpty: true });
  const book = await loadOrderBook(actor.buy.id);
  checkMembers(book, body.memberIds);
  const memberIds = new Set(body.memberIds);
  const estimate = await planWithout(book, memberIds, seen.planOverride);
  await withBuy(
    actor.buy.id,
    { states: ['locked'], termsVersion: body.termsVersion },
    async (buy, tx) => {
      if (await ordersPlaced(buy.id, tx)) {
        throw wrongState('An order is placed already: nobody can be dropped any more.');
      }
      const owed = await owedOfBuy(buy.id, tx);
      const paid = body.memberIds.filter((id) => (owed.get(id)?.openMinor ?? 0) === 0);
      const names = (ids: readonly string[]) =>
        nameSome(ids.map((id) => ({ name: book.members.get(id)?.name ?? '' })));
      if (paid.length > 0) {
        throw invalid({ memberIds: `${names(paid)} has paid, and stays.` });
      }
      await dropUnderLock(
        buy,
        actor.club,
        {
          memberIds,
          reason: body.reason,
          summary: `${names(body.memberIds)} was dropped before the order.`,
          estimate,
          action: 'orders.drop',
        },
        byActor(actor),
        tx,
      );
    },
  );
}
