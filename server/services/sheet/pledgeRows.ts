import type { BuyState } from '#shared/domain/buys/states.ts';
import type { LineTotal } from '#shared/schemas/sheet.ts';
import { pool, prepared, type Tx } from '../../config/database.ts';
import type { By } from '../actorName.ts';
import type { Alongside, BuyActor } from '../actors.ts';

/** What a pledge's rules and notices look at in its buy. */
export interface PledgeBuy {
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
export async function lockForPledge(buyId: string, tx: Tx): Promise<void> {
  await prepared(tx, 'pledge-lock', 'select id from buys where id = $1 for update', [buyId]);
}

/** What a pledge depends on: the buy, the line, the person, the pledge as it is, the clock. */
export interface PledgeGround extends PledgeBuy {
  readonly now: Date;
  readonly terms_version: number;
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

type Instants = 'now' | 'closes_at' | 'frozen_at' | 'at';
type GroundJson = Omit<PledgeGround, Instants> & Record<Instants, string | null>;

/** One JSON value about a line and a member, beside `buys b` and `clubs c`; null when they aren't of that buy's club. */
const groundSql = (line: string, member: string) => `(select row_to_json(g) from (
  select clock_timestamp() as now, b.id, b.club_id, b.name, b.state, b.closes_at, b.frozen_at, b.terms_version,
    case when b.reopen_reason is null then b.lowering_freeze_hours else 0 end as lowering_freeze_hours,
    l.step_mg, l.salt_id, m.display_name as member_name, m.is_guest as member_guest,
    m.status = 'active' as member_active, c.hide_reportable_grams as hides_reportable,
    exists (select 1 from hazard_confirmations h where h.membership_id = m.id and h.salt_id = l.salt_id) as confirmed,
    exists (select 1 from buy_members bm join buys o on o.id = bm.buy_id where bm.membership_id = m.id
      and bm.buy_id <> b.id and o.due_at < clock_timestamp() and bm.vouched_at is null) as overdue_somewhere,
    p.wanted_mg, p.up_to_mg, p.version, p.at
  from lines l
  join memberships m on m.id = ${member} and m.club_id = b.club_id
  left join pledges p on p.line_id = l.id and p.membership_id = m.id
  where l.id = ${line} and l.buy_id = b.id and l.removed_at is null) g)`;

function readGround(json: unknown): PledgeGround | undefined {
  if (!json) return undefined;
  const ground = json as GroundJson;
  const instant = (text: string | null) => (text === null ? null : new Date(text));
  return {
    ...ground,
    now: instant(ground.now) ?? new Date(0),
    closes_at: instant(ground.closes_at),
    frozen_at: instant(ground.frozen_at),
    at: instant(ground.at),
  };
}

/** A first look at a pledge, read in the same statement as who asks. */
export const pledgeAlongside = (lineId: string, membershipId: string): Alongside => ({
  name: 'pledge',
  sql: groundSql('$4', '$5'),
  values: [lineId, membershipId],
});

/** What came with the actor by `pledgeAlongside`. */
export const groundOf = (actor: BuyActor): PledgeGround | undefined => readGround(actor.alongside);

/** Reads what a pledge depends on under the buy's lock; undefined when it isn't of this buy's club. */
export async function readPledgeGround(
  buyId: string,
  { lineId, membershipId }: { lineId: string; membershipId: string },
  tx: Tx,
): Promise<PledgeGround | undefined> {
  const [row] = await prepared<{ ground: unknown }>(
    tx,
    'pledge-ground',
    `select ${groundSql('$2', '$3')} as ground from buys b join clubs c on c.id = b.club_id where b.id = $1`,
    [buyId, lineId, membershipId],
  );
  return readGround(row?.ground);
}

/** The pledge as it was written, with the sheet's new version. */
export interface WrittenPledge {
  readonly sheet_version: number;
  readonly version: number;
  readonly at: Date;
}

/** A pledge to be written, and what it was. */
export interface PledgeWrite {
  readonly buyId: string;
  readonly clubId: string;
  readonly lineId: string;
  readonly membershipId: string;
  readonly wantedMg: number;
  readonly upToMg: number | null;
  readonly keepsTurn: boolean;
  readonly by: By;
  readonly before: { wantedMg: number; upToMg: number | null } | null;
}

const valuesOf = (change: PledgeWrite) => [
  change.buyId,
  change.clubId,
  change.lineId,
  change.membershipId,
  change.wantedMg,
  change.upToMg,
  change.keepsTurn,
  change.by.membershipId,
  change.by.name,
  change.before ? JSON.stringify(change.before) : null,
  JSON.stringify({ wantedMg: change.wantedMg, upToMg: change.upToMg }),
  change.by.requestId ?? null,
];

const writeSql = (guards: { buy: string; time: string; pledge: string }) => `with sheet as (
    update buys b set sheet_version = sheet_version + 1, updated_at = now() where id = $1 ${guards.buy}
    returning sheet_version, closes_at),
  wrote as (
    insert into pledges as p (buy_id, line_id, membership_id, wanted_mg, up_to_mg, at, changed_sheet_version)
    select $1, $3, $4, $5, $6, clock_timestamp(), sheet_version from sheet ${guards.time}
    on conflict (line_id, membership_id) do update set wanted_mg = excluded.wanted_mg, up_to_mg = excluded.up_to_mg,
      at = case when $7 then p.at else excluded.at end, version = p.version + 1,
      changed_sheet_version = excluded.changed_sheet_version, dropped_at = null, dropped_reason = null, updated_at = now()
    ${guards.pledge}
    returning p.changed_sheet_version as sheet_version, p.version, p.at),
  audit as (
    insert into audit_entries (club_id, buy_id, actor_id, actor_name, action, subject_type, subject_id, before, after, request_id)
    select $2, $1, $8, $9, 'pledges.change', 'pledge', $3::uuid || ':' || $4::uuid, $10, $11, $12 from wrote)
  select * from wrote`;

const lockedSql = writeSql({ buy: '', time: '', pledge: '' });
const guardedSql = writeSql({
  buy: `and state = 'open' and frozen_at is null and terms_version = $13
      and coalesce((select q.version from pledges q where q.line_id = $3 and q.membership_id = $4), 0) = $14`,
  // After the update, that is under the lock, however long it was waited for.
  time: 'where clock_timestamp() < least(closes_at, $15::timestamptz)',
  pledge: 'where p.version = $14',
});

/** Writes a pledge under the buy's lock, counts the sheet's version and adds the audit line, in one statement. */
export async function writePledge(change: PledgeWrite, tx: Tx): Promise<WrittenPledge> {
  const [written] = await prepared<WrittenPledge>(tx, 'pledge-write', lockedSql, valuesOf(change));
  if (!written) throw new Error('pledge not written');
  return written;
}

/**
 * Takes the buy's lock, looks again at all that a decision rested on (state, terms, both versions, the clock) and
 * writes, in one statement, so that the lock is held for no round trip to this process. Undefined when something had
 * changed: then nothing is written, and the decision is to be made again under the lock. A version counted for
 * nothing, by a change in the same instant or past the closing time, makes open sheets ask once for what they missed.
 */
export async function writePledgeIfUnchanged(
  change: PledgeWrite,
  seen: { termsVersion: number; version: number; beforeMs: number | null },
): Promise<WrittenPledge | undefined> {
  const { rows } = await pool.query<WrittenPledge>({
    name: 'pledge-write-guarded',
    text: guardedSql,
    values: [
      ...valuesOf(change),
      seen.termsVersion,
      seen.version,
      seen.beforeMs === null ? null : new Date(seen.beforeMs).toISOString(),
    ],
  });
  return rows[0];
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
