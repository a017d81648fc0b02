import type { Received } from '#shared/domain/buys/requests.ts';
import type { SheetPledge, SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import { shareTargets, type Target } from '#shared/domain/splits/targets.ts';
import type { ShareRequest, ShareSheet } from '#shared/domain/shares/shareTypes.ts';
import { select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import { presentBag, type BagRow, type PortionRow } from '../../presenters/splits.ts';
import { loadPledges, loadSheetTerms } from '../buys/loadSheetTerms.ts';
import { basisOf } from './basisOf.ts';
import { findBags, findPortions } from './splitRows.ts';

/** Targets as they would be now, with all that they follow from. */
export interface ComputedTargets {
  readonly terms: SheetTerms;
  readonly pledges: readonly SheetPledge[];
  readonly bags: readonly BagRow[];
  readonly portions: readonly PortionRow[];
  readonly request: ShareRequest;
  readonly sheet: ShareSheet;
  readonly targets: readonly Target[];
  /** What the members were told: the newest sheet from the lock or the order. */
  readonly told: { request: ShareRequest; sheet: ShareSheet };
  readonly basis: string;
  /** Whether the portions already add up to these targets. */
  readonly standing: boolean;
  /** Why they can't be applied, or null. */
  readonly blocked: string | null;
}

/** The newest of the given kinds of snapshot of a buy. */
export async function findSnapshot(
  buyId: string,
  kinds: readonly ('estimate' | 'ordered' | 'targets' | 'final')[],
  tx?: Tx,
): Promise<{
  request: ShareRequest;
  sheet: ShareSheet;
  extra: unknown;
  at: Date;
} | null> {
  const [row] = await select<{
    request: ShareRequest;
    sheet: ShareSheet;
    extra: unknown;
    at: Date;
  }>(
    `select request, sheet, extra, created_at as at from snapshots where buy_id = :buyId and kind in (:kinds)
     order by created_at desc limit 1`,
    { buyId, kinds },
    tx,
  );
  return row ?? null;
}

function costsOfRequest({ lines, charges }: ShareRequest): Received {
  const known: Received['lines'] = {};
  for (const { id, availableMg, costMinor, taxRate } of lines) {
    known[id] = { availableMg, costMinor, ...(taxRate === undefined ? {} : { taxRate }) };
  }
  return { lines: known, charges };
}

function whyBlocked(bags: readonly BagRow[]): string | null {
  const present = bags.filter(({ missing }) => !missing);
  if (present.length === 0) return 'No bag has come yet.';
  const unweighed = present.filter(({ net_mg }) => net_mg === null).length;
  if (unweighed === 0) return null;
  return unweighed === 1
    ? '1 bag is still to be weighed.'
    : `${unweighed} bags are still to be weighed.`;
}

const keyOf = (lineId: string, membershipId: string) => `${lineId} ${membershipId}`;

function areStanding(targets: readonly Target[], portions: readonly PortionRow[]): boolean {
  const sums = new Map<string, number>();
  for (const portion of portions) {
    if (portion.state === 'void') continue;
    const key = keyOf(portion.line_id, portion.membership_id);
    sums.set(key, (sums.get(key) ?? 0) + portion.target_mg);
  }
  for (const { lineId, membershipId, targetMg } of targets) {
    const key = keyOf(lineId, membershipId);
    if ((sums.get(key) ?? 0) !== targetMg) return false;
    sums.delete(key);
  }
  return sums.size === 0;
}

/** What everybody's target is by the bags as they are now; pure but for its reads. */
export async function computeTargets(
  buy: Pick<Buy, 'id' | 'state' | 'targetVersion'>,
  tx?: Tx,
): Promise<ComputedTargets> {
  const terms = await loadSheetTerms(buy.id, tx);
  const pledges = await loadPledges(buy.id, tx);
  const bags = await findBags(buy.id, tx);
  const portions = await findPortions(buy.id, tx);
  const told = await findSnapshot(buy.id, ['estimate', 'ordered'], tx);
  if (!told) throw new Error(`buy ${buy.id} was never locked`);
  const { request, sheet, targets } = shareTargets({
    terms,
    pledges,
    bags: bags.map(presentBag),
    costs: costsOfRequest(told.request),
    begun: buy.state === 'splitting',
    portions: portions.map((portion) => ({
      membershipId: portion.membership_id,
      lineId: portion.line_id,
      targetMg: portion.target_mg,
      state: portion.state,
      takenOut: portion.voided_by_id !== null,
    })),
  });
  return {
    terms,
    pledges,
    bags,
    portions,
    request,
    sheet,
    targets,
    told,
    basis: basisOf([buy.targetVersion, request, targets]),
    standing: buy.targetVersion > 0 && areStanding(targets, portions),
    blocked: whyBlocked(bags),
  };
}
