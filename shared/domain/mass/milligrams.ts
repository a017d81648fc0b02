import { safeNumber, wholeAtLeast } from '../money/minor.ts';

/** An integer number of milligrams. */
export type Milligrams = number & { readonly __unit?: 'milligrams' };

/** Milligrams in a gram. */
export const mgPerGram = 1000;

/**
 * The least multiple of `stepMg` that is not below `mg`.
 *
 * @example ceilToStep(1201, 500) // 1500
 * @throws RangeError for a negative mass, or a step below 1
 */
export function ceilToStep(mg: Milligrams, stepMg: Milligrams): Milligrams {
  wholeAtLeast(mg, 'mg');
  wholeAtLeast(stepMg, 'stepMg', 1);
  const rest = mg % stepMg;
  return rest === 0 ? mg : safeNumber(BigInt(mg - rest) + BigInt(stepMg), 'mg');
}

/**
 * The greatest multiple of `stepMg` that is not above `mg`.
 *
 * @throws RangeError for a negative mass, or a step below 1
 */
export function floorToStep(mg: Milligrams, stepMg: Milligrams): Milligrams {
  wholeAtLeast(mg, 'mg');
  wholeAtLeast(stepMg, 'stepMg', 1);
  return mg - (mg % stepMg);
}

/**
 * The handling reserve on what was pledged, rounded up to a whole milligram.
 *
 * @param permyriad hundredths of a per cent: 50 is 0.5 %
 * @example reserveMg(23_650_000, 50) // 118_250
 */
export function reserveMg(pledgedMg: Milligrams, permyriad: number): Milligrams {
  wholeAtLeast(pledgedMg, 'pledgedMg');
  wholeAtLeast(permyriad, 'permyriad');
  return safeNumber((BigInt(pledgedMg) * BigInt(permyriad) + 9999n) / 10000n, 'reserveMg');
}
