import { cashSteps, codesByExponent } from './data/iso4217.ts';
import { wholeSigned, type Minor } from './minor.ts';

const exponents: ReadonlyMap<string, number> = new Map(
  Object.entries(codesByExponent).flatMap(([exponent, codes]) =>
    codes.split(' ').map((code) => [code, Number(exponent)] as const),
  ),
);

/** ISO 4217 codes a club may choose from, by code. */
export const currencyCodes: readonly string[] = [...exponents.keys()].sort();

/** Whether this is a currency in use by ISO 4217; upper case only. */
export function isCurrency(code: string): boolean {
  return exponents.has(code);
}

/**
 * Decimal places between the currency's unit and its minor unit, by ISO 4217 (not by the
 * reader's locale data, which shows fewer for some).
 *
 * @example currencyExponent('JPY') // 0
 * @example currencyExponent('KWD') // 3
 * @throws RangeError for a code that is not in use
 */
export function currencyExponent(code: string): number {
  const exponent = exponents.get(code);
  if (exponent === undefined) throw new RangeError(`currency ${code} is not in ISO 4217's list`);
  return exponent;
}

/** Smallest sum payable in cash, in minor units; 1 where coins go down to the minor unit. */
export function cashStepMinor(code: string): Minor {
  currencyExponent(code);
  return cashSteps[code] ?? 1;
}

/**
 * The sum rounded to what coins can pay, halves away from zero.
 *
 * @example roundToCash(1233, 'CHF') // 1235
 */
export function roundToCash(minor: Minor, code: string): Minor {
  wholeSigned(minor, 'minor');
  const step = cashStepMinor(code);
  const size = Math.abs(minor);
  const rest = size % step;
  const rounded = rest * 2 >= step && rest > 0 ? size - rest + step : size - rest;
  return minor < 0 ? 0 - rounded : rounded;
}
