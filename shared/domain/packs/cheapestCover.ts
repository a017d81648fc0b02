import type { Budget } from './clock.ts';
import type { CoverItems } from './coverItems.ts';
import type { Item, LineModel, SupplierModel } from './packModel.ts';
import { comparePackings, makePacking, privateShipping, type Packing } from './packing.ts';

/** Nodes after which a search starts to remember where it has been. */
const rememberAfter = 2000;

type Seen = { acc: number; packs: number; counts: number[] };

/**
 * Depth-first search for one line's best cover, cheapest item per mass first, cut off by what the
 * rest must cost at least. Equal costs are followed to the end, since mass, packs and ids decide.
 */
class CoverSearch {
  best: Packing | null = null;
  readonly #counts: number[];
  #nodes = 0;
  readonly #seen = new Map<number, Seen>();
  readonly #lone: boolean;

  constructor(
    readonly line: LineModel,
    readonly suppliers: readonly SupplierModel[],
    readonly cover: CoverItems,
    readonly budget: Budget,
  ) {
    this.#counts = line.items.map(() => 0);
    this.#lone = line.privates.length > 0;
  }

  #hopeless(bound: number): boolean {
    if (!this.best) return bound === Infinity;
    return bound > this.best.cost + 1e-9 * (1 + this.best.cost);
  }

  #leaf(): void {
    const { line, suppliers } = this;
    if (privateShipping(line, this.#counts, suppliers) === Infinity) return;
    const packing = makePacking(line, this.#counts, suppliers);
    if (!this.best || comparePackings(this.best, packing) > 0) this.best = packing;
  }

  /** Whether a prefix at least as good has already been at this item with this much to cover. */
  #beenHere(i: number, rest: number, acc: number): boolean {
    if (this.#lone || ++this.#nodes < rememberAfter) return false;
    const key = rest * 64 + i;
    if (!Number.isSafeInteger(key)) return false;
    const counts = this.#counts;
    const packs = this.line.items.reduce(
      (sum, item, at) => sum + item.packs * (counts[at] ?? 0),
      0,
    );
    const seen = this.#seen.get(key);
    if (seen && (seen.acc < acc || (seen.acc === acc && this.#noWorse(seen, packs)))) return true;
    this.#seen.set(key, { acc, packs, counts: [...counts] });
    return false;
  }

  #noWorse(seen: Seen, packs: number): boolean {
    if (seen.packs !== packs) return seen.packs < packs;
    const at = this.#counts.findIndex((count, index) => count !== seen.counts[index]);
    return at < 0 || (seen.counts[at] ?? 0) > (this.#counts[at] ?? 0);
  }

  visit(i: number, rest: number, acc: number): void {
    const { items, prices, efficiency, order, lastPad, extra } = this.cover;
    this.budget.tick();
    if (rest <= 0 && i > lastPad) return this.#leaf();
    if (i === items.length) return rest <= 0 ? this.#leaf() : undefined;
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
      this.#counts[place] = count;
      this.visit(i + 1, left, cost);
    }
    this.#counts[place] = 0;
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
  const search = new CoverSearch(line, suppliers, cover, budget);
  search.visit(0, line.need, 0);
  return search.best;
}
