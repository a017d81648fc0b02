import { wholeSigned } from '../money/minor.ts';
import type { Milligrams } from './milligrams.ts';

/** How a mass is shown; `auto` takes kilograms from 1 kg when whole grams are enough. */
export type MassDisplay = { unit?: 'g' | 'kg' | 'oz' | 'lb' | 'auto'; locale?: string };

const narrowSpace = '\u202f';
const mgPer = { g: 1e3, kg: 1e6, oz: 28_349.523125, lb: 453_592.37 };
const mostDecimals = { g: 3, kg: 6, oz: 2, lb: 3 };

/** Significant fraction of mg over a power of ten, exact: `[whole, fraction]` as digits. */
function exactDigits(size: number, places: number): [string, string] {
  const digits = String(size).padStart(places + 1, '0');
  return [digits.slice(0, -places), digits.slice(-places).replace(/0+$/, '')];
}

function roundedDigits(size: number, unit: 'oz' | 'lb'): [string, string] {
  const [whole = '0', fraction = ''] = (size / mgPer[unit]).toFixed(mostDecimals[unit]).split('.');
  return [whole, fraction.replace(/0+$/, '')];
}

const decimalMarks = new Map<string, string>();

/** The mark between whole and fraction for readers of `locale`. */
export function decimalMark(locale: string): string {
  let mark = decimalMarks.get(locale);
  if (mark === undefined) {
    const parts = new Intl.NumberFormat(locale, { numberingSystem: 'latn' }).formatToParts(1.5);
    mark = parts.find((part) => part.type === 'decimal')?.value ?? '.';
    decimalMarks.set(locale, mark);
  }
  return mark;
}

/** Digits with a narrow no-break space between thousands, from four digits on. */
export function groupThousands(digits: string): string {
  return digits.replace(/\B(?=(\d{3})+$)/g, narrowSpace);
}

/**
 * A mass with its unit: narrow no-break space between thousands, no-break space before the unit,
 * the locale's decimal mark, no trailing zeros. Grams and kilograms are exact; ounces show two and
 * pounds three decimals.
 *
 * @param options.unit grams unless told
 * @example formatMass(23_650_000) // '23 650 g'
 * @example formatMass(1_350_000, { unit: 'auto', locale: 'de' }) // '1,35 kg'
 */
export function formatMass(mg: Milligrams, options: MassDisplay = {}): string {
  wholeSigned(mg, 'mg');
  const { unit: wish = 'g', locale = 'en' } = options;
  const size = Math.abs(mg);
  const unit = wish === 'auto' ? (size >= 1e6 && size % 1000 === 0 ? 'kg' : 'g') : wish;
  const [whole, fraction] =
    unit === 'g' || unit === 'kg'
      ? exactDigits(size, mostDecimals[unit])
      : roundedDigits(size, unit);
  const sign = mg < 0 ? '\u2212' : '';
  const tail = fraction === '' ? '' : decimalMark(locale) + fraction;
  return `${sign}${groupThousands(whole)}${tail}\u00a0${unit}`;
}
