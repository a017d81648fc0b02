import type { Budget } from './clock.ts';
import { Front } from './front.ts';
import type { Item } from './packModel.ts';
import type { Packing } from './packing.ts';
import type { SharedLimit } from './termsChoice.ts';
import { reducedPrice, type Weights } from './coverItems.ts';

/** A packing with what it adds to the shared limits and what it costs under each bound's weights. */
export type Option = { packing: Packing; uses: number[]; reduced: number[] };

/** A lower bound on plans: the sum of reduced costs plus `constant`. */
export type PlanBound = { weights: Weights; constant: number };

type State = {
  cost: number;
  mass: number;
  packs: number;
  uses: number[];
  reduced: number[];
  option: Option | null;
  before: State | null;
  /** Packs by offer, once a tie has asked for them. */
  offers: Map<number, number> | null;
};

/** What a packing uses of a shared limit. */
export function useOf(packing: Packing, { supplier, of, sign }: SharedLimit): number {
  return sign * ((of === 'value' ? packing.values : packing.masses)[supplier] as number);
}

/** A packing's cost under weights, its private shipping included. */
export function reducedCost({ line, counts, cost }: Packing, weights: Weights): number {
  let goods = 0;
  let reduced = 0;
  for (let i = 0; i < counts.length; i++) {
    const count = counts[i] as number;
    if (count === 0) continue;
    const item = line.items[i] as Item;
    goods += count * item.price;
    reduced += count * reducedPrice(item, weights);
  }
  return reduced + (cost - goods);
}

/** Prepares a packing for merging. */
export function makeOption(packing: Packing, limits: SharedLimit[], bounds: PlanBound[]): Option {
  return {
    packing,
    uses: limits.map((limit) => useOf(packing, limit)),
    reduced: bounds.map((bound) => reducedCost(packing, bound.weights)),
  };
}

function chain(state: State): Packing[] {
  const packings: Packing[] = [];
  for (let at: State | null = state; at?.option; at = at.before) packings.push(at.option.packing);
  return packings;
}

function offersOf(state: State): Map<number, number> {
  if (!state.offers) {
    const packs = new Map<number, number>();
    for (const { line, counts } of chain(state)) {
      line.items.forEach((item, i) => packs.set(item.offer, (counts[i] as number) * item.packs));
    }
    state.offers = packs;
  }
  return state.offers;
}

/** Order of the last tie: more packs of the lowest offer id. Both states cover the same lines. */
function compareOffers(a: State, b: State): number {
  const [left, right] = [offersOf(a), offersOf(b)];
  let lowest = Infinity;
  let difference = 0;
  for (const [offer, packs] of left) {
    const other = right.get(offer) ?? 0;
    if (offer >= lowest || packs === other) continue;
    lowest = offer;
    difference = other - packs;
  }
  return difference;
}

function compareStates(a: State, b: State): number {
  const known = a.cost - b.cost || a.mass - b.mass || a.packs - b.packs;
  return known !== 0 || a === b ? known : compareOffers(a, b);
}

/** For each line on, what the lines from there must and may use, and must cost. */
type Rest = { least: number[]; most: number[]; reduced: number[] };

function restsOf(lines: Option[][], limits: number, bounds: number): Rest[] {
  const rests: Rest[] = [
    {
      least: new Array<number>(limits).fill(0),
      most: new Array<number>(limits).fill(0),
      reduced: new Array<number>(bounds).fill(0),
    },
  ];
  for (const options of [...lines].reverse()) {
    const { least, most, reduced } = rests[0] as Rest;
    const fold = (base: number[], pick: (option: Option) => number[], of: typeof Math.min) =>
      base.map(
        (sum, d) =>
          sum +
          options.reduce(
            (edge, option) => of(edge, pick(option)[d] as number),
            of === Math.min ? Infinity : -Infinity,
          ),
      );
    rests.unshift({
      least: fold(least, (option) => option.uses, Math.min),
      most: fold(most, (option) => option.uses, Math.max),
      reduced: fold(reduced, (option) => option.reduced, Math.min),
    });
  }
  return rests;
}

/**
 * Chooses one option a line, within the shared limits, at the least cost, mass, packs and offer ids.
 *
 * @param most plans that must cost more are dropped
 * @throws OutOfTime
 */
export function mergeLines(
  lines: Option[][],
  limits: SharedLimit[],
  bounds: PlanBound[],
  most: number,
  budget: Budget,
): Packing[] | null {
  const order = [...lines].sort((a, b) => a.length - b.length);
  const rests = restsOf(order, limits.length, bounds.length);
  const slack = 1e-6 + 1e-8 * Math.abs(most);
  let states: State[] = [
    {
      cost: 0,
      mass: 0,
      packs: 0,
      uses: limits.map(() => 0),
      reduced: bounds.map((bound) => bound.constant),
      option: null,
      before: null,
      offers: null,
    },
  ];
  order.forEach((options, place) => {
    const rest = rests[place + 1] as Rest;
    const next: State[] = [];
    for (const before of states) {
      for (const option of options) {
        budget.tick();
        const state = extend(before, option, rest, limits, most + slack);
        if (state) next.push(state);
      }
    }
    const front = new Front(limits.length, budget);
    states = next.sort(compareStates).filter((state) => front.add(state.uses));
  });
  const best = states.sort(compareStates)[0];
  return best ? chain(best).sort((a, b) => a.line.index - b.line.index) : null;
}

function extend(
  before: State,
  option: Option,
  rest: Rest,
  limits: SharedLimit[],
  most: number,
): State | null {
  const reduced: number[] = [];
  for (let k = 0; k < before.reduced.length; k++) {
    const sum = (before.reduced[k] as number) + (option.reduced[k] as number);
    if (sum + (rest.reduced[k] as number) > most) return null;
    reduced.push(sum);
  }
  const uses: number[] = [];
  for (let d = 0; d < limits.length; d++) {
    const sum = (before.uses[d] as number) + (option.uses[d] as number);
    const { limit } = limits[d] as SharedLimit;
    if (sum + (rest.least[d] as number) > limit) return null;
    // What can't break the limit any more is all the same.
    uses.push(Math.max(sum, limit - (rest.most[d] as number)));
  }
  const { packing } = option;
  return {
    cost: before.cost + packing.cost,
    mass: before.mass + packing.mass,
    packs: before.packs + packing.packs,
    uses,
    reduced,
    option,
    before,
    offers: null,
  };
}
