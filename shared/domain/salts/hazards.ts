import type { SignalWord } from './catalogueTypes.ts';
import { hazardStatements } from './data/hazardStatements.ts';

/** The nine GHS pictograms by their code, in the order of the annex. */
export const pictograms = {
  GHS01: 'Exploding bomb',
  GHS02: 'Flame',
  GHS03: 'Flame over circle',
  GHS04: 'Gas cylinder',
  GHS05: 'Corrosion',
  GHS06: 'Skull and crossbones',
  GHS07: 'Exclamation mark',
  GHS08: 'Health hazard',
  GHS09: 'Environment',
} as const;
export type Pictogram = keyof typeof pictograms;

/** What each statement's class and category carries by CLP Annex I; H228, H242, H261 and H272 leave the word open. */
const carries: readonly { codes: string; pictogram: Pictogram | null; word: SignalWord | null }[] =
  [
    { codes: 'H200 H201 H202 H203', pictogram: 'GHS01', word: 'Danger' },
    { codes: 'H204', pictogram: 'GHS01', word: 'Warning' },
    { codes: 'H205', pictogram: null, word: 'Danger' },
    { codes: 'H220 H222 H224 H225 H250 H251 H260', pictogram: 'GHS02', word: 'Danger' },
    { codes: 'H223 H226 H252', pictogram: 'GHS02', word: 'Warning' },
    { codes: 'H221', pictogram: null, word: 'Warning' },
    { codes: 'H228 H242 H261', pictogram: 'GHS02', word: null },
    { codes: 'H240 H241', pictogram: 'GHS01', word: 'Danger' },
    { codes: 'H270 H271', pictogram: 'GHS03', word: 'Danger' },
    { codes: 'H272', pictogram: 'GHS03', word: null },
    { codes: 'H280 H281', pictogram: 'GHS04', word: 'Warning' },
    { codes: 'H290', pictogram: 'GHS05', word: 'Warning' },
    { codes: 'H314 H318', pictogram: 'GHS05', word: 'Danger' },
    { codes: 'H300 H310 H330 H301 H311 H331', pictogram: 'GHS06', word: 'Danger' },
    { codes: 'H302 H312 H332 H315 H317 H319 H335 H336 H420', pictogram: 'GHS07', word: 'Warning' },
    { codes: 'H304 H334 H340 H350 H360 H370 H372', pictogram: 'GHS08', word: 'Danger' },
    { codes: 'H341 H351 H361 H371 H373', pictogram: 'GHS08', word: 'Warning' },
    { codes: 'H400 H410', pictogram: 'GHS09', word: 'Warning' },
    { codes: 'H411', pictogram: 'GHS09', word: null },
  ];

const byCode = new Map(carries.flatMap((row) => row.codes.split(' ').map((code) => [code, row])));

/** Statements whose category, and with it the signal word, the code alone doesn't tell. */
const openWord = new Set(['H228', 'H242', 'H261', 'H272']);

/** A statement's code without its suffix: H360 for H360FD. */
export function bareCode(code: string): string {
  return code.slice(0, 4);
}

/** Whether this is a hazard statement's code, suffix included, as the annex lists them. */
export function isHazardCode(code: string): boolean {
  return code in hazardStatements;
}

/** The words of a hazard statement; the code itself when it isn't in the annex. */
export function hazardText(code: string): string {
  return hazardStatements[code] ?? hazardStatements[bareCode(code)] ?? code;
}

/**
 * Pictograms for a set of statements, with the precedence of CLP Article 26: a skull replaces the exclamation mark,
 * corrosion the one of skin and eye irritation, the health hazard of an inhaled allergen that of skin allergy and
 * irritation.
 */
export function pictogramsOf(statements: readonly string[]): Pictogram[] {
  const codes = new Set(statements.map(bareCode));
  const shown = new Set<Pictogram>();
  for (const code of codes) {
    const pictogram = byCode.get(code)?.pictogram;
    if (pictogram && pictogram !== 'GHS07') shown.add(pictogram);
  }
  if (codes.has('H241')) shown.add('GHS02');
  const covered = new Set<string>();
  if (shown.has('GHS05')) covered.add('H315').add('H319');
  if (codes.has('H334')) covered.add('H315').add('H317').add('H319');
  const exclaims = [...codes].some(
    (code) => byCode.get(code)?.pictogram === 'GHS07' && !covered.has(code),
  );
  if (exclaims && !shown.has('GHS06')) shown.add('GHS07');
  return [...shown].sort();
}

/**
 * The signal word of a set of statements; `stated` counts only where a code leaves it open.
 *
 * @example signalWordOf(['H272'], 'Warning') // 'Warning'
 */
export function signalWordOf(
  statements: readonly string[],
  stated: SignalWord | null = null,
): SignalWord | null {
  const words = statements.map((code) =>
    openWord.has(bareCode(code)) ? stated : (byCode.get(bareCode(code))?.word ?? null),
  );
  if (words.includes('Danger')) return 'Danger';
  return words.includes('Warning') ? 'Warning' : null;
}

/** Whether the signal word has to be taken from the supplier's sheet. */
export function leavesWordOpen(statements: readonly string[]): boolean {
  return (
    signalWordOf(statements) !== 'Danger' && statements.some((code) => openWord.has(bareCode(code)))
  );
}
