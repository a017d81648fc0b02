import type { Budget } from './clock.ts';
import { coverItems, reducedPrice, type CoverItems, type Weights } from './coverItems.ts';
import type { Item, LineModel, SupplierModel } from './packModel.ts';
import { makePacking, type Packing } from './packing.ts';

/** What a packing may cost at most under some weights. */
export type CoverLimit = { weights: Weights; most: number };

/** Reduced prices under one limit's weights, and the least per mass from each item on. */
type Gauge = { prices: Float64Array; efficiency: Float64Array; most: number };

function gaugeOf(cover: CoverItems, { weights, most }: CoverLimit): Gauge {
  const prices = Float64Array.from(cover.items, (item) => reducedPrice(item, weights));
  const efficiency = new Float64Array(prices.length);
  let least = Infinity;
  for (let i = prices.length - 1; i >= 0; i--) {
    least = Math.min(least, (prices[i] as number) / (cover.items[i] as Item).mass);
    efficiency[i] = least;
  }
  return { prices, efficiency, most: most + 1e-6 + 1e-9 * Math.abs(most) };
}

/** Depth-first listing of all covers of a line within limits. */
class Listing {
  readonly found: Packing[] = [];
  readonly #counts: number[];
  readonly #sums: Float64Array;

  constructor(
    readonly line: LineModel,
    readonly suppliers: readonly SupplierModel[],
    readonly cover: CoverItems,
    readonly padded: readonly boolean[],
    readonly gauges: Gauge[],
    readonly budget: Budget,
  ) {
    this.#counts = line.items.map(() => 0);
    this.#sums = new Float64Array(gauges.length);
  }

  /** Whether a pack could be left out where nothing is gained by having it. */
  #wasteful(rest: number): boolean {
    return this.line.items.some(
      (item, i) =>
        (this.#counts[i] as number) > 0 && !this.padded[item.supplier] && rest + item.mass <= 0,
    );
  }

  #leaf(rest: number): void {
    if (this.#wasteful(rest)) return;
    const packing = makePacking(this.line, this.#counts, this.suppliers);
    // The first gauge is the plain price, so private shipping counts towards its limit.
    if (packing.cost > (this.gauges[0] as Gauge).most) return;
    if (packing.cost < Infinity) this.found.push(packing);
  }

  #most(i: number, rest: number): number {
    const { mass, max } = this.cover.items[i] as Item;
    const extra = this.cover.extra[i] as number;
    let most = Math.min(max, (rest > 0 ? Math.ceil(rest / mass) : 0) + extra);
    if (extra === 0) return most;
    this.gauges.forEach((gauge, k) => {
      const price = gauge.prices[i] as number;
      if (price > 0) {
        most = Math.min(most, Math.floor((gauge.most - (this.#sums[k] as number)) / price));
      }
    });
    return most;
  }

  #over(k: number, i: number, rest: number): boolean {
    const { efficiency, most } = this.gauges[k] as Gauge;
    const sum = this.#sums[k] as number;
    if (rest <= 0) return sum > most;
    return i === efficiency.length || sum + rest * (efficiency[i] as number) > most;
  }

  visit(i: number, rest: number): void {
    const { cover, gauges } = this;
    this.budget.tick();
    if (rest <= 0 && i > cover.lastPad) return this.#leaf(rest);
    if (i === cover.items.length) return rest <= 0 ? this.#leaf(rest) : undefined;
    const { mass } = cover.items[i] as Item;
    const place = cover.order[i] as number;
    const before = Float64Array.from(this.#sums);
    for (let count = this.#most(i, rest); count >= 0; count--) {
      const left = rest - count * mass;
      let over = false;
      for (let k = 0; k < gauges.length; k++) {
        const price = (gauges[k] as Gauge).prices[i] as number;
        this.#sums[k] = (before[k] as number) + count * price;
        over ||= this.#over(k, i + 1, left);
      }
      if (over) {
        if (left > 0 && this.#over(gauges.length - 1, i + 1, left)) break;
        continue;
      }
      this.#counts[place] = count;
      this.visit(i + 1, left);
    }
    this.#counts[place] = 0;
    this.#sums.set(before);
  }
}

/**
 * All covers of a line that stay within every limit and hold no pack that could simply be left out.
 *
 * @param limits the first with plain prices; the last orders the search
 * @throws OutOfTime
 */
export function listCovers(
  line: LineModel,
  suppliers: readonly SupplierModel[],
  allowed: readonly boolean[],
  padded: readonly boolean[],
  limits: CoverLimit[],
  budget: Budget,
): Packing[] {
  const last = limits.at(-1) as CoverLimit;
  const cover = coverItems(line, suppliers, allowed, padded, last.weights);
  const gauges = limits.map((limit) => gaugeOf(cover, limit));
  const listing = new Listing(line, suppliers, cover, padded, gauges, budget);
  listing.visit(0, line.need);
  return listing.found;
}
