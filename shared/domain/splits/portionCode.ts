/**
 * Check digit of ISO/IEC 7064, MOD 11,10, for a text of digits.
 *
 * @example checkDigit('0794') // '5'
 */
export function checkDigit(digits: string): string {
  let product = 10;
  for (const digit of digits) {
    const sum = (product + Number(digit)) % 10 || 10;
    product = (sum * 2) % 11;
  }
  return String((11 - product) % 10);
}

/**
 * The short code on a portion's label: its number in the buy, at least three digits, and a check digit. It names the
 * portion and grants nothing.
 *
 * @example portionCode(1) // '0016'
 */
export function portionCode(sequence: number): string {
  const digits = String(sequence).padStart(3, '0');
  return digits + checkDigit(digits);
}

/** A typed code without its gaps, or null when the check digit says it was mistyped. */
export function readPortionCode(text: string): string | null {
  const digits = text.replace(/[\s-]/g, '');
  if (!/^\d{4,}$/.test(digits)) return null;
  return checkDigit(digits.slice(0, -1)) === digits.at(-1) ? digits : null;
}

/** The number in the buy that a code carries. */
export const sequenceOfCode = (code: string): number => Number(code.slice(0, -1));
