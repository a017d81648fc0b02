import { readTypedNumber, timesWhole } from '../mass/typedNumber.ts';
import { currencyExponent } from './currencies.ts';
import type { Minor } from './minor.ts';

/** Why a typed sum was refused. */
export type MoneyProblem =
  'empty' | 'unreadable' | 'negative' | 'ambiguous' | 'too_precise' | 'too_large';

/** A sum as read, or why not; `readings` are offered when a mark could mean two things. */
export type ParsedMoney =
  { ok: true; minor: Minor } | { ok: false; code: MoneyProblem; readings?: Minor[] };

function groupMark(locale: string): string | undefined {
  return new Intl.NumberFormat(locale, { useGrouping: true })
    .formatToParts(1234567)
    .find((part) => part.type === 'group')?.value;
}

/**
 * Reads a sum as people type it, with or without the currency's code or a symbol. A mark followed by
 * exactly three digits is refused with both readings, unless the currency has no decimals.
 *
 * @param locale puts the reading that its readers would mean first
 * @example parseMoney('12,50', 'EUR') // { ok: true, minor: 1250 }
 * @example parseMoney('1.200', 'EUR', 'de') // { ok: false, code: 'ambiguous', readings: [120000, 120] }
 */
export function parseMoney(text: string, currency: string, locale?: string): ParsedMoney {
  const factor = 10n ** BigInt(currencyExponent(currency));
  const bare = text
    .normalize('NFKC')
    .trim()
    .replace(/^([+\u2212-]?\s*)\p{Sc}/u, '$1')
    .replace(/\p{Sc}$/u, '')
    .replace(new RegExp(`^${currency}|${currency}$`, 'i'), '');
  if (text.trim() === '') return { ok: false, code: 'empty' };

  const whole = (value: { digits: bigint; places: number }): ParsedMoney => {
    const minor = timesWhole(value, factor);
    if (minor === null) return { ok: false, code: 'too_precise' };
    const number = Number(minor);
    return Number.isSafeInteger(number)
      ? { ok: true, minor: number }
      : { ok: false, code: 'too_large' };
  };
  const typed = readTypedNumber(bare);
  if (typed.kind === 'empty' || typed.kind === 'unreadable') {
    return { ok: false, code: 'unreadable' };
  }
  if (typed.kind === 'number') {
    if (typed.negative && typed.value.digits > 0n) return { ok: false, code: 'negative' };
    return whole(typed.value);
  }
  if (typed.negative) return { ok: false, code: 'negative' };
  if (factor === 1n) return whole(typed.thousands);
  const readings = [whole(typed.decimal), whole(typed.thousands)].flatMap((reading) =>
    reading.ok ? [reading.minor] : [],
  );
  const group = locale === undefined ? undefined : groupMark(locale);
  if (group !== undefined && bare.includes(group)) readings.reverse();
  return { ok: false, code: 'ambiguous', readings };
}
