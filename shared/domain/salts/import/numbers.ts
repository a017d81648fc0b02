import { readTypedNumber, type Decimal } from '../../mass/typedNumber.ts';

/** The mark between whole and fraction in a table. */
export type DecimalMark = 'point' | 'comma';

/** A number as read, or why not. */
export type ReadNumber = { value: Decimal } | { problem: 'unreadable' | 'ambiguous' | 'negative' };

/**
 * Reads a number of a table. Where a mark before exactly three digits could be either, the table's mark decides.
 *
 * @param mark null where the table doesn't tell: such numbers stay ambiguous
 * @example readNumber('1.200', 'comma') // 1200
 */
export function readNumber(text: string, mark: DecimalMark | null): ReadNumber {
  const typed = readTypedNumber(text);
  if (typed.kind === 'empty' || typed.kind === 'unreadable') return { problem: 'unreadable' };
  if (typed.negative) return { problem: 'negative' };
  if (typed.kind === 'number') return { value: typed.value };
  if (mark === null) return { problem: 'ambiguous' };
  const decimal = text.includes(mark === 'comma' ? ',' : '.');
  return { value: decimal ? typed.decimal : typed.thousands };
}

/**
 * The decimal mark that a table's numbers give away: one with one, two or four and more digits after its last mark
 * has it as decimal mark. Null when none tells, or they disagree.
 */
export function findDecimalMark(texts: readonly string[]): DecimalMark | null {
  const found = new Set<DecimalMark>();
  for (const text of texts) {
    const tail = /([.,])(\d+)\D*$/.exec(text);
    if (tail && tail[2]?.length !== 3) found.add(tail[1] === ',' ? 'comma' : 'point');
    else if (tail && /[.,].*[.,]/.test(text)) {
      const first = /[.,]/.exec(text)?.[0];
      if (first !== tail[1]) found.add(tail[1] === ',' ? 'comma' : 'point');
      else found.add(first === ',' ? 'point' : 'comma');
    }
  }
  return found.size === 1 ? ([...found][0] ?? null) : null;
}

/** Plain digits of a decimal, with a point. */
export function decimalText({ digits, places }: Decimal): string {
  const text = String(digits).padStart(places + 1, '0');
  return places === 0 ? text : `${text.slice(0, -places)}.${text.slice(-places)}`;
}
