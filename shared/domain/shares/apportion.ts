import { safeNumber, wholeAtLeast, wholeSigned } from '../money/minor.ts';

/** Whether every quota's product and their sum stay exact in a double. */
function fitsDouble(total: number, weights: readonly number[]): boolean {
  let sum = 0;
  let most = 0;
  for (const weight of weights) {
    sum += weight;
    if (weight > most) most = weight;
  }
  return sum <= Number.MAX_SAFE_INTEGER && total * most <= Number.MAX_SAFE_INTEGER;
}

/**
 * Gives one unit more to the largest remainders; equal ones to the earlier index.
 *
 * @param ascending the remainders sorted
 */
function giveRest<T extends number | bigint>(
  parts: number[],
  remainders: ArrayLike<T>,
  ascending: ArrayLike<T>,
  rest: number,
): void {
  if (rest === 0) return;
  const edge = ascending[ascending.length - rest] as T;
  let atEdge = 0;
  for (let i = ascending.length - rest; i < ascending.length && ascending[i] === edge; i++) {
    atEdge++;
  }
  for (let i = 0; i < parts.length; i++) {
    const remainder = remainders[i] as T;
    if (remainder < edge || (remainder === edge && atEdge-- <= 0)) continue;
    parts[i] = (parts[i] as number) + 1;
  }
}

function apportionExact(total: bigint, weights: readonly number[]): number[] {
  const sum = weights.reduce((a, weight) => a + BigInt(weight), 0n);
  const remainders: bigint[] = [];
  let given = 0n;
  const parts = weights.map((weight) => {
    const product = total * BigInt(weight);
    const part = product / sum;
    remainders.push(product - part * sum);
    given += part;
    return safeNumber(part, 'part');
  });
  const ascending = [...remainders].sort((a, b) => (a < b ? -1 : a > b ? 1 : 0));
  giveRest(parts, remainders, ascending, Number(total - given));
  return parts;
}

function apportionFast(total: number, weights: readonly number[]): number[] {
  let sum = 0;
  for (const weight of weights) sum += weight;
  const remainders = new Float64Array(weights.length);
  let given = 0;
  const parts = weights.map((weight, index) => {
    const product = total * weight;
    const remainder = product % sum;
    const part = (product - remainder) / sum;
    remainders[index] = remainder;
    given += part;
    return part;
  });
  giveRest(parts, remainders, remainders.slice().sort(), total - given);
  return parts;
}

/**
 * Divides a whole total by weights with the largest remainder method (Hamilton): floor each exact
 * quota, give the units left to the largest remainders, equal ones to the earlier index. A negative
 * total is divided as its absolute value and the sign put back.
 *
 * @param weights whole and not negative
 * @returns whole parts in the weights' order; their sum is `total`
 * @throws RangeError for weights that are all zero with a total that isn't, and for bad numbers
 * @example apportion(1000, [3, 3, 3]) // [334, 333, 333]
 */
export function apportion(total: number, weights: number[]): number[] {
  wholeSigned(total, 'total');
  weights.forEach((weight, index) => wholeAtLeast(weight, `weights[${index}]`));
  if (weights.every((weight) => weight === 0)) {
    if (total !== 0) throw new RangeError('weights are all zero, so the total has no taker');
    return weights.map(() => 0);
  }
  const size = Math.abs(total);
  const parts = fitsDouble(size, weights)
    ? apportionFast(size, weights)
    : apportionExact(BigInt(size), weights);
  return total < 0 ? parts.map((part) => 0 - part) : parts;
}
