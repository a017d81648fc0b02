import { shareRequestOf, type Received } from '../buys/requests.ts';
import type { SheetPledge, SheetTerms } from '../buys/sheetTerms.ts';
import { exactSum } from '../money/minor.ts';
import { shareOut } from '../shares/shareOut.ts';
import type { ShareRequest, ShareSheet } from '../shares/shareTypes.ts';
import { bagCountsMg, bagLeavesMg, type BagMasses } from './bagSums.ts';

/** A portion as the next targets see it. */
export interface StandingPortion {
  readonly membershipId: string;
  readonly lineId: string;
  readonly targetMg: number;
  readonly state: 'waiting' | 'claimed' | 'done' | 'void';
  /** Taken out by an organiser, so that it stays out. */
  readonly takenOut: boolean;
}

export interface TargetsGiven {
  readonly terms: SheetTerms;
  readonly pledges: readonly SheetPledge[];
  readonly bags: readonly (BagMasses & { readonly lineId: string })[];
  /** Known or estimated cost; the grams don't depend on it. */
  readonly costs: Received;
  /** Whether splitting has begun: shares of which a part is weighed then keep their targets. */
  readonly begun: boolean;
  readonly portions: readonly StandingPortion[];
}

/** Grams that a member shall get of a line; `kept`: they stand already and nothing moves them. */
export interface Target {
  readonly membershipId: string;
  readonly lineId: string;
  readonly targetMg: number;
  readonly kept: boolean;
}

const keyOf = (share: { membershipId: string; lineId: string }) =>
  `${share.lineId} ${share.membershipId}`;

function keptTargets({ begun, portions }: TargetsGiven): Map<string, Target> {
  const kept = new Map<string, Target>();
  if (!begun) return kept;
  for (const portion of portions) {
    if (portion.state === 'done' || (portion.state === 'void' && portion.takenOut)) {
      const { membershipId, lineId } = portion;
      kept.set(keyOf(portion), { membershipId, lineId, targetMg: 0, kept: true });
    }
  }
  for (const portion of portions) {
    const share = kept.get(keyOf(portion));
    if (share && portion.state !== 'void') {
      kept.set(keyOf(portion), { ...share, targetMg: share.targetMg + portion.targetMg });
    }
  }
  return kept;
}

function availableMg(given: TargetsGiven, kept: ReadonlyMap<string, Target>, lineId: string) {
  const bags = given.bags.filter((bag) => bag.lineId === lineId);
  if (!given.begun) return exactSum(bags.map(bagCountsMg), 'availableMg');
  const promised = given.portions.filter(
    (portion) =>
      portion.lineId === lineId &&
      (portion.state === 'waiting' || portion.state === 'claimed') &&
      kept.has(keyOf(portion)),
  );
  const left = exactSum(bags.map(bagLeavesMg), 'availableMg');
  return Math.max(
    0,
    left -
      exactSum(
        promised.map(({ targetMg }) => targetMg),
        'promisedMg',
      ),
  );
}

/**
 * Targets from what came: `shareOut` under the lines' own policies, of the lesser of nominal and net of each bag. Once
 * splitting has begun only what is left is shared, and only among those of whom nothing is weighed yet.
 *
 * @throws RangeError past the safe integers
 */
export function shareTargets(given: TargetsGiven): {
  request: ShareRequest;
  sheet: ShareSheet;
  targets: Target[];
} {
  const kept = keptTargets(given);
  const lines: Received['lines'] = {};
  for (const { id } of given.terms.lines) {
    const cost = given.costs.lines[id];
    lines[id] = {
      availableMg: availableMg(given, kept, id),
      costMinor: cost?.costMinor ?? 0,
      ...(cost?.taxRate === undefined ? {} : { taxRate: cost.taxRate }),
    };
  }
  const request = shareRequestOf(
    given.terms,
    given.pledges.filter((pledge) => !kept.has(keyOf(pledge))),
    { lines, charges: given.costs.charges },
    'targets',
  );
  const sheet = shareOut(request);
  const fresh = sheet.members.flatMap(({ memberId, lines: own }) =>
    own.map(({ lineId, mg }): Target => ({
      membershipId: memberId,
      lineId,
      targetMg: mg,
      kept: false,
    })),
  );
  return { request, sheet, targets: [...fresh, ...kept.values()] };
}

/** What has to happen to the portions of one member on one line so that they add up to a target. */
export type PortionChange<P> =
  | { act: 'add'; targetMg: number }
  | { act: 'set'; portion: P; targetMg: number }
  | { act: 'void'; portion: P };

/**
 * Changes that bring the portions of one share to its target: none when they add up already; else the first takes the
 * whole target and the others fall away.
 *
 * @param portions of one member and line, in the order of their codes
 */
export function portionChanges<P extends { targetMg: number; state: StandingPortion['state'] }>(
  portions: readonly P[],
  targetMg: number,
): PortionChange<P>[] {
  const living = portions.filter(({ state }) => state !== 'void');
  if (
    exactSum(
      living.map((portion) => portion.targetMg),
      'targetMg',
    ) === targetMg
  )
    return [];
  if (targetMg === 0) return living.map((portion) => ({ act: 'void', portion }));
  const [first = portions[0], ...rest] = living;
  if (!first) return [{ act: 'add', targetMg }];
  return [
    { act: 'set', portion: first, targetMg },
    ...rest.map((portion): PortionChange<P> => ({ act: 'void', portion })),
  ];
}
