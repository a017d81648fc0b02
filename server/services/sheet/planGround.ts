import type pg from 'pg';
import type { SheetPledge, SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import { presentTerms, termsColumns, type TermsRow } from '../buys/loadSheetTerms.ts';

/** What a plan depends on: the terms and what is pooled on each line, whoever pledged it. */
export interface PlanGround {
  readonly sheetVersion: number;
  readonly planVersion: number | null;
  readonly terms: SheetTerms;
  readonly pooled: Pick<SheetPledge, 'lineId' | 'wantedMg'>[];
  readonly chosen: Record<string, number> | null;
}

interface Row extends TermsRow {
  sheet_version: number;
  plan_version: number | null;
  plan_override: Record<string, number> | null;
  pooled: PlanGround['pooled'] | null;
}

const groundSql = `select ${termsColumns}, b.sheet_version, b.plan_version, b.plan_override,
  (select json_agg(json_build_object('lineId', x.line_id, 'wantedMg', x.wanted)) from (
    select p.line_id, sum(p.wanted_mg)::bigint as wanted from pledges p
    where p.buy_id = b.id and p.dropped_at is null group by p.line_id) x) as pooled
  from buys b join clubs c on c.id = b.club_id where b.id = $1`;

/** Reads what a buy's plan depends on, in one prepared statement; null when there is no such buy. */
export async function loadPlanGround(
  buyId: string,
  client: pg.ClientBase,
): Promise<PlanGround | null> {
  const { rows } = await client.query<Row>({
    name: 'plan-ground',
    text: groundSql,
    values: [buyId],
  });
  const row = rows[0];
  if (!row) return null;
  return {
    sheetVersion: row.sheet_version,
    planVersion: row.plan_version,
    terms: presentTerms(row),
    pooled: row.pooled ?? [],
    chosen: row.plan_override,
  };
}
