import type { BuyState } from '#shared/domain/buys/states.ts';
import type { LineTotal } from '#shared/schemas/sheet.ts';
import { prepared, type Tx } from '../../config/database.ts';

/** The buy under its row lock, by one prepared statement. */
export interface LockedBuy {
  readonly id: string;
  readonly club_id: string;
  readonly name: string;
  readonly state: BuyState;
  readonly closes_at: Date | null;
  readonly frozen_at: Date | null;
  /** 0 after a reopening, when everyone may withdraw free. */
  readonly lowering_freeze_hours: number;
}

/** Locks the buy: the first read of a change to its pledges. */
export async function lockForPledge(buyId: string, tx: Tx): Promise<LockedBuy | undefined> {
  const [buy] = await prepared<LockedBuy>(
    tx,
    'pledge-lock',
    `select id, club_id, name, state, closes_at, frozen_at,
       case when reopen_reason is null then lowering_freeze_hours else 0 end as lowering_freeze_hours
     from buys where id = $1 for update`,
    [buyId],
  );
  return buy;
}

/** What a pledge depends on, read after the lock: the line, the person, the pledge as it is, the clock. */
export interface PledgeGround {
  readonly now: Date;
  readonly step_mg: number;
  readonly salt_id: string;
  readonly member_name: string;
  readonly member_guest: boolean;
  readonly member_active: boolean;
  readonly confirmed: boolean;
  readonly overdue_somewhere: boolean;
  readonly hides_reportable: boolean;
  readonly wanted_mg: number | null;
  readonly up_to_mg: number | null;
  readonly version: number | null;
  readonly at: Date | null;
}

/** Reads what a pledge depends on; undefined when the line or the person is not of this buy's club. */
export async function readPledgeGround(
  buyId: string,
  lineId: string,
  membershipId: string,
  tx: Tx,
): Promise<PledgeGround | undefined> {
  const [ground] = await prepared<PledgeGround>(
    tx,
    'pledge-ground',
    `select clock_timestamp() as now, l.step_mg, l.salt_id, m.display_name as member_name, m.is_guest as member_guest,
       m.status = 'active' as member_active, c.hide_reportable_grams as hides_reportable,
       exists (select 1 from hazard_confirmations h where h.membership_id = m.id and h.salt_id = l.salt_id) as confirmed,
       exists (select 1 from buy_members bm join buys o on o.id = bm.buy_id where bm.membership_id = m.id
         and bm.buy_id <> $1 and o.due_at < clock_timestamp() and bm.vouched_at is null) as overdue_somewhere,
       p.wanted_mg, p.up_to_mg, p.version, p.at
     from lines l
     join buys b on b.id = l.buy_id join clubs c on c.id = b.club_id
     join memberships m on m.id = $3 and m.club_id = b.club_id
     left join pledges p on p.line_id = l.id and p.membership_id = m.id
     where l.id = $2 and l.buy_id = $1 and l.removed_at is null`,
    [buyId, lineId, membershipId],
  );
  return ground;
}

/** The pledge as it was written, with the sheet's new version. */
export interface WrittenPledge {
  readonly sheet_version: number;
  readonly version: number;
  readonly at: Date;
}

/** Writes a pledge, counts the sheet's version and adds the audit line, in one statement. */
export async function writePledge(
  change: {
    buyId: string;
    clubId: string;
    lineId: string;
    membershipId: string;
    wantedMg: number;
    upToMg: number | null;
    keepsTurn: boolean;
    by: { membershipId: string | null; name: string; requestId?: string };
    before: { wantedMg: number; upToMg: number | null } | null;
  },
  tx: Tx,
): Promise<WrittenPledge> {
  const { wantedMg, upToMg } = change;
  const [written] = await prepared<WrittenPledge>(
    tx,
    'pledge-write',
    `with sheet as (
       update buys set sheet_version = sheet_version + 1, updated_at = now() where id = $1 returning sheet_version),
     audit as (
       insert into audit_entries (club_id, buy_id, actor_id, actor_name, action, subject_type, subject_id, before, after, request_id)
       values ($2, $1, $8, $9, 'pledges.change', 'pledge', $3::uuid || ':' || $4::uuid, $10, $11, $12))
     insert into pledges as p (buy_id, line_id, membership_id, wanted_mg, up_to_mg, at, changed_sheet_version)
     select $1, $3, $4, $5, $6, clock_timestamp(), sheet_version from sheet
     on conflict (line_id, membership_id) do update set wanted_mg = excluded.wanted_mg, up_to_mg = excluded.up_to_mg,
       at = case when $7 then p.at else excluded.at end, version = p.version + 1,
       changed_sheet_version = excluded.changed_sheet_version, dropped_at = null, dropped_reason = null, updated_at = now()
     returning changed_sheet_version as sheet_version, version, at`,
    [
      change.buyId,
      change.clubId,
      change.lineId,
      change.membershipId,
      wantedMg,
      upToMg,
      change.keepsTurn,
      change.by.membershipId,
      change.by.name,
      change.before ? JSON.stringify(change.before) : null,
      JSON.stringify({ wantedMg, upToMg }),
      change.by.requestId ?? null,
    ],
  );
  if (!written) throw new Error('pledge not written');
  return written;
}

/** The total of a line, for readers who see no single pledges of it. */
export async function totalOfLine(lineId: string, tx: Tx): Promise<LineTotal> {
  const [total] = await prepared<Omit<LineTotal, 'lineId'>>(
    tx,
    'line-total',
    `select coalesce(sum(wanted_mg), 0)::bigint as "wantedMg",
       coalesce(sum(greatest(coalesce(up_to_mg, 0) - wanted_mg, 0)), 0)::bigint as "roomMg", count(*)::int as members
     from pledges where line_id = $1 and dropped_at is null and (wanted_mg > 0 or up_to_mg > 0)`,
    [lineId],
  );
  return { lineId, ...(total ?? { wantedMg: 0, roomMg: 0, members: 0 }) };
}
