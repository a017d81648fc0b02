import type { Milligrams } from '../mass/milligrams.ts';

/** What a scale can do. A capacity of null is not known. */
export interface Scale {
  readonly divisionMg: Milligrams;
  readonly capacityMg: Milligrams | null;
}

/** Divisions that a portion must at least fill, so that one division is at most 5 % of it. */
export const leastDivisions = 20;

export type ScaleRefusal =
  | { code: 'too_small'; needsDivisionMg: Milligrams }
  | { code: 'too_coarse'; needsDivisionMg: Milligrams }
  | { code: 'too_heavy'; capacityMg: Milligrams };

/**
 * Why a portion can't be weighed on a scale, or null: it is under 20 divisions, its line's step is finer than the
 * division, or it is above the capacity (then it is cut). Says what division would do.
 */
export function scaleRefusal(
  portion: { targetMg: Milligrams; stepMg: Milligrams },
  scale: Scale,
): ScaleRefusal | null {
  const { targetMg, stepMg } = portion;
  const needsDivisionMg = Math.max(1, Math.min(stepMg, Math.floor(targetMg / leastDivisions)));
  if (stepMg < scale.divisionMg) return { code: 'too_coarse', needsDivisionMg };
  if (targetMg < leastDivisions * scale.divisionMg) return { code: 'too_small', needsDivisionMg };
  if (scale.capacityMg !== null && targetMg > scale.capacityMg) {
    return { code: 'too_heavy', capacityMg: scale.capacityMg };
  }
  return null;
}
