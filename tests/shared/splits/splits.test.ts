import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cutPortion } from '#shared/domain/splits/cutPortion.ts';
import { bandMg, judgeWeighing } from '#shared/domain/splits/judgeWeighing.ts';
import { countedMg, netOfBag } from '#shared/domain/splits/netOfBag.ts';
import { excessLossMg, reconcile } from '#shared/domain/splits/reconcile.ts';

describe('judgeWeighing', () => {
  it.each([
    { targetMg: 1_200_000, divisionMg: 100, permille: 5, band: 6_000 },
    { targetMg: 10_000, divisionMg: 100, permille: 5, band: 100 },
    { targetMg: 999, divisionMg: 1, permille: 5, band: 4 },
  ])('band of $targetMg mg is $band mg', ({ targetMg, divisionMg, permille, band }) => {
    expect(bandMg(targetMg, divisionMg, permille)).toBe(band);
  });

  it.each([
    {
      readingMg: 1_206_000,
      secondLook: false,
      verdict: 'within',
      kept: true,
      chargedMg: 1_200_000,
    },
    { readingMg: 1_206_001, secondLook: true, verdict: 'above', kept: false, chargedMg: 0 },
    {
      readingMg: 1_194_000,
      secondLook: false,
      verdict: 'within',
      kept: true,
      chargedMg: 1_200_000,
    },
    { readingMg: 1_193_999, secondLook: false, verdict: 'below', kept: false, chargedMg: 0 },
    { readingMg: 1_193_999, secondLook: true, verdict: 'below', kept: true, chargedMg: 1_193_999 },
  ])(
    '$readingMg mg, second look $secondLook: $verdict',
    ({ readingMg, secondLook, ...expected }) => {
      expect(judgeWeighing({ readingMg, targetMg: 1_200_000, bandMg: 6_000, secondLook })).toEqual(
        expected,
      );
    },
  );
});

describe('cutPortion', () => {
  it.each([
    [2_500_000, 1_000, 2_000_000, [1_250_000, 1_250_000]],
    [2_501_000, 1_000, 2_000_000, [1_251_000, 1_250_000]],
    [1_200_000, 1_000, 2_000_000, [1_200_000]],
    [1_200_000, 1_000, null, [1_200_000]],
    [2_500_500, 1_000, 2_000_000, [1_250_000, 1_250_500]],
  ])('%i mg in steps of %i on a scale to %s', (target, step, capacity, parts) => {
    expect(cutPortion(target, step, capacity)).toEqual(parts);
  });

  it('sums to the target, and no part is above the capacity', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 50_000_000 }),
        fc.integer({ min: 1, max: 10_000 }),
        fc.integer({ min: 10_000, max: 5_000_000 }),
        (target, step, capacity) => {
          const parts = cutPortion(target, step, capacity);
          expect(parts.reduce((sum, mg) => sum + mg, 0)).toBe(target);
          expect(Math.max(...parts)).toBeLessThanOrEqual(capacity);
          expect(Math.min(...parts)).toBeGreaterThan(0);
        },
      ),
    );
  });
});

describe('bags', () => {
  it('assumes half a per cent of gross for a bag not yet weighed empty', () => {
    expect(netOfBag(25_100_000, null)).toEqual({
      netMg: 24_974_500,
      tareMg: 125_500,
      tareAssumed: true,
    });
    expect(netOfBag(25_100_000, 110_000)).toEqual({
      netMg: 24_990_000,
      tareMg: 110_000,
      tareAssumed: false,
    });
    expect(countedMg(25_000_000, 25_050_000)).toBe(25_000_000);
    expect(countedMg(25_000_000, 24_990_000)).toBe(24_990_000);
  });
});

describe('reconcile', () => {
  it('accounts for every milligram', () => {
    fc.assert(
      fc.property(
        fc.nat(30_000_000),
        fc.nat(30_000_000),
        fc.nat(1_000_000),
        fc.nat(1_000_000),
        (netMg, portionsMg, shelfMg, spilledMg) => {
          const sums = reconcile({ netMg, portionsMg, shelfMg, spilledMg });
          expect(sums.portionsMg + sums.shelfMg + sums.spilledMg + sums.unaccountedMg).toBe(netMg);
          expect(excessLossMg(sums)).toBeGreaterThanOrEqual(0);
        },
      ),
    );
  });

  it('asks for a note above 1 %, either way', () => {
    const base = { netMg: 10_000, shelfMg: 0, spilledMg: 0 };
    expect(reconcile({ ...base, portionsMg: 9_900 }).needsNote).toBe(false);
    expect(reconcile({ ...base, portionsMg: 9_899 }).needsNote).toBe(true);
    expect(reconcile({ ...base, portionsMg: 10_101 })).toMatchObject({
      needsNote: true,
      unaccountedMg: -101,
    });
  });

  it('lets the club take what was lost above 2 %', () => {
    const sums = reconcile({ netMg: 10_000, portionsMg: 9_000, shelfMg: 500, spilledMg: 100 });
    expect(sums.unaccountedMg).toBe(400);
    expect(excessLossMg(sums)).toBe(300);
  });
});
