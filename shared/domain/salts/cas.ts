/** Why a CAS number was refused. */
export type CasProblem = 'shape' | 'check_digit';

/**
 * Checks a CAS Registry Number: two to seven digits, two digits, one check digit. The check digit is the sum of all
 * other digits, each times its place counted from the right, modulo 10 (CAS, "Check Digit Verification of CAS Registry
 * Numbers").
 *
 * @example casProblem('7732-18-5') // null: water, (8×1 + 1×2 + 2×3 + 3×4 + 7×5 + 7×6) mod 10 = 5
 */
export function casProblem(cas: string): CasProblem | null {
  const parts = /^([1-9]\d{1,6})-(\d{2})-(\d)$/.exec(cas);
  if (!parts) return 'shape';
  const digits = `${parts[1] ?? ''}${parts[2] ?? ''}`;
  const sum = [...digits]
    .reverse()
    .reduce((total, digit, index) => total + Number(digit) * (index + 1), 0);
  return sum % 10 === Number(parts[3]) ? null : 'check_digit';
}
