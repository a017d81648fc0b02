import { parseMass } from '../../mass/parseMass.ts';
import { timesWhole } from '../../mass/typedNumber.ts';
import { currencyExponent } from '../../money/currencies.ts';
import type { ColumnMap, ImportField } from './columns.ts';
import { findSaltsByText, type NamedSalt } from './findSaltByText.ts';
import { decimalText, readNumber, type DecimalMark } from './numbers.ts';

/** How a table is to be read, as a person chose or the app guessed. */
export type ReadingRules = {
  columns: ColumnMap;
  decimalMark: DecimalMark | null;
  /** Unit of pack sizes without one. */
  packUnit: 'g' | 'kg';
  currency: string;
};

/** What a row says; a field that has no column, or an empty cell that may be empty, is absent. */
export type ReadOffer = {
  saltId?: string;
  packMg?: number;
  priceMinor?: number;
  priceIncludesTax?: boolean;
  taxRatePpm?: number;
  stockPacks?: number | null;
  multipleOf?: number;
  label?: string;
  link?: string;
};

export type ReadRow = { offer: ReadOffer; errors: Partial<Record<ImportField, string>> };

type Outcome<T> = { value: T } | { error: string };
const ok = <T>(value: T): Outcome<T> => ({ value });
const no = (error: string): { error: string } => ({ error });

const ambiguous = (text: string) =>
  no(`“${text}” can mean two numbers. Choose the decimal mark above.`);

function readSalt(text: string, salts: readonly NamedSalt[]): Outcome<string> {
  const found = findSaltsByText(text, salts);
  const [only] = found;
  if (found.length === 1 && only) return ok(only.id);
  if (found.length === 0) return no(`“${text}” is no salt of your club’s list.`);
  const names = found.slice(0, 3).map((salt) => salt.name);
  return no(`“${text}” can be ${names.join(' or ')}. Write its full name, formula or CAS number.`);
}

function readPack(text: string, rules: ReadingRules): Outcome<number> {
  const parts = /^(.*?)\s*(\p{L}+)?\.?$/su.exec(text);
  const number = readNumber(parts?.[1] ?? '', rules.decimalMark);
  if ('problem' in number) {
    return number.problem === 'ambiguous'
      ? ambiguous(text)
      : no('Write the size of one pack, such as 25 kg.');
  }
  const mass = parseMass(`${decimalText(number.value)} ${parts?.[2] ?? rules.packUnit}`);
  if (!mass.ok) return no('Write the size of one pack, such as 25 kg.');
  return mass.mg > 0 ? ok(mass.mg) : no('A pack holds more than nothing.');
}

function readPrice(text: string, rules: ReadingRules): Outcome<number> {
  const bare = text
    .replace(/\p{Sc}/gu, '')
    .replace(new RegExp(`\\b${rules.currency}\\b`, 'i'), '')
    .trim();
  if (/\p{L}/u.test(bare)) return no(`Prices are in ${rules.currency}. Write the number alone.`);
  const number = readNumber(bare, rules.decimalMark);
  if ('problem' in number) {
    if (number.problem === 'ambiguous') return ambiguous(text);
    return no(number.problem === 'negative' ? 'A price isn’t negative.' : 'This is no price.');
  }
  const minor = timesWhole(number.value, 10n ** BigInt(currencyExponent(rules.currency)));
  if (minor === null) return no(`Finer than ${rules.currency} goes.`);
  const value = Number(minor);
  return Number.isSafeInteger(value) ? ok(value) : no('This price is too large.');
}

function readTaxRate(text: string, rules: ReadingRules): Outcome<number> {
  const number = readNumber(text.replace('%', ''), rules.decimalMark);
  if ('problem' in number) return no('Write the tax in per cent, such as 19.');
  const ppm = timesWhole(number.value, 10_000n);
  if (ppm === null || ppm > 1_000_000n || (ppm > 0n && ppm < 10_000n)) {
    return no('Write the tax in per cent, such as 19.');
  }
  return ok(Number(ppm));
}

const yes = /^(yes|y|true|1|x|incl.*|gross|ja|oui)$/i;
const nay = /^(no|n|false|0|excl.*|net|netto|nein|non)$/i;

function readIncludesTax(text: string): Outcome<boolean> {
  if (yes.test(text)) return ok(true);
  return nay.test(text) ? ok(false) : no('Write yes or no.');
}

function readWhole(text: string, least: number, most: number): Outcome<number> {
  const value = /^\d{1,9}$/.test(text) ? Number(text) : NaN;
  return value >= least && value <= most ? ok(value) : no(`Write whole packs, ${least} or more.`);
}

function readLink(text: string): Outcome<string> {
  return /^https?:\/\/[^\s]+$/i.test(text) && text.length <= 500
    ? ok(text)
    : no('A web address starts with https:// or http://.');
}

/** Spreadsheets are given a mark before text that they would take for a formula; it isn't part of the text. */
const withoutGuard = (text: string) => text.replace(/^'(?=[=+\-@\t])/, '');

/**
 * Reads one row of a supplier's table by the rules that were chosen.
 *
 * @param salts the salts that a line of the club can have offers for
 * @returns every field's problem, so that a row is mended at once
 */
export function readOfferRow(
  cells: readonly string[],
  rules: ReadingRules,
  salts: readonly NamedSalt[],
): ReadRow {
  const row: ReadRow = { offer: {}, errors: {} };
  const cell = (field: ImportField): string | undefined => {
    const column = rules.columns[field];
    return column === undefined ? undefined : withoutGuard((cells[column] ?? '').trim());
  };
  function take<T>(
    field: ImportField,
    read: (text: string) => Outcome<T>,
    keep: (value: T) => void,
  ) {
    const text = cell(field);
    if (text === undefined || text === '') return;
    const outcome = read(text);
    if ('error' in outcome) row.errors[field] = outcome.error;
    else keep(outcome.value);
  }
  const { offer } = row;
  take(
    'salt',
    (text) => readSalt(text, salts),
    (value) => (offer.saltId = value),
  );
  take(
    'pack',
    (text) => readPack(text, rules),
    (value) => (offer.packMg = value),
  );
  take(
    'price',
    (text) => readPrice(text, rules),
    (value) => (offer.priceMinor = value),
  );
  take('includesTax', readIncludesTax, (value) => (offer.priceIncludesTax = value));
  take(
    'taxRate',
    (text) => readTaxRate(text, rules),
    (value) => (offer.taxRatePpm = value),
  );
  take(
    'stock',
    (text) => readWhole(text, 0, 1_000_000),
    (value) => (offer.stockPacks = value),
  );
  take(
    'multiple',
    (text) => readWhole(text, 1, 10_000),
    (value) => (offer.multipleOf = value),
  );
  take('link', readLink, (value) => (offer.link = value));
  if (cell('stock') === '') offer.stockPacks = null;
  const label = cell('label');
  if (label !== undefined) {
    if (label.length > 80) row.errors.label = 'At most 80 characters.';
    else offer.label = label;
  }
  for (const [field, word] of [
    ['salt', 'salt'],
    ['pack', 'pack size'],
    ['price', 'price'],
  ] as const) {
    if ((cell(field) ?? '') === '') row.errors[field] = `The ${word} is missing.`;
  }
  return row;
}
