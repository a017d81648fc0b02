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

/** Gives one unit more to the largest remainders; equal ones to the earlier index. */
function giveRest<T extends number | bigint>(parts: number[], remainders: T[], rest: number): void {
  if (rest === 0) return;
  const order = Array.from(remainders.keys()).sort((a, b) => {
    const [left, right] = [remainders[a] as T, remainders[b] as T];
    return left === right ? a - b : left < right ? 1 : -1;
  });
  for (let i = 0; i < rest; i++) {
    const index = order[i] as number;
    parts[index] = (parts[index] as number) + 1;
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
  giveRest(parts, remainders, Number(total - given));
  return parts;
}

function apportionFast(total: number, weights: readonly number[]): number[] {
  const sum = weights.reduce((a, weight) => a + weight, 0);
  const remainders: number[] = [];
  let given = 0;
  const parts = weights.map((weight) => {
    const product = total * weight;
    const remainder = product % sum;
    const part = (product - remainder) / sum;
    remainders.push(remainder);
    given += part;
    return part;
  });
  giveRest(parts, remainders, total - given);
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
