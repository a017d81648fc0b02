import type { Budget } from './clock.ts';
import { coverItems, reducedPrice, type Weights } from './coverItems.ts';
import type { Item, LineModel, SupplierModel } from './packModel.ts';
import { privateShipping } from './packing.ts';

/** Nodes after which a search starts to remember where it has been. */
const rememberAfter = 2000;

/**
 * Least reduced cost of single lines. It is asked thousands of times with other prices, so it sorts
 * and searches in arrays of its own.
 */
export class ReducedCover {
  /** Counts by place in the line's items, of the last search; the next one overwrites them. */
  bestCounts = new Float64Array(0);
  #items: Item[] = [];
  #order = new Int32Array(0);
  #prices = new Float64Array(0);
  #efficiency = new Float64Array(0);
  #counts = new Float64Array(0);
  #extra: Float64Array | null = null;
  #line: LineModel | null = null;
  #length = 0;
  #lastPad = -1;
  #best = Infinity;
  #nodes = 0;
  readonly #seen = new Map<number, number>();

  constructor(
    readonly suppliers: readonly SupplierModel[],
    readonly budget: Budget,
  ) {}

  /**
   * The least reduced cost at which a line can be covered, private shipping included; it may be high
   * by a billionth. Infinity when it can't be covered.
   *
   * @throws OutOfTime
   */
  search(line: LineModel, allowed: readonly boolean[], weights: Weights): number {
    this.#prepare(line, allowed, weights);
    this.#best = Infinity;
    this.#nodes = 0;
    this.#seen.clear();
    this.#visit(0, line.need, 0);
    return this.#best;
  }

  #prepare(line: LineModel, allowed: readonly boolean[], weights: Weights): void {
    const { items } = line;
    if (this.#order.length < items.length) {
      this.#order = new Int32Array(items.length);
      this.#prices = new Float64Array(items.length);
      this.#efficiency = new Float64Array(items.length);
      this.#counts = new Float64Array(items.length);
      this.bestCounts = new Float64Array(items.length);
    }
    this.#items = items;
    this.#counts.fill(0);
    this.#lastPad = -1;
    this.#extra = null;
    this.#line = line.privates.length > 0 ? line : null;
    this.#length = 0;
    for (let place = 0; place < items.length; place++) {
      const item = items[place] as Item;
      if (allowed[item.supplier]) this.#insert(place, reducedPrice(item, weights), item.mass);
    }
    if (this.#line) this.#preparePads(line, allowed, weights);
  }

  #insert(place: number, price: number, mass: number): void {
    const efficiency = price / mass;
    let at = this.#length++;
    for (; at > 0 && (this.#efficiency[at - 1] as number) > efficiency; at--) {
      this.#efficiency[at] = this.#efficiency[at - 1] as number;
      this.#order[at] = this.#order[at - 1] as number;
      this.#prices[at] = this.#prices[at - 1] as number;
    }
    this.#efficiency[at] = efficiency;
    this.#order[at] = place;
    this.#prices[at] = price;
  }

  #preparePads(line: LineModel, allowed: readonly boolean[], weights: Weights): void {
    const padded = this.suppliers.map((supplier) => !supplier.shared && supplier.padded);
    const cover = coverItems(line, this.suppliers, allowed, padded, weights);
    cover.order.forEach((place, at) => {
      this.#order[at] = place;
      this.#prices[at] = cover.prices[at] as number;
      this.#efficiency[at] = cover.efficiency[at] as number;
    });
    this.#lastPad = cover.lastPad;
    this.#extra = cover.extra;
  }

  #leaf(acc: number): void {
    const line = this.#line;
    const total = line ? acc + privateShipping(line, this.#counts, this.suppliers) : acc;
    if (total >= this.#best) return;
    this.#best = total;
    this.bestCounts.set(this.#counts);
  }

  #beenHere(i: number, rest: number, acc: number): boolean {
    if (++this.#nodes < rememberAfter || this.#line) return false;
    const key = rest * 64 + i;
    const seen = this.#seen.get(key);
    if (seen !== undefined && seen <= acc) return true;
    if (Number.isSafeInteger(key)) this.#seen.set(key, acc);
    return false;
  }

  #visit(i: number, rest: number, acc: number): void {
    this.budget.tick();
    if (rest <= 0 && i > this.#lastPad) return this.#leaf(acc);
    if (i === this.#length) return rest <= 0 ? this.#leaf(acc) : undefined;
    if (this.#beenHere(i, rest, acc)) return;

    const place = this.#order[i] as number;
    const { mass, max } = this.#items[place] as Item;
    const price = this.#prices[i] as number;
    const next = i + 1 < this.#length ? (this.#efficiency[i + 1] as number) : Infinity;
    const extra = this.#extra ? (this.#extra[i] as number) : 0;
    const most = Math.min(max, (rest > 0 ? Math.ceil(rest / mass) : 0) + extra);
    for (let count = most; count >= 0; count--) {
      const left = rest - count * mass;
      const cost = acc + count * price;
      const bound = left > 0 ? cost + left * next : cost;
      if (bound === Infinity || bound >= this.#best - 1e-9 * (1 + this.#best)) {
        // With something left to cover, fewer of the cheapest item only makes it dearer.
        if (left > 0) break;
        continue;
      }
      this.#counts[place] = count;
      this.#visit(i + 1, left, cost);
    }
    this.#counts[place] = 0;
  }
}
