import { readTypedNumber, type Decimal } from './typedNumber.ts';
import type { Milligrams } from './milligrams.ts';

/** Units a mass may be typed in. */
export type MassUnit = 'mg' | 'g' | 'kg' | 'oz' | 'lb';

/** Why a typed mass was refused. */
export type MassProblem =
  'empty' | 'unreadable' | 'negative' | 'ambiguous' | 'too_precise' | 'too_large';

/** A mass as read, or why not; `readings` holds the decimal reading first, then the thousands. */
export type ParsedMass =
  { ok: true; mg: Milligrams } | { ok: false; code: MassProblem; readings?: Milligrams[] };

/**
 * Units in nanograms, so that all are whole: the international pound is exactly 0.453 592 37 kg
 * (1959 agreement), the ounce a sixteenth of it.
 */
const nanograms: Record<MassUnit, bigint> = {
  mg: 1_000_000n,
  g: 1_000_000_000n,
  kg: 1_000_000_000_000n,
  oz: 28_349_523_125n,
  lb: 453_592_370_000n,
};

const unitWords: Record<string, MassUnit> = {
  mg: 'mg',
  milligram: 'mg',
  milligrams: 'mg',
  g: 'g',
  gram: 'g',
  grams: 'g',
  kg: 'kg',
  kilo: 'kg',
  kilos: 'kg',
  kilogram: 'kg',
  kilograms: 'kg',
  oz: 'oz',
  ounce: 'oz',
  ounces: 'oz',
  lb: 'lb',
  lbs: 'lb',
  pound: 'lb',
  pounds: 'lb',
};

function toMg(value: Decimal, unit: MassUnit): ParsedMass {
  const perMg = 10n ** BigInt(value.places) * nanograms.mg;
  const product = value.digits * nanograms[unit];
  const rest = product % perMg;
  const imperial = unit === 'oz' || unit === 'lb';
  if (rest !== 0n && !imperial) return { ok: false, code: 'too_precise' };
  const mg = Number((product * 2n + perMg) / (perMg * 2n));
  return Number.isSafeInteger(mg) ? { ok: true, mg } : { ok: false, code: 'too_large' };
}

/**
 * Reads a mass as people type it. Ounces and pounds round to the nearest milligram, halves up;
 * metric masses finer than a milligram are refused. A mark followed by exactly three digits and no
 * unit is refused with both readings.
 *
 * @param options.defaultUnit the unit of a bare number; grams unless told
 * @example parseMass('1.2kg') // { ok: true, mg: 1_200_000 }
 * @example parseMass('1.200') // { ok: false, code: 'ambiguous', readings: [1200, 1_200_000] }
 */
export function parseMass(text: string, options: { defaultUnit?: MassUnit } = {}): ParsedMass {
  const plain = text.normalize('NFKC').trim();
  if (plain === '') return { ok: false, code: 'empty' };
  const parts = /^(.*?)\s*(\p{L}*)\.?$/su.exec(plain);
  const word = (parts?.[2] ?? '').toLowerCase();
  const unit = word === '' ? (options.defaultUnit ?? 'g') : unitWords[word];
  if (unit === undefined) return { ok: false, code: 'unreadable' };

  const typed = readTypedNumber(word === '' ? plain : (parts?.[1] ?? ''));
  if (typed.kind === 'empty' || typed.kind === 'unreadable') {
    return { ok: false, code: 'unreadable' };
  }
  if (typed.kind === 'number') {
    if (typed.negative && typed.value.digits > 0n) return { ok: false, code: 'negative' };
    return toMg(typed.value, unit);
  }
  if (typed.negative) return { ok: false, code: 'negative' };
  if (word !== '') return toMg(typed.decimal, unit);
  const readings = [toMg(typed.decimal, unit), toMg(typed.thousands, unit)].flatMap((reading) =>
    reading.ok ? [reading.mg] : [],
  );
  return { ok: false, code: 'ambiguous', readings };
}
