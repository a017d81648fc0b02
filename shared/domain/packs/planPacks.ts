import { bestPlan } from './bestPlan.ts';
import { packsByOffer, type CandidatePlan } from './candidatePlan.ts';
import { checkPackRequest } from './checkPackRequest.ts';
import { Budget, OutOfTime } from './clock.ts';
import { LineCovers } from './lineCovers.ts';
import { goodsOf, nextStepOf, type Step } from './nextStep.ts';
import { packModel, type PackModel } from './packModel.ts';
import { explainObstacle, packObstacle } from './packObstacle.ts';
import type { NextStep, PackPlan, PackRequest } from './packTypes.ts';
import type { LimitPrices } from './priceLimits.ts';
import { perGram, pricePacks } from './pricePacks.ts';

function nothing(reason: string, exact: boolean): PackPlan {
  return {
    feasible: false,
    exact,
    reason,
    packs: {},
    goodsMinor: 0,
    shippingMinor: 0,
    shippingBySupplier: {},
    totalMinor: 0,
    leftOverMg: {},
  };
}

function toPacks(model: PackModel, plan: CandidatePlan): Record<string, number> {
  const counts = packsByOffer(model, plan.packings);
  const packs: Record<string, number> = {};
  model.offerIds.forEach((id, index) => {
    const count = counts[index] ?? 0;
    if (count > 0) packs[id] = count;
  });
  return packs;
}

function toNextStep(request: PackRequest, { line, moreMg, before, after }: Step): NextStep {
  return {
    lineId: request.lines[line]?.id ?? '',
    moreMg,
    perGramBefore: perGram(goodsOf(before), before.mass),
    perGramAfter: perGram(goodsOf(after), after.mass),
  };
}

/**
 * Which packs to order so that every line is covered at the least cost, shipping included; equal
 * costs by least left over, then fewest packs, then more of the lowest offer id.
 *
 * @param budgetMs time after which the best plan found so far is returned with `exact: false`, or
 * an exact one without its next step; without it the search runs to the end
 * @throws RangeError naming the field for bad numbers, ids or shipping tables
 */
export function planPacks(request: PackRequest, budgetMs?: number): PackPlan {
  checkPackRequest(request);
  if (budgetMs !== undefined && !(Number.isFinite(budgetMs) && budgetMs >= 0)) {
    throw new RangeError(`budgetMs must be a number of at least 0, not ${budgetMs}`);
  }
  const budget = new Budget(budgetMs);
  const model = packModel(request);
  const covers = new LineCovers(model.suppliers, budget);
  const memory = new Map<string, LimitPrices>();
  const { plan, exact } = bestPlan(model, covers, budget, memory);
  if (!plan) {
    const reason = exact
      ? explainObstacle(packObstacle(request))
      : 'No plan was found in the time given.';
    return nothing(reason, exact);
  }

  const packs = toPacks(model, plan);
  const price = pricePacks(request, packs);
  const result: PackPlan = {
    feasible: true,
    exact,
    packs,
    goodsMinor: price.goodsMinor,
    shippingMinor: price.shippingMinor,
    shippingBySupplier: price.shippingBySupplier,
    totalMinor: price.totalMinor,
    leftOverMg: price.leftOverMg,
  };
  const step = exact ? tryNextStep(model, plan, covers, budget, memory) : null;
  return step ? { ...result, nextStep: toNextStep(request, step) } : result;
}

function tryNextStep(
  model: PackModel,
  plan: CandidatePlan,
  covers: LineCovers,
  budget: Budget,
  memory: Map<string, LimitPrices>,
): Step | null {
  try {
    return nextStepOf(model, plan, covers, budget, memory);
  } catch (error) {
    if (error instanceof OutOfTime) return null;
    throw error;
  }
}
