import { wholeAtLeast } from '../money/minor.ts';
import type { PackOffer, PackRequest, PackSupplier, Shipping } from './packTypes.ts';

function uniqueIds(things: readonly { id: string }[], field: string): Set<string> {
  const ids = new Set<string>();
  for (const { id } of things) {
    if (ids.has(id)) throw new RangeError(`${field} has the id ${id} twice`);
    ids.add(id);
  }
  return ids;
}

function checkShipping(shipping: Shipping, name: string): void {
  if (shipping.kind === 'flat') {
    wholeAtLeast(shipping.minor, `${name}shipping.minor`);
    return;
  }
  if (shipping.kind !== 'byMass' && shipping.kind !== 'byValue') {
    throw new RangeError(`${name}shipping.kind must be flat, byMass or byValue`);
  }
  let last: number | null = -1;
  for (const { upTo, minor } of shipping.steps) {
    wholeAtLeast(minor, `${name}shipping.steps.minor`);
    if (upTo !== null) wholeAtLeast(upTo, `${name}shipping.steps.upTo`);
    if (last === null || (upTo !== null && upTo <= last)) {
      throw new RangeError(`${name}shipping.steps.upTo must rise, null last`);
    }
    last = upTo;
  }
}

function checkSupplier(supplier: PackSupplier): void {
  const name = `supplier ${supplier.id}: `;
  wholeAtLeast(supplier.minimumOrderMinor ?? 0, `${name}minimumOrderMinor`);
  wholeAtLeast(supplier.freeShippingFromMinor ?? 0, `${name}freeShippingFromMinor`);
  checkShipping(supplier.shipping, name);
}

function checkOffer(offer: PackOffer, lineIds: Set<string>, supplierIds: Set<string>): void {
  const name = `offer ${offer.id}: `;
  if (!lineIds.has(offer.lineId)) {
    throw new RangeError(`${name}lineId names no line: ${offer.lineId}`);
  }
  if (!supplierIds.has(offer.supplierId)) {
    throw new RangeError(`${name}supplierId names no supplier: ${offer.supplierId}`);
  }
  wholeAtLeast(offer.packMg, `${name}packMg`, 1);
  wholeAtLeast(offer.priceMinor, `${name}priceMinor`);
  wholeAtLeast(offer.maxPacks ?? 0, `${name}maxPacks`);
  wholeAtLeast(offer.multipleOf ?? 1, `${name}multipleOf`, 1);
}

/**
 * Checks a request's numbers, ids and shipping tables.
 *
 * @throws RangeError naming the field
 */
export function checkPackRequest(request: PackRequest): void {
  const lineIds = uniqueIds(request.lines, 'lines');
  const supplierIds = uniqueIds(request.suppliers, 'suppliers');
  uniqueIds(request.offers, 'offers');
  request.lines.forEach((line) => wholeAtLeast(line.neededMg, `line ${line.id}: neededMg`));
  request.suppliers.forEach(checkSupplier);
  request.offers.forEach((offer) => checkOffer(offer, lineIds, supplierIds));
}
