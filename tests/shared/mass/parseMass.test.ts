import fc from 'fast-check';
import { describe, expect, it, test } from 'vitest';
import { parseMass, type MassUnit, type ParsedMass } from '#shared/index.ts';

const read = (mg: number): ParsedMass => ({ ok: true, mg });
const refused = (code: string, readings?: number[]) =>
  readings ? { ok: false, code, readings } : { ok: false, code };

describe('parseMass', () => {
  test.each([
    ['1.2kg', read(1_200_000)],
    ['800', read(800_000)],
    ['0,5 kg', read(500_000)],
    ['250 mg', read(250)],
    ['1.2 KG.', read(1_200_000)],
    ['1.200 kg', read(1_200_000)],
    ['1,2 kilos', read(1_200_000)],
    ['1 200', read(1_200_000)],
    ['1\u202f200 g', read(1_200_000)],
    ["1'200 g", read(1_200_000)],
    ['1,234.5', read(1_234_500)],
    ['1.234,5 g', read(1_234_500)],
    ['1,234,567', read(1_234_567_000)],
    ['12,34', read(12_340)],
    ['.5', read(500)],
    ['0', read(0)],
    ['+3', read(3000)],
    // 0.453 592 37 kg to the pound, a sixteenth to the ounce: the 1959 agreement.
    ['1 lb', read(453_592)],
    ['16oz', read(453_592)],
    ['2 lbs', read(907_185)],
    ['1 oz', read(28_350)],
    ['１２', read(12_000)],
    ['', refused('empty')],
    ['  ', refused('empty')],
    ['g', refused('unreadable')],
    ['abc', refused('unreadable')],
    ['12 stone', refused('unreadable')],
    ['1.2.3', refused('unreadable')],
    ['1,23,456', refused('unreadable')],
    ['1e3', refused('unreadable')],
    ['12 34', refused('unreadable')],
    ['-5', refused('negative')],
    ['\u22121.200', refused('negative')],
    ['0.0005 g', refused('too_precise')],
    ['1.2345', refused('too_precise')],
    ['99999999999999 kg', refused('too_large')],
    ['1.200', refused('ambiguous', [1200, 1_200_000])],
    ['1,200', refused('ambiguous', [1200, 1_200_000])],
    ['12.345', refused('ambiguous', [12_345, 12_345_000])],
    ['0,500', refused('ambiguous', [500, 500_000])],
  ])('%j', (text, expected) => {
    expect(parseMass(text)).toEqual(expected);
  });

  test.each<[MassUnit, ParsedMass | object]>([
    ['kg', read(2_500_000)],
    ['g', read(2500)],
    ['mg', refused('too_precise')],
    ['oz', read(70_874)],
    ['lb', read(1_133_981)],
  ])('takes a bare 2.5 in %s when that is the default', (defaultUnit, expected) => {
    expect(parseMass('2.5', { defaultUnit })).toEqual(expected);
  });

  it('reads any whole milligram typed in grams or kilograms', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 1e12 }), (mg) => {
        expect(parseMass(`${(mg / 1000).toFixed(3)} g`)).toEqual(read(mg));
        expect(parseMass(`${(mg / 1e6).toFixed(6).replace('.', ',')}kg`)).toEqual(read(mg));
      }),
    );
  });

  it('never throws on what people type', () => {
    fc.assert(fc.property(fc.string({ unit: 'grapheme' }), (text) => void parseMass(text)));
  });
});
