import type { SheetPledge } from '#shared/domain/buys/sheetTerms.ts';
import type { PackPlan } from '#shared/domain/packs/packTypes.ts';
import type { SheetReply } from '#shared/schemas/sheet.ts';
import { pool } from '../../config/database.ts';
import type { MemberRow, SheetFacts } from '../../presenters/sheet.ts';
import { presentTerms, termsColumns, type TermsRow } from '../buys/loadSheetTerms.ts';

/** Everything of a sheet, as one statement found it. */
export interface SheetRow extends SheetFacts {
  readonly pledges: SheetPledge[];
}

const sheetSql = `select ${termsColumns}, b.sheet_version, b.plan, b.plan_version, b.plan_override,
  (select json_agg(json_build_object('membershipId', m.id, 'name', m.display_name, 'guest', m.is_guest, 'pledges', x.pledges)
      order by lower(m.display_name), m.id)
    from (select p.membership_id, json_agg(json_build_array(p.line_id, p.wanted_mg, p.up_to_mg, p.version,
          floor(extract(epoch from p.at) * 1000)::bigint)) as pledges
        from pledges p join lines l on l.id = p.line_id and l.removed_at is null
        where p.buy_id = b.id and p.dropped_at is null and (p.wanted_mg > 0 or p.up_to_mg > 0)
        group by p.membership_id) x
    join memberships m on m.id = x.membership_id) as members,
  (select json_agg(json_build_object('membershipId', m.id, 'name', m.display_name) order by (m.id = b.responsible_id) desc, m.id)
    from memberships m where m.id = b.responsible_id
      or m.id in (select o.membership_id from buy_organisers o where o.buy_id = b.id)) as organisers
  from buys b join clubs c on c.id = b.club_id where b.id = $1`;

interface Row extends TermsRow {
  sheet_version: number;
  plan: PackPlan | null;
  plan_version: number | null;
  plan_override: Record<string, number> | null;
  members: MemberRow[] | null;
  organisers: SheetReply['organisers'];
}

/** A buy's sheet in one prepared statement through the pool; null when there is no such buy. */
export async function loadSheetRow(buyId: string): Promise<SheetRow | null> {
  const { rows } = await pool.query<Row>({ name: 'sheet', text: sheetSql, values: [buyId] });
  const row = rows[0];
  if (!row) return null;
  const members = row.members ?? [];
  return {
    sheetVersion: row.sheet_version,
    terms: presentTerms(row),
    members,
    pledges: members.flatMap(({ membershipId, pledges }) =>
      pledges.map(([lineId, wantedMg, upToMg, version, atMs]) => ({
        membershipId,
        lineId,
        wantedMg,
        upToMg,
        version,
        at: new Date(atMs).toISOString(),
      })),
    ),
    plan:
      row.plan && row.plan_version !== null
        ? { forVersion: row.plan_version, plan: row.plan }
        : null,
    planOverride: row.plan_override,
    organisers: row.organisers,
  };
}
