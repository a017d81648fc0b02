import fc from 'fast-check';
import { describe, expect, it, test } from 'vitest';
import {
  currencyCodes,
  formatMoney,
  minorToDecimal,
  parseMoney,
  type ParsedMoney,
} from '#shared/index.ts';

describe('minorToDecimal', () => {
  test.each([
    [241, 'EUR', '2.41'],
    [-5, 'EUR', '-0.05'],
    [0, 'EUR', '0.00'],
    [241, 'JPY', '241'],
    [5, 'KWD', '0.005'],
    [9_007_199_254_740_991, 'EUR', '90071992547409.91'],
  ])('%i %s is %s', (minor, currency, text) => {
    expect(minorToDecimal(minor, currency)).toBe(text);
  });

  it('refuses what is not whole', () => {
    expect(() => minorToDecimal(1.5, 'EUR')).toThrow(RangeError);
  });
});

describe('formatMoney', () => {
  test.each([
    [241, 'EUR', 'en', '€2.41'],
    [241, 'EUR', 'de', '2,41\u00a0€'],
    [-120050, 'EUR', 'en', '-€1,200.50'],
    [1200, 'JPY', 'en', '¥1,200'],
    [24100, 'HUF', 'en', 'HUF\u00a0241.00'],
    [5, 'KWD', 'en', 'KWD\u00a00.005'],
    [9_007_199_254_740_991, 'EUR', 'en', '€90,071,992,547,409.91'],
  ])('%i %s in %s', (minor, currency, locale, text) => {
    expect(formatMoney(minor, currency, locale)).toBe(text);
  });
});

describe('parseMoney', () => {
  const read = (minor: number): ParsedMoney => ({ ok: true, minor });
  test.each<[string, string, ParsedMoney]>([
    ['12,50', 'EUR', read(1250)],
    ['12.5', 'EUR', read(1250)],
    ['1,234.50', 'EUR', read(123450)],
    ['1.234,50', 'EUR', read(123450)],
    ['1 234,5', 'EUR', read(123450)],
    ['€ 7', 'EUR', read(700)],
    ['7 eur', 'EUR', read(700)],
    ['1,200', 'JPY', read(1200)],
    ['0', 'EUR', read(0)],
    ['', 'EUR', { ok: false, code: 'empty' }],
    ['seven', 'EUR', { ok: false, code: 'unreadable' }],
    ['7 USD', 'EUR', { ok: false, code: 'unreadable' }],
    ['-7', 'EUR', { ok: false, code: 'negative' }],
    ['0.1234', 'EUR', { ok: false, code: 'too_precise' }],
    ['7.5', 'JPY', { ok: false, code: 'too_precise' }],
    ['99999999999999999', 'EUR', { ok: false, code: 'too_large' }],
    ['1.200', 'EUR', { ok: false, code: 'ambiguous', readings: [120, 120000] }],
    ['1.200', 'KWD', { ok: false, code: 'ambiguous', readings: [1200, 1200000] }],
  ])('%j in %s', (text, currency, parsed) => {
    expect(parseMoney(text, currency)).toEqual(parsed);
  });

  it("puts the reading of the locale's readers first", () => {
    const code = 'ambiguous';
    expect(parseMoney('1.200', 'EUR', 'de')).toEqual({ ok: false, code, readings: [120000, 120] });
    expect(parseMoney('1.200', 'EUR', 'en')).toEqual({ ok: false, code, readings: [120, 120000] });
  });

  it('reads back every plain decimal', () => {
    const sums = fc.integer({ min: 0, max: Number.MAX_SAFE_INTEGER });
    fc.assert(
      fc.property(sums, fc.constantFrom(...currencyCodes), (minor, currency) => {
        const parsed = parseMoney(minorToDecimal(minor, currency), currency);
        const digits = minorToDecimal(minor, currency).split('.')[1] ?? '';
        if (digits.length === 3) expect(parsed).toMatchObject({ code: 'ambiguous' });
        else expect(parsed).toEqual({ ok: true, minor });
      }),
    );
  });
});
