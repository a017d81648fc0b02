import type { SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import type { PackPlan } from '#shared/domain/packs/packTypes.ts';
import type { LineTotal, PledgeCells, SheetMember, SheetReply } from '#shared/schemas/sheet.ts';

type Tail = PledgeCells extends [number, ...infer Rest] ? Rest : never;

/** A person with living pledges; the pledges name their line by its id. */
export interface MemberRow {
  readonly membershipId: string;
  readonly name: string;
  readonly guest: boolean;
  readonly pledges: readonly [string, ...Tail][];
}

/** What `presentSheet` takes of a sheet's row. */
export interface SheetFacts {
  readonly sheetVersion: number;
  readonly terms: SheetTerms;
  readonly members: readonly MemberRow[];
  readonly plan: { forVersion: number; plan: PackPlan } | null;
  readonly planOverride: Record<string, number> | null;
  readonly organisers: SheetReply['organisers'];
}

function totalsOf(lineIds: readonly string[], members: readonly MemberRow[]): LineTotal[] {
  const totals = new Map(
    lineIds.map((lineId) => [lineId, { lineId, wantedMg: 0, roomMg: 0, members: 0 }]),
  );
  for (const { pledges } of members) {
    for (const [lineId, wantedMg, upToMg] of pledges) {
      const total = totals.get(lineId);
      if (!total) continue;
      total.wantedMg += wantedMg;
      total.roomMg += Math.max(0, (upToMg ?? 0) - wantedMg);
      total.members += 1;
    }
  }
  return [...totals.values()];
}

/** A sheet as one class of readers sees it; `totals` leaves out the single pledges of lines that show only totals. */
export function presentSheet(facts: SheetFacts, reader: SheetReply['reader']): SheetReply {
  const { terms } = facts;
  const place = new Map(terms.lines.map(({ id }, index) => [id, index]));
  const hidden = new Set(
    reader === 'full' ? [] : terms.lines.filter((line) => line.totalsOnly).map(({ id }) => id),
  );
  const members = facts.members.flatMap(({ pledges, ...person }): SheetMember[] => {
    const cells = pledges.flatMap(([lineId, ...tail]): PledgeCells[] => {
      const index = place.get(lineId);
      return index === undefined || hidden.has(lineId) ? [] : [[index, ...tail]];
    });
    // Somebody who pledged on hidden lines alone would be named by an empty row.
    return cells.length > 0 ? [{ ...person, pledges: cells }] : [];
  });
  return {
    sheetVersion: facts.sheetVersion,
    reader,
    terms,
    members,
    totals: totalsOf([...hidden], facts.members),
    plan: facts.plan,
    planOverride: facts.planOverride,
    organisers: facts.organisers,
  };
}
