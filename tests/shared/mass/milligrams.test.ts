import fc from 'fast-check';
import { describe, expect, it, test } from 'vitest';
import { ceilToStep, floorToStep, reserveMg } from '#shared/index.ts';

describe('steps', () => {
  test.each([
    [1201, 500, 1500, 1000],
    [1500, 500, 1500, 1500],
    [0, 500, 0, 0],
    [1, 10_000, 10_000, 0],
  ])('%i in steps of %i', (mg, step, up, down) => {
    expect(ceilToStep(mg, step)).toBe(up);
    expect(floorToStep(mg, step)).toBe(down);
  });

  test.each([
    [-1, 1],
    [1.5, 1],
    [1, 0],
    [NaN, 1],
    [Number.MAX_SAFE_INTEGER, 1000],
  ])('refuses %d in steps of %d', (mg, step) => {
    expect(() => ceilToStep(mg, step)).toThrow(RangeError);
  });
});

describe('reserveMg', () => {
  test.each([
    [23_650_000, 50, 118_250],
    [1, 50, 1],
    [0, 50, 0],
    [10_001, 300, 301],
    [9_000_000_000_000_000, 1, 900_000_000_000],
  ])('%i mg at %i per myriad', (pledged, permyriad, reserve) => {
    expect(reserveMg(pledged, permyriad)).toBe(reserve);
  });

  it('is the least whole milligram that is enough', () => {
    const pledges = fc.integer({ min: 0, max: Number.MAX_SAFE_INTEGER });
    fc.assert(
      fc.property(pledges, fc.integer({ min: 0, max: 300 }), (mg, permyriad) => {
        const reserve = BigInt(reserveMg(mg, permyriad)) * 10_000n;
        const exact = BigInt(mg) * BigInt(permyriad);
        expect(reserve >= exact && reserve - exact < 10_000n).toBe(true);
      }),
    );
  });
});
