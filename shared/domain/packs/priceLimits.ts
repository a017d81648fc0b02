import type { Weights } from './coverItems.ts';
import type { LineCovers } from './lineCovers.ts';
import type { LineModel, PackModel } from './packModel.ts';
import type { Packing } from './packing.ts';
import type { SharedLimit, TermsChoice } from './termsChoice.ts';

/** A lower bound on every plan under a choice of terms, by pricing its shared limits. */
export type LimitPrices = {
  prices: number[];
  weights: Weights;
  constant: number;
  value: number;
  /** The cheapest packings at these prices; they needn't keep the limits. */
  packings: Packing[];
  /** The lines' reduced costs, in their order. */
  costs: number[];
  /** By how much the packings break each limit; negative where they keep it. */
  excess: number[];
  /** Whether the bound was raised as far as it would go. */
  finished: boolean;
};

/** Tells the search of packings met on the way, and how low a bound is still worth raising. */
export type Ascent = { tried(packings: Packing[]): void; enough(): number };

/** Finds good prices for the shared limits of one choice of terms. */
export class LimitPricing {
  readonly #touched: Set<LineModel>;

  constructor(
    readonly model: PackModel,
    readonly covers: LineCovers,
    readonly choice: TermsChoice,
    readonly ascent: Ascent,
  ) {
    const limited = new Set(choice.limits.map((limit) => limit.supplier));
    this.#touched = new Set(
      model.lines.filter((line) => line.shared.some((supplier) => limited.has(supplier))),
    );
  }

  #weights(prices: number[]): Weights {
    const { suppliers } = this.model;
    const alpha = new Float64Array(suppliers.length).fill(1);
    const beta = new Float64Array(suppliers.length);
    this.choice.limits.forEach(({ supplier, of, sign }, d) => {
      const weights = of === 'value' ? alpha : beta;
      weights[supplier] = (weights[supplier] as number) + sign * (prices[d] as number);
    });
    return { alpha, beta };
  }

  /**
   * The bound at these prices, or null when some line can't be covered.
   *
   * @param before the bound at the same prices when some lines needed something else
   */
  at(prices: number[], before?: LimitPrices): LimitPrices | null {
    const { choice } = this;
    const weights = before?.weights ?? this.#weights(prices);
    const constant = choice.limits.reduce(
      (sum, { limit }, d) => sum - limit * (prices[d] as number),
      choice.shipping,
    );
    const priced = prices.some((price) => price > 0);
    let value = constant;
    const packings: Packing[] = [];
    const costs: number[] = [];
    for (const line of this.model.lines) {
      const old = before?.packings[line.index];
      const [packing, cost] =
        old?.line === line
          ? [old, before?.costs[line.index] as number]
          : this.#cheapest(line, weights, priced);
      if (!packing) return null;
      value += cost;
      packings.push(packing);
      costs.push(cost);
    }
    this.ascent.tried(packings);
    const excess = choice.limits.map((limit) => this.#use(packings, limit) - limit.limit);
    return { prices, weights, constant, value, packings, costs, excess, finished: false };
  }

  #cheapest(line: LineModel, weights: Weights, priced: boolean): [Packing | null, number] {
    const { covers, choice } = this;
    if (priced && this.#touched.has(line)) {
      const found = covers.reduced(line, choice.allowed, weights);
      return [found && found.packing, found ? found.value : 0];
    }
    const packing = covers.best(line, choice.allowed);
    return [packing, packing ? packing.cost : 0];
  }

  #use(packings: Packing[], { supplier, of, sign }: SharedLimit): number {
    let sum = 0;
    for (const { values, masses } of packings) {
      sum += (of === 'value' ? values : masses)[supplier] as number;
    }
    return sign * sum;
  }

  /**
   * Raises the bound limit by limit, then along the subgradient; stops when it is enough to drop
   * this choice of terms.
   *
   * @param before what this gave when some lines needed something else
   */
  raise(before?: LimitPrices): LimitPrices | null {
    const { limits } = this.choice;
    let best = this.at(limits.map(() => 0));
    if (!best || best.value > this.ascent.enough()) return best;
    if (best.excess.every((excess) => excess <= 0)) return best;
    const again = before && this.at(before.prices, before);
    if (again && again.value >= best.value) {
      best = again;
      if (before.finished || best.value > this.ascent.enough()) {
        return { ...best, finished: before.finished };
      }
    }
    for (let sweep = 0; sweep < 3; sweep++) {
      const start: number = best.value;
      for (let d = 0; d < limits.length; d++) {
        best = this.#along(d, best);
        if (best.value > this.ascent.enough()) return best;
      }
      if (limits.length === 1 || best.value - start < 0.5) break;
    }
    if (limits.length > 1) best = this.#polish(best);
    return { ...best, finished: best.value <= this.ascent.enough() };
  }

  /** The best price of one limit, the others' held: the dual is concave, so cut from both sides. */
  #along(d: number, start: LimitPrices): LimitPrices {
    const limit = this.choice.limits[d] as SharedLimit;
    // More of a mass for its own sake has no sensible price, and a value is never worth more than 1.
    if (limit.of === 'mass' && limit.sign === -1) return start;
    const price = (prices: number) =>
      this.at(start.prices.map((other, index) => (index === d ? prices : other)));
    let best = start;
    let low = (start.prices[d] as number) === 0 ? start : price(0);
    if (!low || (low.excess[d] as number) <= 0) return low && low.value > best.value ? low : best;
    const top = limit.sign === -1 ? this.#mostForValue(d, start.prices) : Infinity;
    let high = price(top === Infinity ? this.#firstGuess(limit, low) : top);
    for (let tries = 0; high && tries < 40 && top === Infinity; tries++) {
      if ((high.excess[d] as number) <= 0 || high.value > this.ascent.enough()) break;
      low = high;
      high = price((high.prices[d] as number) * 4);
    }
    for (let tries = 0; high && tries < 25; tries++) {
      for (const found of [low, high]) if (found.value > best.value) best = found;
      const [a, b] = [low.prices[d] as number, high.prices[d] as number];
      const [rise, fall] = [low.excess[d] as number, high.excess[d] as number];
      if (fall > 0 || rise <= 0 || best.value > this.ascent.enough()) break;
      const cross = (high.value - low.value + rise * a - fall * b) / (rise - fall);
      const ceiling = low.value + rise * (cross - a);
      if (!(cross > a && cross < b) || ceiling - best.value < 0.01) break;
      const middle = price(cross);
      if (!middle) break;
      if ((middle.excess[d] as number) > 0) low = middle;
      else high = middle;
      if (middle.value > best.value) best = middle;
    }
    return best;
  }

  #mostForValue(d: number, prices: number[]): number {
    const own = this.choice.limits[d] as SharedLimit;
    return this.choice.limits.reduce(
      (most, { supplier, of, sign }, other) =>
        other !== d && supplier === own.supplier && of === 'value'
          ? most + sign * (prices[other] as number)
          : most,
      1,
    );
  }

  #firstGuess({ of }: SharedLimit, { packings }: LimitPrices): number {
    if (of === 'value') return 0.1;
    const cost = packings.reduce((sum, packing) => sum + packing.cost, 0);
    const mass = packings.reduce((sum, packing) => sum + packing.mass, 0);
    return ((cost + 1) / (mass + 1)) * 0.1;
  }

  #polish(start: LimitPrices): LimitPrices {
    const { limits } = this.choice;
    const scale = limits.map((limit) =>
      limit.of === 'value' ? 1 : this.#firstGuess(limit, start),
    );
    let best = start;
    let at = start;
    let reach = 1;
    for (let round = 0; round < 24 && best.value <= this.ascent.enough(); round++) {
      const length = at.excess.reduce((sum, x, d) => sum + (x * (scale[d] as number)) ** 2, 0);
      const gap = Math.min(this.ascent.enough(), Math.abs(best.value) * 1.05 + 1) - at.value;
      if (length === 0 || gap <= 0) break;
      const step = (reach * gap) / length;
      const prices = at.prices.map((price, d) => {
        const { of, sign } = limits[d] as SharedLimit;
        if (of === 'mass' && sign === -1) return 0;
        return Math.max(0, price + step * (at.excess[d] as number) * (scale[d] as number) ** 2);
      });
      limits.forEach(({ of, sign }, d) => {
        if (of === 'value' && sign === -1) {
          prices[d] = Math.min(prices[d] as number, this.#mostForValue(d, prices));
        }
      });
      const next = this.at(prices);
      if (!next) break;
      if (next.value > best.value) best = next;
      else reach *= 0.8;
      at = next;
    }
    return best;
  }
}
