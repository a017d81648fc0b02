/** An integer number of a currency's minor units (cents, or whole yen). */
export type Minor = number & { readonly __unit?: 'minor' };

/**
 * The value, when it is a whole number of at least `least` that fits exactly.
 *
 * @throws RangeError naming `field` otherwise
 */
export function wholeAtLeast(value: number, field: string, least = 0): number {
  if (typeof value !== 'number' || !Number.isSafeInteger(value)) {
    throw new RangeError(`${field} must be a whole number, not ${String(value)}`);
  }
  if (value < least) throw new RangeError(`${field} must be at least ${least}, not ${value}`);
  return value;
}

/**
 * The value, when it is a whole number of either sign that fits exactly.
 *
 * @throws RangeError naming `field` otherwise
 */
export function wholeSigned(value: number, field: string): number {
  return wholeAtLeast(value, field, Number.MIN_SAFE_INTEGER);
}

/**
 * A BigInt result as a number.
 *
 * @throws RangeError naming `field` when it is past the safe integers
 */
export function safeNumber(value: bigint, field: string): number {
  const number = Number(value);
  if (!Number.isSafeInteger(number)) {
    throw new RangeError(`${field} is past the safe integers: ${value}`);
  }
  return number;
}

/**
 * Sum of whole numbers, exact.
 *
 * @throws RangeError naming `field` when it is past the safe integers
 */
export function exactSum(values: Iterable<number>, field: string): number {
  let sum = 0;
  for (const value of values) {
    sum += value;
    if (!Number.isSafeInteger(sum)) throw new RangeError(`${field} is past the safe integers`);
  }
  return sum;
}

/**
 * Sum of whole numbers that aren't negative, for comparing: exact up to the safe integers, and beyond
 * them still greater than every safe integer.
 */
export function roughSum(values: Iterable<number>): number {
  let sum = 0;
  for (const value of values) sum += value;
  return sum;
}
