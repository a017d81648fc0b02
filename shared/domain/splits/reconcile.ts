import type { Milligrams } from '../mass/milligrams.ts';

/** What became of one bag or one line, all in milligrams. */
export interface Reconciliation {
  readonly netMg: Milligrams;
  readonly portionsMg: Milligrams;
  readonly shelfMg: Milligrams;
  readonly spilledMg: Milligrams;
  /** Computed; negative when more came out than went in (moisture, scales). */
  readonly unaccountedMg: number;
  /** Unaccounted, as a share of net, in hundredths of a per cent, rounded to the nearest. */
  readonly unaccountedPermyriad: number;
  /** Above 1 % either way somebody writes down why. */
  readonly needsNote: boolean;
}

/** Net received = portions + shelf + spilled + unaccounted. */
export function reconcile(masses: {
  netMg: Milligrams;
  portionsMg: Milligrams;
  shelfMg: Milligrams;
  spilledMg: Milligrams;
}): Reconciliation {
  const unaccountedMg = masses.netMg - masses.portionsMg - masses.shelfMg - masses.spilledMg;
  const permyriad = masses.netMg === 0 ? 0 : Math.round((unaccountedMg * 10_000) / masses.netMg);
  return {
    ...masses,
    unaccountedMg,
    unaccountedPermyriad: permyriad,
    needsNote: Math.abs(unaccountedMg) * 100 > masses.netMg,
  };
}

/**
 * Of what was lost (spilled and unaccounted), the part above 2 % of net: what a treasurer may take on the club.
 *
 * @returns whole milligrams, rounded down; 0 when less was lost
 */
export function excessLossMg(reconciliation: Reconciliation): Milligrams {
  const lost = reconciliation.spilledMg + reconciliation.unaccountedMg;
  return Math.max(0, Math.floor(lost - reconciliation.netMg / 50));
}
