import { candidatePlan, comparePlans, type CandidatePlan } from './candidatePlan.ts';
import type { Budget } from './clock.ts';
import type { LineCovers } from './lineCovers.ts';
import type { PackModel } from './packModel.ts';
import type { Packing } from './packing.ts';
import { LimitPricing, type LimitPrices } from './priceLimits.ts';
import { quickPlans } from './quickPlans.ts';
import { settleChoice } from './settleChoice.ts';
import { shippingOptions, type ShippingOption } from './shippingOptions.ts';
import { termsChoice, type TermsChoice } from './termsChoice.ts';

/** A choice of terms that may hold the best plan, by what it costs at least. */
type Branch = { choice: TermsChoice; plainValue: number };
type Bounded = Branch & { bound: LimitPrices };

/** How many choices of terms are bounded before the first is settled. */
const settleAfter = 4;

/** Above so many choices of terms they are bounded supplier by supplier instead of listed. */
const mostListed = 5000;

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
    /** Plans dearer than this aren't looked for; Infinity when a quick plan is to be beaten. */
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

  /**
   * Looks for the best plan; what it returns is proven best if it costs no more than the guess.
   *
   * @throws OutOfTime with the best plan so far in `best`
   */
  run(): CandidatePlan | null {
    quickPlans(this.model, this.covers, (packings) => this.offer(packings));
    const all = this.model.suppliers.map(() => true);
    const goods = this.#plainValue(all);
    // Without a plan to beat nor a guess there is nothing to bound the search.
    if (goods === Infinity || this.#most() === Infinity) return null;
    const choices = this.#options.reduce((product, [, ways]) => product * ways.length, 1);
    if (choices > mostListed) this.#dive(0, new Map());
    else this.#list(goods);
    return this.best;
  }

  /** What a plan may cost at most to be of interest. */
  #most(): number {
    const most = this.best ? Math.min(this.best.cost, this.guess) : this.guess;
    return most + 1e-6 + 1e-8 * most;
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

  /** Bounds the choices of terms, cheapest first, and settles those within reach. */
  #list(goods: number): void {
    let open: Bounded[] = [];
    for (const branch of this.#branches(goods)) {
      if (branch.plainValue > this.#most()) break;
      const bound = this.#raise(branch.choice);
      if (!bound) continue;
      open.push({ ...branch, bound });
      // A plan settled early is what lets most of the other choices be dropped unseen.
      if (open.length === settleAfter) this.#settle(open.sort(byBound).shift() as Bounded);
    }
    open = open.sort(byBound);
    for (const branch of open) this.#settle(branch);
  }

  /** All choices of terms whose plain bound is within reach, cheapest first. */
  #branches(allGoods: number): Branch[] {
    const branches: Branch[] = [];
    const options = new Map<number, ShippingOption>();
    const walk = (at: number, shipping: number, goods: number): void => {
      this.budget.tick();
      if (goods + shipping > this.#most()) return;
      const entry = this.#options[at];
      if (!entry) {
        const choice = termsChoice(this.model, options);
        branches.push({ choice, plainValue: goods + shipping });
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
    walk(0, 0, allGoods);
    return branches.sort((a, b) => a.plainValue - b.plainValue);
  }

  /** Chooses the terms supplier by supplier; those not chosen yet ship anything for nothing. */
  #dive(at: number, options: Map<number, ShippingOption>): void {
    const choice = termsChoice(this.model, options);
    const bound = this.#raise(choice);
    if (!bound) return;
    const entry = this.#options[at];
    if (!entry) return this.#settle({ choice, plainValue: 0, bound });
    const [supplier, ways] = entry;
    for (const way of [...ways].sort((a, b) => a.shipping - b.shipping)) {
      options.set(supplier, way);
      this.#dive(at + 1, options);
    }
    options.delete(supplier);
  }

  /** The bound of a choice of terms, or null when it is out of reach. */
  #raise(choice: TermsChoice): LimitPrices | null {
    const pricing = new LimitPricing(this.model, this.covers, choice, {
      tried: (packings) => this.offer(packings),
      enough: () => this.#most(),
    });
    const bound = pricing.raise(this.memory.get(choice.key));
    if (!bound) return null;
    const priced = bound.prices.some((price) => price > 0);
    if (priced && this.memory.size < mostListed) this.memory.set(choice.key, bound);
    return bound.value <= this.#most() ? bound : null;
  }

  #settle({ choice, bound }: Bounded): void {
    const most = this.#most();
    if (bound.value > most) return;
    const { model, covers, budget } = this;
    const packings = settleChoice({ model, covers, budget, choice, bound }, most);
    if (packings) this.offer(packings);
  }
}

function byBound(a: Bounded, b: Bounded): number {
  return a.bound.value - b.bound.value;
}
