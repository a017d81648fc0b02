import { currencyExponent } from './currencies.ts';
import { wholeSigned, type Minor } from './minor.ts';

/**
 * Plain decimal digits of a sum, exact, without symbol or grouping.
 *
 * @example minorToDecimal(-5, 'EUR') // '-0.05'
 */
export function minorToDecimal(minor: Minor, currency: string): string {
  wholeSigned(minor, 'minor');
  const exponent = currencyExponent(currency);
  const digits = String(Math.abs(minor)).padStart(exponent + 1, '0');
  const sign = minor < 0 ? '-' : '';
  if (exponent === 0) return sign + digits;
  return `${sign}${digits.slice(0, -exponent)}.${digits.slice(-exponent)}`;
}

const formatters = new Map<string, Intl.NumberFormat>();

function formatterFor(currency: string, locale: string): Intl.NumberFormat {
  const key = `${locale} ${currency}`;
  let formatter = formatters.get(key);
  if (!formatter) {
    const digits = currencyExponent(currency);
    formatter = new Intl.NumberFormat(locale, {
      style: 'currency',
      currency,
      minimumFractionDigits: digits,
      maximumFractionDigits: digits,
    });
    formatters.set(key, formatter);
  }
  return formatter;
}

/**
 * A sum as a reader of `locale` writes it, with the currency's symbol and all its ISO 4217 decimals.
 *
 * @param locale BCP 47 tag, for example the club's
 * @example formatMoney(241, 'EUR', 'en') // '€2.41'
 */
export function formatMoney(minor: Minor, currency: string, locale: string): string {
  const exact: Intl.StringNumericLiteral = minorToDecimal(minor, currency) as `${number}`;
  return formatterFor(currency, locale).format(exact);
}
