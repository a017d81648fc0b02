import { describe, expect, it } from 'vitest';
import { scaleRefusal } from '#shared/domain/splits/scaleFits.ts';

const g = 1000;

describe('scaleRefusal', () => {
  it.each([
    // target, step, division, capacity, refusal
    [20 * g, g, g, null, null],
    [20 * g - 1, g, g, null, { code: 'too_small', needsDivisionMg: 999 }],
    [1200 * g, g, 100, 2000 * g, null],
    [1200 * g, g, 100, 1200 * g, null],
    [1201 * g, g, 100, 1200 * g, { code: 'too_heavy', capacityMg: 1200 * g }],
    [500 * g, 100, g, null, { code: 'too_coarse', needsDivisionMg: 100 }],
    [g, 100, 100, null, { code: 'too_small', needsDivisionMg: 50 }],
    [3, 1, 1, null, { code: 'too_small', needsDivisionMg: 1 }],
  ])(
    '%i mg in steps of %i on a division of %i, capacity %s',
    (targetMg, stepMg, divisionMg, capacityMg, refusal) => {
      expect(scaleRefusal({ targetMg, stepMg }, { divisionMg, capacityMg })).toEqual(refusal);
    },
  );
});
