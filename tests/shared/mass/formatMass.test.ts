import fc from 'fast-check';
import { describe, expect, it, test } from 'vitest';
import { formatMass, parseMass, type MassDisplay } from '#shared/index.ts';

const thin = '\u202f';
const space = '\u00a0';

describe('formatMass', () => {
  test.each<[number, MassDisplay, string]>([
    [23_650_000, {}, `23${thin}650${space}g`],
    [600_000, { unit: 'g', locale: 'en' }, `600${space}g`],
    [1_234_567, {}, `1${thin}234.567${space}g`],
    [1_234_500, { locale: 'de' }, `1${thin}234,5${space}g`],
    [0, {}, `0${space}g`],
    [5, {}, `0.005${space}g`],
    [-1500, {}, `\u22121.5${space}g`],
    [1_350_000, { unit: 'kg' }, `1.35${space}kg`],
    [1, { unit: 'kg' }, `0.000001${space}kg`],
    [25_000_000_000, { unit: 'kg' }, `25${thin}000${space}kg`],
    [1_350_000, { unit: 'auto', locale: 'de' }, `1,35${space}kg`],
    [999_000, { unit: 'auto' }, `999${space}g`],
    [1_350_500, { unit: 'auto' }, `1${thin}350.5${space}g`],
    [453_592, { unit: 'lb' }, `1${space}lb`],
    [100_000, { unit: 'oz' }, `3.53${space}oz`],
  ])('%i %j', (mg, options, text) => {
    expect(formatMass(mg, options)).toBe(text);
  });

  it('is read back as the same mass, in any locale with Latin digits', () => {
    const locales = fc.constantFrom('en', 'de', 'fr', 'sv', 'pl', 'pt-BR');
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 1e13 }), locales, (mg, locale) => {
        for (const unit of ['g', 'kg', 'auto'] as const) {
          expect(parseMass(formatMass(mg, { unit, locale }))).toEqual({ ok: true, mg });
        }
      }),
    );
  });

  it('refuses half milligrams', () => {
    expect(() => formatMass(0.5)).toThrow(RangeError);
  });
});
