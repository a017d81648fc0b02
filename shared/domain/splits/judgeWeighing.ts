import type { Milligrams } from '../mass/milligrams.ts';

/** Where a reading lies: `within` the band; `below`: kept after a second look; `above`: scoop back. */
export type Verdict = 'within' | 'below' | 'above';

/**
 * Half width of the band around a target: the larger of one division of the scale and `permille` of the target, in
 * whole milligrams, rounded down.
 *
 * @param permille 5 is 0.5 %
 */
export function bandMg(targetMg: Milligrams, divisionMg: Milligrams, permille: number): Milligrams {
  return Math.max(divisionMg, Number((BigInt(targetMg) * BigInt(permille)) / 1000n));
}

/**
 * What to make of one reading. Within the band the target is charged, so that nobody pays for a needle's width; below
 * it what was weighed is charged, once somebody has looked a second time; above it nothing is kept.
 */
export function judgeWeighing(weighing: {
  readingMg: Milligrams;
  targetMg: Milligrams;
  bandMg: Milligrams;
  secondLook: boolean;
}): { verdict: Verdict; kept: boolean; chargedMg: Milligrams } {
  const { readingMg, targetMg, bandMg: band, secondLook } = weighing;
  if (readingMg > targetMg + band) return { verdict: 'above', kept: false, chargedMg: 0 };
  if (readingMg < targetMg - band) {
    return { verdict: 'below', kept: secondLook, chargedMg: secondLook ? readingMg : 0 };
  }
  return { verdict: 'within', kept: true, chargedMg: targetMg };
}
