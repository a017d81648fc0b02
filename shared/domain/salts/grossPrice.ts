import { safeNumber, wholeAtLeast, type Minor } from '../money/minor.ts';

/** A pack's price as a supplier lists it. */
export type ListedPrice = {
  priceMinor: Minor;
  priceIncludesTax: boolean;
  /** Tax in parts per million: 190 000 is 19 %. */
  taxRatePpm: number;
};

/**
 * What the club pays for a pack, tax included: the listed price, or the price and its tax, rounded half up.
 *
 * @example grossPriceMinor({ priceMinor: 7059, priceIncludesTax: false, taxRatePpm: 190_000 }) // 8400
 */
export function grossPriceMinor(price: ListedPrice): Minor {
  wholeAtLeast(price.priceMinor, 'priceMinor');
  wholeAtLeast(price.taxRatePpm, 'taxRatePpm');
  if (price.priceIncludesTax) return price.priceMinor;
  const tax = (BigInt(price.priceMinor) * BigInt(price.taxRatePpm) + 500_000n) / 1_000_000n;
  return safeNumber(BigInt(price.priceMinor) + tax, 'grossPriceMinor');
}
