import fc from 'fast-check';
import { describe, expect, it, test } from 'vitest';
import { apportion } from '#shared/index.ts';
import workedExamples from '../data/worked-examples.json' with { type: 'json' };

describe('apportion', () => {
  test.each<[string, number, number[], number[]]>([
    ['equal weights, the odd units to the earlier', 1000, [3, 3, 3], [334, 333, 333]],
    ['a rebate is divided as its size', -1000, [3, 3, 3], [-334, -333, -333]],
    ['nothing among nobody', 0, [], []],
    ['nothing among zeros', 0, [0, 0], [0, 0]],
    ['a zero weight gets nothing, and no minus zero', -10, [0, 1], [0, -10]],
    ['fewer units than weights', 2, [1, 1, 1], [1, 1, 0]],
    // Exact thirds, which binary fractions of 2.9, 2.6 and 2.0 wouldn't see as a tie.
    ['tied remainders', 50, [29, 26, 20], [20, 17, 13]],
    ['weights past 2^53 in sum', 3, [9e15, 9e15, 9e15], [1, 1, 1]],
    ['products past 2^53', 9e15, [9e15, 8.9e15, 1], [4525139664804469, 4474860335195530, 1]],
  ])('%s', (_, total, weights, parts) => {
    expect(apportion(total, weights)).toEqual(parts);
  });

  test.each<[number, number[]]>([
    [1, [0, 0]],
    [1, []],
    [1, [-1, 2]],
    [1, [1.5]],
    [1.5, [1]],
    [NaN, [1]],
    [Infinity, [1]],
    [1, [NaN]],
    [2 ** 53, [1]],
  ])('refuses %d over %j', (total, weights) => {
    expect(() => apportion(total, weights)).toThrow(RangeError);
  });

  // Largest remainder example of the usual encyclopedia article on the method, from memory: ten
  // seats, quota 10 000.
  it('seats six parties as the textbook does', () => {
    const votes = [47_000, 16_000, 15_800, 12_000, 6_100, 3_100];
    expect(apportion(10, votes)).toEqual([5, 2, 1, 1, 1, 0]);
  });
});

describe('apportion, worked examples with their sources', () => {
  const examples = workedExamples.filter((example) => example.category === 'apportionment');

  test.each(examples.map((example) => [example.id, example.title, example] as const))(
    '%s %s',
    (_, __, { input, expected }) => {
      const weights = Object.entries(input.weights ?? {});
      const divide = (total: number) => {
        const parts = apportion(
          total,
          weights.map(([, weight]) => weight),
        );
        return Object.fromEntries(weights.map(([name], i) => [name, parts[i]]));
      };
      const totals = input.totals ?? [input.total ?? input.total_minor_units ?? NaN];
      const shares = totals.map(divide);
      if (input.totals) expect(shares).toEqual([expected.shares_10, expected.shares_11]);
      else expect(shares).toEqual([expected.shares]);
    },
  );

  it('has all six', () => {
    expect(examples).toHaveLength(6);
  });
});

describe('apportion, always', () => {
  const totals = fc.oneof(fc.integer(), fc.maxSafeInteger());
  const weight = fc.oneof(fc.nat(5), fc.nat(), fc.nat({ max: Number.MAX_SAFE_INTEGER }));
  const weights = fc
    .array(weight, { minLength: 1, maxLength: 30 })
    .filter((all) => all.some((w) => w > 0));

  it('sums to the whole, each part within a unit of its quota on the right side', () => {
    fc.assert(
      fc.property(totals, weights, (total, all) => {
        const parts = apportion(total, all);
        const sum = all.reduce((a, w) => a + BigInt(w), 0n);
        expect(parts.reduce((a, part) => a + BigInt(part), 0n)).toBe(BigInt(total));
        parts.forEach((part, i) => {
          const size = BigInt(Math.abs(total)) * BigInt(all[i] ?? 0);
          const scaled = BigInt(Math.abs(part)) * sum;
          expect(scaled > size - sum && scaled < size + sum).toBe(true);
          expect(Object.is(part, -0)).toBe(false);
        });
      }),
    );
  });

  it('gives the units left to the largest remainders, ties to the earlier', () => {
    fc.assert(
      fc.property(fc.nat(), weights, (total, all) => {
        const sum = all.reduce((a, w) => a + BigInt(w), 0n);
        const parts = apportion(total, all);
        const rank = all.map((w, i) => {
          const product = BigInt(total) * BigInt(w);
          return { i, rest: product % sum, raised: BigInt(parts[i] ?? 0) > product / sum };
        });
        for (const a of rank) {
          for (const b of rank) {
            if (a.raised || !b.raised) continue;
            expect(b.rest > a.rest || (b.rest === a.rest && b.i < a.i)).toBe(true);
          }
        }
      }),
    );
  });

  it('does not change when all weights are scaled', () => {
    const small = fc
      .array(fc.nat(1000), { minLength: 1, maxLength: 20 })
      .filter((all) => all.some((w) => w > 0));
    fc.assert(
      fc.property(fc.nat(), small, fc.integer({ min: 2, max: 1e9 }), (total, all, factor) => {
        const scaled = all.map((w) => w * factor);
        expect(apportion(total, scaled)).toEqual(apportion(total, all));
      }),
    );
  });
});
