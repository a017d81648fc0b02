import type { PackOffer, PackRequest, PackSupplier } from '#shared/index.ts';

/** Milligrams in a kilogram. */
export const kg = 1_000_000;

/** An offer of one pack size on the line `kno3`, from the supplier `mill`. */
export function offer(
  id: string,
  kilos: number,
  priceMinor: number,
  over: Partial<PackOffer> = {},
): PackOffer {
  return { id, lineId: 'kno3', supplierId: 'mill', packMg: kilos * kg, priceMinor, ...over };
}

/** A supplier without minimum that ships for nothing. */
export function supplier(over: Partial<PackSupplier> = {}): PackSupplier {
  return { id: 'mill', shipping: { kind: 'flat', minor: 0 }, ...over };
}

/** A request of one line, in kilograms. */
export function packRequest(
  need: number,
  offers: PackOffer[],
  suppliers: PackSupplier[] = [supplier()],
): PackRequest {
  return { lines: [{ id: 'kno3', neededMg: need * kg }], offers, suppliers };
}
