import type { PackPlan } from '#shared/domain/packs/packTypes.ts';
import type { PledgeChange, SheetChanges } from '#shared/schemas/sheet.ts';
import { pool } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { notFound } from '../problem.ts';
import { readSheet, readerOf } from './readSheet.ts';

/** Above this many changed pledges the whole sheet is shorter to apply. */
const mostChanges = 200;

interface Row {
  sheet_version: number;
  terms_version: number;
  plan: PackPlan | null;
  plan_version: number | null;
  pledges: (Omit<PledgeChange, 'at'> & { at: number })[] | null;
}

const changesSql = `select b.sheet_version, b.terms_version, b.plan, b.plan_version, (
    select json_agg(x) from (
      select p.membership_id as "membershipId", m.display_name as name, m.is_guest as guest, p.line_id as "lineId",
        case when p.dropped_at is null then p.wanted_mg else 0 end as "wantedMg",
        case when p.dropped_at is null then p.up_to_mg end as "upToMg",
        p.version, floor(extract(epoch from p.at) * 1000)::bigint as at
      from pledges p join memberships m on m.id = p.membership_id
      join lines l on l.id = p.line_id and l.removed_at is null
      where p.buy_id = b.id and p.changed_sheet_version > $2
      order by p.changed_sheet_version, p.id limit ${mostChanges + 1}) x) as pledges
  from buys b where b.id = $1`;

/**
 * What changed on a sheet since the version that a page holds: single pledges as long as the terms are the same and
 * they are at most 200, else the whole sheet.
 */
export async function readChanges(
  actor: BuyActor,
  seen: { since: number; terms: number },
): Promise<SheetChanges> {
  const { rows } = await pool.query<Row>({
    name: 'sheet-changes',
    text: changesSql,
    values: [actor.buy.id, seen.since],
  });
  const row = rows[0];
  if (!row) throw notFound('This buy');
  const pledges = row.pledges ?? [];
  const whole =
    seen.terms !== row.terms_version ||
    seen.since > row.sheet_version ||
    pledges.length > mostChanges ||
    // Single pledges of hidden lines must not come this way.
    readerOf(actor) === 'totals';
  if (whole) return { whole: true, sheet: await readSheet(actor) };
  return {
    whole: false,
    sheetVersion: row.sheet_version,
    pledges: pledges.map((pledge) => ({ ...pledge, at: new Date(pledge.at).toISOString() })),
    totals: [],
    plan:
      row.plan && row.plan_version !== null
        ? { forVersion: row.plan_version, plan: row.plan }
        : null,
  };
}
