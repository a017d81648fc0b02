import { candidatePlan, comparePlans, type CandidatePlan } from './candidatePlan.ts';
import type { Budget } from './clock.ts';
import { LineCovers, plainWeights } from './lineCovers.ts';
import { listCovers } from './listCovers.ts';
import { makeOption, mergeLines, noMore, type Option, type PlanBound } from './mergeLines.ts';
import type { PackModel } from './packModel.ts';
import { comparePackings, type Packing } from './packing.ts';
import { LimitPricing, type LimitPrices } from './priceLimits.ts';
import { shippingOptions, type ShippingOption } from './shippingOptions.ts';
import { termsChoice, type TermsChoice } from './termsChoice.ts';

/** A choice of terms that may still hold the best plan. */
type Branch = { choice: TermsChoice; plainValue: number; bound: LimitPrices | null };

/** How far above its bound a choice's plans are first looked for, as a share. */
const firstReach = 0.0005;

/** How many choices of terms are bounded before the first is settled. */
const settleAfter = 4;

/** Searches the best plan of a model exactly: each way the suppliers' terms can turn out, bounded. */
export class PlanSearch {
  best: CandidatePlan | null = null;
  readonly #options: [number, ShippingOption[]][];

  constructor(
    readonly model: PackModel,
    readonly covers: LineCovers,
    readonly budget: Budget,
    /** Bounds of earlier searches by choice of terms; the need of some lines may have changed. */
    readonly memory: Map<string, LimitPrices>,
    /** Plans dearer than this aren't looked for. */
    readonly guess = Infinity,
  ) {
    this.#options = model.suppliers.flatMap((supplier, index): [number, ShippingOption[]][] =>
      supplier.shared ? [[index, shippingOptions(supplier)]] : [],
    );
  }

  /** Takes a plan into account, if its terms are met. */
  offer(packings: Packing[]): void {
    const plan = candidatePlan(this.model, packings);
    if (!plan || (this.best && comparePlans(this.model, this.best, plan) <= 0)) return;
    this.best = plan;
  }

  /** What a plan may cost at most to be of interest. */
  #most(): number {
    return this.best ? Math.min(this.best.cost, this.guess) : this.guess;
  }

  #slack(): number {
    const most = this.#most();
    return most === Infinity ? Infinity : most + 1e-6 + 1e-8 * most;
  }

  #plainValue(allowed: readonly boolean[]): number {
    let sum = 0;
    for (const line of this.model.lines) {
      const packing = this.covers.best(line, allowed);
      if (!packing) return Infinity;
      sum += packing.cost;
    }
    return sum;
  }

  /** All choices of terms whose plain bound is within reach, cheapest first. */
  #branches(): Branch[] {
    const branches: Branch[] = [];
    const options = new Map<number, ShippingOption>();
    const walk = (at: number, shipping: number, goods: number): void => {
      this.budget.tick();
      if (goods + shipping > this.#slack()) return;
      const entry = this.#options[at];
      if (!entry) {
        const choice = termsChoice(this.model, options);
        branches.push({ choice, plainValue: goods + shipping, bound: null });
        return;
      }
      const [supplier, ways] = entry;
      for (const way of ways) {
        options.set(supplier, way);
        const rest = way.used ? goods : this.#plainValue(termsChoice(this.model, options).allowed);
        walk(at + 1, shipping + way.shipping, rest);
      }
      options.delete(supplier);
    };
    const all = this.model.suppliers.map(() => true);
    const goods = this.#plainValue(all);
    if (goods < Infinity) walk(0, 0, goods);
    return branches.sort((a, b) => a.plainValue - b.plainValue);
  }

  /** Plans that ignore the suppliers' terms but happen to meet them. */
  #tryPlain(): void {
    const suppliers = this.#options.map(([supplier]) => supplier);
    const sets = Math.min(2 ** suppliers.length, 64);
    for (let set = 0; set < sets; set++) {
      const allowed = this.model.suppliers.map(() => true);
      suppliers.forEach((supplier, bit) => {
        if ((set >> bit) & 1) allowed[supplier] = false;
      });
      const packings = this.model.lines.map((line) => this.covers.best(line, allowed));
      if (packings.every((packing) => packing !== null)) this.offer(packings);
    }
  }

  #bounds(branch: Branch, bound: LimitPrices): PlanBound[] {
    const { choice } = branch;
    const plain = { weights: plainWeights(this.model.suppliers.length), constant: choice.shipping };
    const priced = bound.prices.some((price) => price > 0);
    return priced ? [plain, { weights: bound.weights, constant: bound.constant }] : [plain];
  }

  /** Every packing of every line that a plan of at most so much can hold. */
  #listOptions(branch: Branch, bound: LimitPrices, bounds: PlanBound[], most: number) {
    const { choice, plainValue } = branch;
    const values = [plainValue, bound.value];
    return this.model.lines.map((line, index): Option[] => {
      const plain = this.covers.best(line, choice.allowed) as Packing;
      const least = [plain.cost, bound.costs[index] as number];
      const limits = bounds.map(({ weights }, k) => ({
        weights,
        most: (least[k] as number) + (most - (values[k] as number)),
      }));
      const { suppliers } = this.model;
      const { allowed, padded } = choice;
      const found = listCovers(line, suppliers, allowed, padded, limits, this.budget);
      const options = found.map((packing) => makeOption(packing, choice.limits, bounds));
      return undominatedOptions(options, this.budget);
    });
  }

  /** Finds the best plan under one choice of terms, if it is within reach. */
  #settle(branch: Branch): void {
    const { bound, choice } = branch;
    if (!bound || bound.value > this.#slack()) return;
    if (bound.prices.every((price) => price === 0) && bound.excess.every((x) => x <= 0)) {
      this.offer(bound.packings);
      return;
    }
    const bounds = this.#bounds(branch, bound);
    // Lists grow steeply with the reach, so it starts short and grows until a plan is within it.
    for (let reach = 1 + bound.value * firstReach; ; reach *= 3) {
      const most = Math.min(this.#most(), bound.value + reach);
      const lines = this.#listOptions(branch, bound, bounds, most);
      const packings = mergeLines(lines, choice.limits, bounds, most, this.budget);
      if (packings) this.offer(packings);
      if (packings || bound.value + reach > this.#slack()) return;
    }
  }

  /**
   * Looks for the best plan; what it returns is proven best if it costs no more than the guess.
   *
   * @throws OutOfTime with the best plan so far in `best`
   */
  run(): CandidatePlan | null {
    this.#tryPlain();
    const branches = this.#branches();
    let open: Branch[] = [];
    for (const branch of branches) {
      if (branch.plainValue > this.#slack()) break;
      this.#raise(branch);
      if (!branch.bound || branch.bound.value > this.#slack()) continue;
      open.push(branch);
      // A plan settled early is what lets most of the other choices be dropped unseen.
      if (open.length === settleAfter) this.#settle(open.sort(byBound).shift() as Branch);
    }
    open = open.sort(byBound);
    for (const branch of open) this.#settle(branch);
    return this.best;
  }

  #raise(branch: Branch): void {
    const { choice } = branch;
    const pricing = new LimitPricing(this.model, this.covers, choice, {
      tried: (packings) => this.offer(packings),
      enough: () => this.#slack(),
    });
    branch.bound = pricing.raise(this.memory.get(choice.key));
    if (branch.bound?.prices.some((price) => price > 0)) this.memory.set(choice.key, branch.bound);
  }
}

function byBound(a: Branch, b: Branch): number {
  return (a.bound?.value ?? Infinity) - (b.bound?.value ?? Infinity);
}

/** Of one line's options, those that no better one matches in every shared limit. */
function undominatedOptions(options: Option[], budget: Budget): Option[] {
  options.sort((a, b) => comparePackings(a.packing, b.packing));
  const kept: Option[] = [];
  for (const option of options) {
    const matched = kept.some((other) => {
      budget.tick();
      return noMore(other.uses, option.uses);
    });
    if (!matched) kept.push(option);
  }
  return kept;
}
