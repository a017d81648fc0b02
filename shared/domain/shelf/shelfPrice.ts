/** Price of some milligrams at a price per kilogram, in whole minor units, halves rounded up. */
export function shelfPriceMinor(mg: number, priceMinorPerKg: number): number {
  return Number((BigInt(mg) * BigInt(priceMinorPerKg) * 2n + 1_000_000n) / 2_000_000n);
}
