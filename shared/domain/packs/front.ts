import type { Budget } from './clock.ts';

/**
 * What has been kept so far of things that come best first: a later one is worth keeping only if
 * none of them uses as little of every limit.
 */
export class Front {
  #least = Infinity;
  readonly #xs: number[] = [];
  readonly #ys: number[] = [];
  readonly #kept: number[][] = [];

  constructor(
    readonly limits: number,
    readonly budget: Budget,
  ) {}

  /** Whether the next one is worth keeping; if so, it counts as kept. */
  add(uses: number[]): boolean {
    this.budget.tick();
    if (this.limits === 0) return this.#addFirst();
    if (this.limits === 1) return this.#addOne(uses[0] as number);
    if (this.limits === 2) return this.#addTwo(uses[0] as number, uses[1] as number);
    return this.#addMany(uses);
  }

  #addFirst(): boolean {
    const first = this.#least === Infinity;
    this.#least = 0;
    return first;
  }

  #addOne(use: number): boolean {
    if (use >= this.#least) return false;
    this.#least = use;
    return true;
  }

  /** With two limits the kept ones that matter form stairs: x rises as y falls. */
  #addTwo(x: number, y: number): boolean {
    const [xs, ys] = [this.#xs, this.#ys];
    let low = 0;
    let high = xs.length;
    while (low < high) {
      const middle = (low + high) >> 1;
      if ((xs[middle] as number) <= x) low = middle + 1;
      else high = middle;
    }
    if (low > 0 && (ys[low - 1] as number) <= y) return false;
    const from = low > 0 && xs[low - 1] === x ? low - 1 : low;
    let to = low;
    while (to < ys.length && (ys[to] as number) >= y) to++;
    xs.splice(from, to - from, x);
    ys.splice(from, to - from, y);
    return true;
  }

  #addMany(uses: number[]): boolean {
    for (const kept of this.#kept) {
      let d = 0;
      while (d < uses.length && (kept[d] as number) <= (uses[d] as number)) d++;
      if (d === uses.length) return false;
      this.budget.tick();
    }
    this.#kept.push(uses);
    return true;
  }
}
