import type { PackSupplier } from './packTypes.ts';

/**
 * What a supplier charges to ship goods of this value and mass, when anything is bought from it.
 *
 * @returns minor units, or null past the last step of its table, where it doesn't deliver
 */
export function shippingCost(
  supplier: PackSupplier,
  valueMinor: number,
  massMg: number,
): number | null {
  const { shipping, freeShippingFromMinor } = supplier;
  if (freeShippingFromMinor !== undefined && valueMinor >= freeShippingFromMinor) return 0;
  if (shipping.kind === 'flat') return shipping.minor;
  const measure = shipping.kind === 'byMass' ? massMg : valueMinor;
  const step = shipping.steps.find(({ upTo }) => upTo === null || measure <= upTo);
  return step ? step.minor : null;
}
