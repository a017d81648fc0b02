// A budget in milliseconds needs a clock; nothing else in the domain reads one.
declare const performance: { now(): number };

/** Thrown inside a search when its time is up; never leaves `planPacks`. */
export class OutOfTime extends Error {}

/** Ticks often, looks at the clock seldom, and throws `OutOfTime` when the budget has run out. */
export class Budget {
  #ticks = 0;
  readonly #endsAt: number;

  /** @param budgetMs without it, time never runs out */
  constructor(budgetMs?: number) {
    this.#endsAt = budgetMs === undefined ? Infinity : performance.now() + budgetMs;
  }

  /** @throws OutOfTime */
  tick(): void {
    if ((++this.#ticks & 255) === 0) this.check();
  }

  /** @throws OutOfTime */
  check(): void {
    if (this.#endsAt !== Infinity && performance.now() >= this.#endsAt) throw new OutOfTime();
  }
}
