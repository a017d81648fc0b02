import { bestCover } from './cheapestCover.ts';
import type { Budget } from './clock.ts';
import { coverItems, type Weights } from './coverItems.ts';
import type { LineModel, SupplierModel } from './packModel.ts';
import { makePacking, type Packing } from './packing.ts';
import { ReducedCover } from './reducedCover.ts';

/** Plain prices: a reduced price under them is the price. */
export function plainWeights(suppliers: number): Weights {
  return { alpha: new Float64Array(suppliers).fill(1), beta: new Float64Array(suppliers) };
}

/** Which of a line's suppliers may be used, as a key. */
export function allowedKey(line: LineModel, allowed: readonly boolean[]): string {
  return line.shared.map((supplier) => (allowed[supplier] ? '1' : '0')).join('');
}

/** Best covers of single lines, remembered. */
export class LineCovers {
  readonly #best = new Map<string, Packing | null>();
  readonly #plain: Weights;
  readonly #padded: boolean[];
  readonly #reduced: ReducedCover;
  readonly #recent = new Map<LineModel, Packing[]>();

  constructor(
    readonly suppliers: readonly SupplierModel[],
    readonly budget: Budget,
  ) {
    this.#reduced = new ReducedCover(suppliers, budget);
    this.#plain = plainWeights(suppliers.length);
    this.#padded = suppliers.map((supplier) => !supplier.shared && supplier.padded);
  }

  /** The line's best packing at plain prices from allowed suppliers, no shared terms applied. */
  best(line: LineModel, allowed: readonly boolean[]): Packing | null {
    const key = `${line.index} ${line.need} ${allowedKey(line, allowed)}`;
    let packing = this.#best.get(key);
    if (packing === undefined) {
      const { suppliers } = this;
      const cover = coverItems(line, suppliers, allowed, this.#padded, this.#plain);
      packing = bestCover(line, suppliers, cover, this.budget);
      this.#best.set(key, packing);
    }
    return packing;
  }

  /** The line's least reduced cost under weights, and a packing that has it. */
  reduced(
    line: LineModel,
    allowed: readonly boolean[],
    weights: Weights,
  ): { value: number; packing: Packing } | null {
    const value = this.#reduced.search(line, allowed, weights);
    if (value === Infinity) return null;
    return { value, packing: this.#packing(line, this.#reduced.bestCounts) };
  }

  /** A packing made before, where the counts are the same: few differ however often one asks. */
  #packing(line: LineModel, counts: Float64Array): Packing {
    let recent = this.#recent.get(line);
    if (!recent) this.#recent.set(line, (recent = []));
    for (const packing of recent) {
      if (packing.counts.every((count, i) => count === counts[i])) return packing;
    }
    const packing = makePacking(line, counts, this.suppliers);
    recent.unshift(packing);
    if (recent.length > 16) recent.pop();
    return packing;
  }
}
