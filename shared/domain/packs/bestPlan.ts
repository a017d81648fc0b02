import type { CandidatePlan } from './candidatePlan.ts';
import { OutOfTime, type Budget } from './clock.ts';
import { coverItems } from './coverItems.ts';
import { plainWeights, type LineCovers } from './lineCovers.ts';
import type { PackModel } from './packModel.ts';
import type { Packing } from './packing.ts';
import type { LimitPrices } from './priceLimits.ts';
import { PlanSearch } from './planSearch.ts';

/** The best plan found, or null; `exact` is false when time ran out before it was proven. */
export type Best = { plan: CandidatePlan | null; exact: boolean };

/** No plan without wasted packs costs more than this. */
function dearest(model: PackModel): number {
  const suppliers = model.suppliers.length;
  const all = new Array<boolean>(suppliers).fill(true);
  const padded = model.suppliers.map((supplier) => supplier.padded);
  let most = 1;
  for (const line of model.lines) {
    const { items, extra } = coverItems(
      line,
      model.suppliers,
      all,
      padded,
      plainWeights(suppliers),
    );
    items.forEach(({ price, mass, max }, i) => {
      most += price * Math.min(max, Math.ceil(line.need / mass) + (extra[i] as number));
    });
  }
  for (const { terms } of model.suppliers) {
    const { shipping } = terms;
    most += shipping.kind === 'flat' ? shipping.minor : 0;
    most += shipping.kind === 'flat' ? 0 : Math.max(0, ...shipping.steps.map((s) => s.minor));
  }
  return most;
}

/**
 * The best plan of a model.
 *
 * @param memory bounds from plans of the same request, where some lines needed less
 * @param known a plan that is feasible, where one is; the search then only looks for better ones
 */
export function bestPlan(
  model: PackModel,
  covers: LineCovers,
  budget: Budget,
  memory: Map<string, LimitPrices>,
  known?: Packing[],
): Best {
  const most = dearest(model);
  let guess = Infinity;
  let found = known;
  for (;;) {
    const search = new PlanSearch(model, covers, budget, memory, guess);
    try {
      if (found) search.offer(found);
      const plan = search.run();
      if (plan && plan.cost <= guess) return { plan, exact: true };
      // A plan met on the way, too dear to be proven best, is what the next search has to beat.
      found = plan?.packings;
      if (plan) guess = Infinity;
      else if (guess === Infinity) guess = most / 64;
      else if (guess > most) return { plan: null, exact: true };
      else guess *= 4;
    } catch (error) {
      if (!(error instanceof OutOfTime)) throw error;
      return { plan: search.best, exact: false };
    }
  }
}
