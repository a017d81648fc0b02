import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  checkDigit,
  portionCode,
  readPortionCode,
  sequenceOfCode,
} from '#shared/domain/splits/portionCode.ts';

describe('portionCode', () => {
  it('ends with the check digit of ISO 7064 MOD 11,10', () => {
    // The standard's own example.
    expect(checkDigit('0794')).toBe('5');
    expect(portionCode(1)).toBe('0016');
    expect(portionCode(1234)).toHaveLength(5);
  });

  it('is read back as typed, with gaps or dashes, and is null when mistyped', () => {
    expect(readPortionCode('00 16')).toBe('0016');
    expect(readPortionCode('0-016')).toBe('0016');
    expect(readPortionCode('0017')).toBeNull();
    expect(readPortionCode('16')).toBeNull();
    expect(readPortionCode('K016')).toBeNull();
  });

  it('notices every single wrong digit', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 99_999 }),
        fc.nat({ max: 5 }),
        fc.integer({ min: 1, max: 9 }),
        (sequence, place, by) => {
          const code = portionCode(sequence);
          expect(sequenceOfCode(code)).toBe(sequence);
          const at = place % code.length;
          const wrong = [...code]
            .map((digit, index) => (index === at ? String((Number(digit) + by) % 10) : digit))
            .join('');
          expect(readPortionCode(wrong)).toBeNull();
        },
      ),
    );
  });
});
