import { reserveMg } from '../mass/milligrams.ts';
import { perGram } from '../packs/pricePacks.ts';
import type { PackPlan } from '../packs/packTypes.ts';
import { compareIds } from '../shares/pledgeOrder.ts';
import type { MemberShare, ShareSheet } from '../shares/shareTypes.ts';
import { estimateOf, planInForce, pooledMg } from './requests.ts';
import type { SheetLine, SheetPledge, SheetTerms } from './sheetTerms.ts';

/** Packs of one size chosen for a line. */
export type ChosenPack = { offerId: string; packMg: number; count: number };

/** What a sheet shows of a line below its pledges. */
export type LineSums = {
  pooledMg: number;
  boughtMg: number;
  reserveMg: number;
  /** What stays beyond everybody's share and the reserve. */
  leftOverMg: number;
  packs: ChosenPack[];
  /** Packs' cost, in minor units. */
  costMinor: number;
  /** Minor units for each gram that is paid for; 0 when nothing is bought. */
  perGram: number;
};

/** Everything a sheet shows that is computed from terms, pledges and packs. */
export type SheetSums = {
  plan: PackPlan;
  overridden: boolean;
  lines: Record<string, LineSums>;
  /** What a member gets of a line, where it isn't what they asked for. */
  got: Record<string, Record<string, number>>;
  /** What each would pay, in minor units. */
  totals: Record<string, number>;
  mine: MemberShare | null;
  totalMinor: number;
  shelfMinor: number;
};

/** What the sums are made of, once the packs are planned. `override`: the organiser's own choice of packs. */
export type SumsGround = {
  terms: SheetTerms;
  pledges: SheetPledge[];
  override: Record<string, number> | null;
  me: string;
};

function packsOf(lineId: string, terms: SheetTerms, packs: Record<string, number>): ChosenPack[] {
  return terms.offers
    .filter((offer) => offer.lineId === lineId && (packs[offer.id] ?? 0) > 0)
    .map(({ id, packMg }) => ({ offerId: id, packMg, count: packs[id] ?? 0 }))
    .sort((a, b) => b.packMg - a.packMg || compareIds(a.offerId, b.offerId));
}

function lineSums(
  line: SheetLine,
  pooled: number,
  packs: ChosenPack[],
  costs: { costMinor: number; paidMg: number; shelfMg: number },
): LineSums {
  const reserve = reserveMg(pooled, line.reservePermyriad);
  return {
    pooledMg: pooled,
    boughtMg: packs.reduce((sum, { packMg, count }) => sum + packMg * count, 0),
    reserveMg: reserve,
    leftOverMg: Math.max(0, costs.shelfMg - reserve),
    packs,
    costMinor: costs.costMinor,
    perGram: perGram(costs.costMinor, costs.paidMg),
  };
}

function linesOf(
  terms: SheetTerms,
  pledges: readonly SheetPledge[],
  plan: PackPlan,
  sheet: ShareSheet | null,
): Record<string, LineSums> {
  const pooled = pooledMg(terms, pledges);
  const costs = new Map(terms.lines.map(({ id }) => [id, { costMinor: 0, paidMg: 0, shelfMg: 0 }]));
  const shelfPays = terms.leftOverPayer === 'shelf';
  for (const { lineId, mg, costMinor } of sheet?.shelf.lines ?? []) {
    const line = costs.get(lineId);
    if (!line) continue;
    line.shelfMg = mg;
    line.costMinor += costMinor;
    if (shelfPays) line.paidMg += mg;
  }
  for (const { lines } of sheet?.members ?? []) {
    for (const { lineId, mg, costMinor } of lines) {
      const line = costs.get(lineId);
      if (!line) continue;
      line.paidMg += mg;
      line.costMinor += costMinor;
    }
  }
  return Object.fromEntries(
    terms.lines.map((line) => [
      line.id,
      lineSums(
        line,
        pooled[line.id] ?? 0,
        packsOf(line.id, terms, plan.packs),
        costs.get(line.id) ?? { costMinor: 0, paidMg: 0, shelfMg: 0 },
      ),
    ]),
  );
}

function gotOtherwise(sheet: ShareSheet, pledges: readonly SheetPledge[]): SheetSums['got'] {
  const wanted = new Map(pledges.map((one) => [`${one.membershipId} ${one.lineId}`, one.wantedMg]));
  const got: SheetSums['got'] = {};
  for (const { memberId, lines } of sheet.members) {
    for (const { lineId, mg } of lines) {
      if (mg === (wanted.get(`${memberId} ${lineId}`) ?? 0)) continue;
      (got[memberId] ??= {})[lineId] = mg;
    }
  }
  return got;
}

/** Shares out by a computed plan, or by the organiser's choice where that can be had. */
export function sumsOfPlan(ground: SumsGround, computed: PackPlan): SheetSums {
  const { terms, pledges, override, me } = ground;
  const { plan, overridden } = planInForce(terms, pledges, computed, override);
  const sheet = plan.feasible ? estimateOf(terms, pledges, plan) : null;
  return {
    plan,
    overridden,
    lines: linesOf(terms, pledges, plan, sheet),
    got: sheet ? gotOtherwise(sheet, pledges) : {},
    totals: Object.fromEntries(
      (sheet?.members ?? []).map(({ memberId, totalMinor }) => [memberId, totalMinor]),
    ),
    mine: sheet?.members.find(({ memberId }) => memberId === me) ?? null,
    totalMinor: sheet?.totalMinor ?? 0,
    shelfMinor: sheet?.shelf.totalMinor ?? 0,
  };
}
