import { describe, expect, it, test } from 'vitest';
import {
  cashStepMinor,
  currencyCodes,
  currencyExponent,
  isCurrency,
  roundToCash,
} from '#shared/index.ts';

/**
 * Where the reader's locale data (CLDR, behind Intl) shows fewer decimals than ISO 4217 defines,
 * because the small coins are out of use. Known from CLDR's supplemental currency data.
 */
const fewerInLocaleData: Record<string, number> = {
  AFN: 0,
  ALL: 0,
  COP: 0,
  HUF: 0,
  IDR: 0,
  IQD: 0,
  IRR: 0,
  KPW: 0,
  LAK: 0,
  LBP: 0,
  MGA: 0,
  MMK: 0,
  PKR: 0,
  SOS: 0,
  SYP: 0,
  YER: 0,
};

function decimalsInIntl(code: string): number | undefined {
  const format = new Intl.NumberFormat('en', { style: 'currency', currency: code });
  return format.resolvedOptions().maximumFractionDigits;
}

describe('currencyExponent', () => {
  test.each([
    ['JPY', 0],
    ['KRW', 0],
    ['ISK', 0],
    ['EUR', 2],
    ['HUF', 2],
    ['USD', 2],
    ['KWD', 3],
    ['TND', 3],
  ])('%s has %i decimals', (code, exponent) => {
    expect(currencyExponent(code)).toBe(exponent);
  });

  test.each(currencyCodes.map((code) => [code]))('%s agrees with Intl or is named', (code) => {
    const known = fewerInLocaleData[code];
    if (known === undefined) expect(decimalsInIntl(code)).toBe(currencyExponent(code));
    else expect(known).toBeLessThan(currencyExponent(code));
  });

  test.each(Object.entries(fewerInLocaleData))('%s differs from Intl as known', (code, shown) => {
    // RSD and others moved between releases of the locale data; ISO 4217 did not.
    expect([shown, currencyExponent(code)]).toContain(decimalsInIntl(code));
  });

  it('knows every currency that Intl lists with other than two decimals, or it is out of use', () => {
    const outOfUse = ['SLL'];
    const odd = Intl.supportedValuesOf('currency').filter((code) => decimalsInIntl(code) !== 2);
    expect(odd.filter((code) => !isCurrency(code) && !outOfUse.includes(code))).toEqual([]);
  });

  test.each(['', 'eur', 'XAU', 'DEM', 'EURO'])('refuses %j', (code) => {
    expect(isCurrency(code)).toBe(false);
    expect(() => currencyExponent(code)).toThrow(RangeError);
  });
});

describe('roundToCash', () => {
  test.each([
    [1233, 'CHF', 1235],
    [1232, 'CHF', 1230],
    [-1233, 'CHF', -1235],
    [1250, 'SEK', 1300],
    [1249, 'SEK', 1200],
    [75, 'DKK', 100],
    [1233, 'EUR', 1233],
    [7, 'JPY', 7],
    [0, 'CHF', 0],
    [-1, 'CHF', 0],
  ])('%i %s becomes %i', (minor, code, rounded) => {
    expect(roundToCash(minor, code)).toBe(rounded);
    expect(rounded % cashStepMinor(code) === 0).toBe(true);
  });
});
