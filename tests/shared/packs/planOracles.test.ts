import { readFileSync } from 'node:fs';
import { describe, expect, it, test, vi } from 'vitest';
import { planPacks, pricePacks, type PackOffer, type PackRequest } from '#shared/index.ts';
import { bruteForcePlan } from '#tests/support/bruteForcePlan.ts';
import { glpsol, packModelLp, packsOf } from '#tests/support/glpsol.ts';
import { clubRequest, Dice, smallRequest } from '#tests/support/packRequests.ts';
import workedExamples from '../data/worked-examples.json' with { type: 'json' };

describe('planPacks against trying everything', () => {
  it('finds the same cost, left over and packs on 800 small requests, ties included', () => {
    let feasible = 0;
    for (let seed = 0; seed < 800; seed++) {
      const request = smallRequest(new Dice(seed));
      const plan = planPacks(request);
      const cap = request.offers.length > 4 ? 8 : 12;
      const brute = bruteForcePlan(request, cap);
      expect(plan.exact).toBe(true);
      if (Object.values(plan.packs).some((count) => count > cap)) {
        // More packs than were tried by force, so it must be a better plan than any of those.
        expect(pricePacks(request, plan.packs)).toMatchObject({ feasible: true });
        expect(plan.totalMinor).toBeLessThanOrEqual(brute?.cost ?? Infinity);
        continue;
      }
      expect(plan.feasible, `seed ${seed}`).toBe(brute !== null);
      if (!brute) continue;
      feasible++;
      expect([plan.totalMinor, plan.packs], `seed ${seed}`).toEqual([brute.cost, brute.packs]);
      const left = Object.values(plan.leftOverMg).reduce((a, b) => a + b, 0);
      expect(left).toBe(brute.leftOver);
    }
    expect(feasible).toBeGreaterThan(500);
  }, 120_000);
});

describe('planPacks against glpsol', () => {
  it('names the Debian package where glpsol is missing', () => {
    vi.stubEnv('PATH', '/nowhere');
    try {
      expect(() => glpsol('', 'lp')).toThrow(/apt-get install glpk-utils/);
    } finally {
      vi.unstubAllEnvs();
    }
  });

  /** Whether glpsol proved its plan the best; ours costs the same then, and never more. */
  function compare(request: PackRequest, seconds: number, name: string): boolean {
    const solved = glpsol(packModelLp(request), 'lp', { seconds });
    const plan = planPacks(request);
    const proven = solved.status === 'INTEGER OPTIMAL';
    if (solved.status === 'INTEGER EMPTY') expect(plan.feasible, name).toBe(false);
    if (!/^INTEGER (NON-)?OPTIMAL$/.test(solved.status)) return solved.status === 'INTEGER EMPTY';
    // Priced anew, since the solver's figures are good to its tolerances only.
    const theirs = pricePacks(request, packsOf(request, solved));
    expect(theirs.problems, name).toEqual([]);
    expect(plan.feasible, name).toBe(true);
    if (proven) expect(plan.totalMinor, name).toBe(theirs.totalMinor);
    else expect(plan.totalMinor, name).toBeLessThanOrEqual(theirs.totalMinor);
    return proven;
  }

  it('costs the same on 200 random club requests', () => {
    let proven = 0;
    for (let seed = 0; proven < 200; seed++) {
      const dice = new Dice(50_000 + seed);
      const request = clubRequest(dice, {
        lines: dice.whole(3, 8),
        offersPerLine: dice.whole(3, 5),
        suppliers: dice.whole(1, 3),
      });
      if (compare(request, 10, `seed ${seed}`)) proven++;
    }
  }, 180_000);

  it('costs no more on three of full size', () => {
    for (let seed = 0; seed < 3; seed++) {
      const size = { lines: 20, offersPerLine: 6, suppliers: 3 };
      compare(clubRequest(new Dice(seed), size), 10, `seed ${seed}`);
    }
  }, 120_000);
});

/** One line, one supplier that ships for nothing. */
function oneLine(need: number, packs: { id: string; mass: number; price: number; max: number }[]) {
  const offers = packs.map(({ id, mass, price, max }): PackOffer => ({
    id,
    lineId: 'line',
    supplierId: 'mill',
    packMg: Math.round(mass),
    priceMinor: Math.round(price),
    maxPacks: max,
  }));
  const suppliers = [{ id: 'mill', shipping: { kind: 'flat' as const, minor: 0 } }];
  return { lines: [{ id: 'line', neededMg: need }], offers, suppliers } satisfies PackRequest;
}

function example(id: string) {
  const found = workedExamples.find((other) => other.id === id);
  if (!found) throw new Error(`no worked example ${id}`);
  return found;
}

function objectiveOf(model: string | undefined): number {
  const text = readFileSync(new URL(`../data/${model}`, import.meta.url), 'utf8');
  return glpsol(text, 'math').objective;
}

describe('worked examples with their sources', () => {
  it('OPT-01: the cheapest whole bags that cover 41.3 kg', () => {
    const { input, expected } = example('OPT-01');
    const bags = (input.bags ?? []).map(({ kg, price, available }) => ({
      id: `${kg}kg`,
      mass: kg * 1e6,
      price: price * 100,
      max: available,
    }));
    const plan = planPacks(oneLine((input.demand_kg ?? NaN) * 1e6, bags));
    expect(plan.packs).toEqual(expected.solution);
    expect(plan.totalMinor).toBe(Math.round((expected.min_cost ?? NaN) * 100));
    expect(plan.leftOverMg['line']).toBe((expected.surplus_kg ?? NaN) * 1e6);
    expect(plan.totalMinor / 100).toBeCloseTo(objectiveOf(input.model), 6);
  });

  // To pack a knapsack with the most value is to leave out the least value that frees enough of it.
  test('OPT-02: a bounded knapsack, told as what stays behind', () => {
    const { input, expected } = example('OPT-02');
    const items = (input.items ?? []).map(({ id, w, v, max }) => ({
      id,
      mass: w * 10,
      price: v,
      max,
    }));
    const all = items.reduce((sum, { mass, max }) => sum + mass * max, 0);
    const value = items.reduce((sum, { price, max }) => sum + price * max, 0);
    const plan = planPacks(oneLine(all - (input.capacity ?? NaN) * 10, items));
    expect(value - plan.totalMinor).toBe(expected.max_value);
    expect(value - plan.totalMinor).toBe(objectiveOf(input.model));
    const kept = items.map(({ id, max }) => [id, max - (plan.packs[id] ?? 0)]);
    expect(expected.optimal_solutions).toContainEqual(Object.fromEntries(kept));
  });

  test('OPT-03: the ten-item knapsack P01, told as what stays behind', () => {
    const { input, expected } = example('OPT-03');
    const items = (input.w ?? []).map((mass, i) => ({
      id: String(i + 1),
      mass,
      price: input.v?.[i] ?? NaN,
      max: 1,
    }));
    const all = items.reduce((sum, { mass }) => sum + mass, 0);
    const value = items.reduce((sum, { price }) => sum + price, 0);
    const plan = planPacks(oneLine(all - (input.capacity ?? NaN), items));
    expect(value - plan.totalMinor).toBe(expected.max_value);
    expect(value - plan.totalMinor).toBe(objectiveOf(input.model));
    const kept = items.filter(({ id }) => !plan.packs[id]).map(({ id }) => Number(id));
    expect(kept).toEqual(expected.items);
  });
});
