import type { Budget } from './clock.ts';
import type { CoverItems } from './coverItems.ts';
import type { Item, LineModel, SupplierModel } from './packModel.ts';
import { comparePackings, makePacking, privateShipping, type Packing } from './packing.ts';

/** Nodes after which a search starts to remember where it has been. */
const rememberAfter = 2000;

type Seen = { acc: number; packs: number; counts: number[] };

/**
 * Depth-first search for one line's cheapest cover, cheapest item per mass first, cut off by what the
 * rest must cost at least.
 */
class CoverSearch {
  best = Infinity;
  bestCounts: number[] | null = null;
  bestPacking: Packing | null = null;
  readonly counts: number[];
  #nodes = 0;
  readonly #seen = new Map<number, Seen>();
  readonly #lone: boolean;

  constructor(
    readonly line: LineModel,
    readonly suppliers: readonly SupplierModel[],
    readonly cover: CoverItems,
    readonly ties: boolean,
    readonly budget: Budget,
  ) {
    this.counts = line.items.map(() => 0);
    this.#lone = line.privates.length > 0;
  }

  /** Whether nothing from here can be better than the best; in `ties` mode, nor as cheap. */
  #hopeless(bound: number): boolean {
    if (this.best === Infinity) return bound === Infinity;
    const slack = 1e-9 * (1 + this.best);
    return this.ties ? bound > this.best + slack : bound >= this.best - slack;
  }

  #leaf(acc: number): void {
    const { line, suppliers, counts } = this;
    const total = this.#lone ? acc + privateShipping(line, counts, suppliers) : acc;
    if (total === Infinity) return;
    if (!this.ties) {
      if (total >= this.best) return;
      this.best = total;
      this.bestCounts = [...counts];
      return;
    }
    const packing = makePacking(line, counts, suppliers);
    if (this.bestPacking && comparePackings(this.bestPacking, packing) <= 0) return;
    this.bestPacking = packing;
    this.best = packing.cost;
  }

  /** Whether a prefix at least as good has already been at this item with this much to cover. */
  #beenHere(i: number, rest: number, acc: number): boolean {
    if (this.#lone || ++this.#nodes < rememberAfter) return false;
    const key = rest * 64 + i;
    if (!Number.isSafeInteger(key)) return false;
    const { line, counts } = this;
    const packs = line.items.reduce(
      (sum, item, at) => sum + item.packs * (counts[at] as number),
      0,
    );
    const seen = this.#seen.get(key);
    if (seen && (seen.acc < acc || (seen.acc === acc && this.#noWorse(seen, packs)))) return true;
    this.#seen.set(key, { acc, packs, counts: [...counts] });
    return false;
  }

  #noWorse(seen: Seen, packs: number): boolean {
    if (!this.ties || seen.packs !== packs) return !this.ties || seen.packs < packs;
    const { counts } = this;
    const at = counts.findIndex((count, index) => count !== seen.counts[index]);
    return at < 0 || (seen.counts[at] as number) > (counts[at] as number);
  }

  visit(i: number, rest: number, acc: number): void {
    const { cover, counts } = this;
    const { items, prices, efficiency, order, lastPad, extra } = cover;
    this.budget.tick();
    if (rest <= 0 && i > lastPad) return this.#leaf(acc);
    if (i === items.length) return rest <= 0 ? this.#leaf(acc) : undefined;
    if (rest > 0 && this.#beenHere(i, rest, acc)) return;

    const { mass, max } = items[i] as Item;
    const price = prices[i] as number;
    const place = order[i] as number;
    const next = i + 1 < items.length ? (efficiency[i + 1] as number) : Infinity;
    const most = Math.min(max, (rest > 0 ? Math.ceil(rest / mass) : 0) + (extra[i] as number));
    for (let count = most; count >= 0; count--) {
      const left = rest - count * mass;
      const cost = acc + count * price;
      if (this.#hopeless(left > 0 ? cost + left * next : cost)) {
        // With something left to cover, fewer of the cheapest item only makes it dearer.
        if (left > 0) break;
        continue;
      }
      counts[place] = count;
      this.visit(i + 1, left, cost);
    }
    counts[place] = 0;
  }
}

/**
 * The best packing of a line at plain prices: least cost, then mass, then packs, then offer ids.
 *
 * @returns null when the line can't be covered
 * @throws OutOfTime
 */
export function bestCover(
  line: LineModel,
  suppliers: readonly SupplierModel[],
  cover: CoverItems,
  budget: Budget,
): Packing | null {
  const search = new CoverSearch(line, suppliers, cover, true, budget);
  search.visit(0, line.need, 0);
  return search.bestPacking;
}

/**
 * The least reduced cost at which a line can be covered, with counts that reach it; the value may be
 * high by a billionth.
 *
 * @throws OutOfTime
 */
export function reducedCover(
  line: LineModel,
  suppliers: readonly SupplierModel[],
  cover: CoverItems,
  budget: Budget,
): { value: number; counts: number[] } | null {
  const search = new CoverSearch(line, suppliers, cover, false, budget);
  search.visit(0, line.need, 0);
  return search.bestCounts && { value: search.best, counts: search.bestCounts };
}
