import type { Milligrams } from '../mass/milligrams.ts';

/**
 * What a bag holds: gross less the empty bag. Until the empty bag is weighed, 0.5 % of gross is assumed for it (rounded
 * up to whole milligrams), and said so.
 */
export function netOfBag(
  grossMg: Milligrams,
  tareMg: Milligrams | null,
): { netMg: Milligrams; tareMg: Milligrams; tareAssumed: boolean } {
  const tare = tareMg ?? Math.ceil(grossMg / 200);
  return { netMg: Math.max(0, grossMg - tare), tareMg: tare, tareAssumed: tareMg === null };
}

/** What counts for targets: the lesser of what the label says and what was found. */
export function countedMg(nominalMg: Milligrams, netMg: Milligrams): Milligrams {
  return Math.min(nominalMg, netMg);
}
