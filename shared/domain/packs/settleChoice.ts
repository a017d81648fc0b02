import type { Budget } from './clock.ts';
import { plainWeights, type LineCovers } from './lineCovers.ts';
import { listCovers } from './listCovers.ts';
import { Front } from './front.ts';
import { makeOption, mergeLines, useOf, type Option, type PlanBound } from './mergeLines.ts';
import type { PackModel } from './packModel.ts';
import { comparePackings, type Packing } from './packing.ts';
import type { LimitPrices } from './priceLimits.ts';
import type { SharedLimit, TermsChoice } from './termsChoice.ts';

/** How far above its bound a choice's plans are first looked for, as a share. */
const firstReach = 0.0005;

/** What settling one choice of terms works on. */
export type Unsettled = {
  model: PackModel;
  covers: LineCovers;
  budget: Budget;
  choice: TermsChoice;
  bound: LimitPrices;
};

/** Every packing of each line that a plan of at most so much can hold. */
function listPackings(of: Unsettled, bounds: PlanBound[], most: number): Packing[][] {
  const { model, covers, budget, choice, bound } = of;
  const plain = model.lines.map((line) => covers.best(line, choice.allowed) as Packing);
  const plainValue = plain.reduce((sum, packing) => sum + packing.cost, choice.shipping);
  const values = [plainValue, bound.value];
  return model.lines.map((line, index) => {
    const least = [(plain[index] as Packing).cost, bound.costs[index] as number];
    const limits = bounds.map(({ weights }, k) => ({
      weights,
      most: (least[k] as number) + (most - (values[k] as number)),
    }));
    const { allowed, padded } = choice;
    return listCovers(line, model.suppliers, allowed, padded, limits, budget);
  });
}

/** The limits that some choice of these packings would break. */
function bindingLimits(lines: Packing[][], limits: SharedLimit[]): SharedLimit[] {
  return limits.filter((limit) => {
    let most = 0;
    for (const packings of lines) {
      let edge = -Infinity;
      for (const packing of packings) edge = Math.max(edge, useOf(packing, limit));
      most += edge;
    }
    return most > limit.limit;
  });
}

/** Of one line's packings, those that no better one matches in every shared limit. */
function undominated(
  packings: Packing[],
  limits: SharedLimit[],
  bounds: PlanBound[],
  budget: Budget,
): Option[] {
  const front = new Front(limits.length, budget);
  return packings
    .sort(comparePackings)
    .map((packing) => makeOption(packing, limits, bounds))
    .filter((option) => front.add(option.uses));
}

/**
 * The best plan under one choice of terms.
 *
 * @param most plans that cost more are of no interest
 * @returns null when there is none within `most`
 * @throws OutOfTime
 */
export function settleChoice(of: Unsettled, most: number): Packing[] | null {
  const { model, choice, bound, budget } = of;
  const priced = bound.prices.some((price) => price > 0);
  // The lines' best covers keep the limits by themselves, so nothing under this choice beats them.
  if (!priced && bound.excess.every((excess) => excess <= 0)) return bound.packings;

  const bounds: PlanBound[] = [
    { weights: plainWeights(model.suppliers.length), constant: choice.shipping },
  ];
  if (priced) bounds.push({ weights: bound.weights, constant: bound.constant });
  // Lists grow steeply with the reach, so it starts short and grows until a plan is within it.
  for (let reach = 1 + bound.value * firstReach; ; reach *= 3) {
    const within = Math.min(most, bound.value + reach);
    const lines = listPackings(of, bounds, within);
    const limits = bindingLimits(lines, choice.limits);
    const options = lines.map((packings) => undominated(packings, limits, bounds, budget));
    const packings = mergeLines(options, limits, bounds, within, budget);
    if (packings || bound.value + reach > most) return packings;
  }
}
