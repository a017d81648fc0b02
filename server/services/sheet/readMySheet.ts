import { estimateOf, planInForce } from '#shared/domain/buys/requests.ts';
import type { MySheet, PledgeChange, PledgeProposal } from '#shared/schemas/sheet.ts';
import { select } from '../../config/database.ts';
import { canPledge, canRunSheet } from '../../policies/sheet.ts';
import type { BuyActor } from '../actors.ts';
import { overdueElsewhere } from '../ledger/owed.ts';
import { notFound } from '../problem.ts';
import { readerOf } from './readSheet.ts';
import { loadSheetRow } from './sheetRow.ts';

interface BuyRow {
  now: Date;
  sheet_version: number;
  state: string;
  frozen: boolean;
  in_time: boolean;
  ordered: boolean;
}

async function findBuy(buyId: string): Promise<BuyRow> {
  const [buy] = await select<BuyRow>(
    `select clock_timestamp() as now, sheet_version, state, frozen_at is not null as frozen,
       closes_at is null or closes_at > clock_timestamp() as in_time,
       exists (select 1 from supplier_orders o where o.buy_id = b.id and o.placed_at is not null) as ordered
     from buys b where id = :buyId`,
    { buyId },
  );
  if (!buy) throw notFound('This buy');
  return buy;
}

async function ownPledges(actor: BuyActor): Promise<PledgeChange[]> {
  const rows = await select<Omit<PledgeChange, 'at' | 'name' | 'guest'> & { at: Date }>(
    `select p.membership_id as "membershipId", p.line_id as "lineId", p.wanted_mg as "wantedMg", p.up_to_mg as "upToMg",
       p.version, p.at from pledges p join lines l on l.id = p.line_id and l.removed_at is null
     where p.buy_id = :buyId and p.membership_id = :me and p.dropped_at is null order by l.position`,
    { buyId: actor.buy.id, me: actor.membershipId },
  );
  const { name } = actor;
  return rows.map((row) => ({ ...row, name, guest: false, at: row.at.toISOString() }));
}

async function openProposals(actor: BuyActor): Promise<PledgeProposal[]> {
  const rows = await select<Omit<PledgeProposal, 'at'> & { at: Date }>(
    `select q.id, q.membership_id as "membershipId", m.display_name as name, q.line_id as "lineId",
       q.wanted_mg as "wantedMg", q.up_to_mg as "upToMg", o.display_name as "proposedBy", q.created_at as at
     from pledge_proposals q join memberships m on m.id = q.membership_id
     join memberships o on o.id = q.proposed_by_id
     where q.buy_id = :buyId and q.answered_at is null and (q.membership_id = :me or :organises)
     order by q.created_at, q.id`,
    { buyId: actor.buy.id, me: actor.membershipId, organises: actor.buy.organises },
  );
  return rows.map((row) => ({ ...row, at: row.at.toISOString() }));
}

/** Whom an organiser may pledge for: active members and guests of the club. */
async function peopleToPledgeFor(actor: BuyActor): Promise<MySheet['people']> {
  if (!actor.buy.organises) return [];
  return select(
    `select m.id as "membershipId", m.display_name as name, m.is_guest as guest,
       coalesce((select json_agg(h.salt_id order by h.salt_id) from hazard_confirmations h
         where h.membership_id = m.id and h.on_paper_by_id is not null), '[]'::json) as "onPaper"
     from memberships m where m.club_id = :clubId and m.status = 'active' order by lower(m.display_name), m.id`,
    { clubId: actor.club.id },
  );
}

/** The actor's own shares, for readers who don't see every pledge they depend on. */
async function ownShare(actor: BuyActor): Promise<MySheet['share']> {
  if (readerOf(actor) === 'full') return null;
  const row = await loadSheetRow(actor.buy.id);
  if (!row?.plan) return null;
  const { terms, pledges } = row;
  const { plan } = planInForce(terms, pledges, row.plan.plan, row.planOverride);
  if (!plan.feasible) return null;
  const sheet = estimateOf(terms, pledges, plan);
  const mine = sheet.members.find(({ memberId }) => memberId === actor.membershipId);
  if (!mine) return null;
  const { lines, charges, totalMinor, steps, why } = mine;
  return { lines, charges, totalMinor, steps, why };
}

/** The reader's own part of a sheet: own pledges, what they confirmed, what they were asked, what they may do. */
export async function readMySheet(actor: BuyActor): Promise<MySheet> {
  const [buy, pledges, confirmed, overdue, share, proposals, people] = await Promise.all([
    findBuy(actor.buy.id),
    ownPledges(actor),
    select<{ salt_id: string }>(
      'select salt_id from hazard_confirmations where membership_id = :me order by salt_id',
      { me: actor.membershipId },
    ),
    overdueElsewhere(actor.membershipId, actor.buy.id),
    ownShare(actor),
    openProposals(actor),
    peopleToPledgeFor(actor),
  ]);
  const open = buy.state === 'open';
  const runs = canRunSheet(actor);
  return {
    sheetVersion: buy.sheet_version,
    membershipId: actor.membershipId,
    pledges,
    confirmed: confirmed.map(({ salt_id }) => salt_id),
    overdueIn: overdue[0]?.buyName ?? null,
    share,
    proposals,
    people,
    may: {
      pledge: canPledge(actor) && open && !buy.frozen && buy.in_time,
      pledgeForOthers: runs && open && !buy.frozen && buy.in_time,
      planPacks: runs && open,
      lock: runs && open,
      reopen: runs && buy.state === 'locked' && !buy.ordered,
      extend: runs && open,
    },
    now: buy.now.toISOString(),
  };
}
