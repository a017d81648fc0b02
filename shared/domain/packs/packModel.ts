import { compareIds } from '../shares/pledgeOrder.ts';
import { shippingCost } from './shippingCost.ts';
import type { PackRequest, PackSupplier } from './packTypes.ts';

/** What is bought of an offer at once: one pack, or `multipleOf` of them. */
export type Item = {
  /** Place of the offer among all, by id. */
  offer: number;
  supplier: number;
  mass: number;
  price: number;
  packs: number;
  /** How often it can be bought; Infinity without a stock limit. */
  max: number;
};

/** A line with what covers it. */
export type LineModel = {
  index: number;
  need: number;
  items: Item[];
  /** Suppliers that offer on this line and on no other: their terms are the line's own affair. */
  privates: number[];
  /** Suppliers that offer on other lines too. */
  shared: number[];
};

/** A supplier with what the search asks about it. */
export type SupplierModel = {
  terms: PackSupplier;
  minimum: number;
  /** Goods value from which shipping is free; Infinity without one. */
  free: number;
  shared: boolean;
  /** Whether buying more than needed from it can ever save money. */
  padded: boolean;
};

/** The request by place instead of by id. */
export type PackModel = {
  lines: LineModel[];
  suppliers: SupplierModel[];
  offerIds: string[];
};

function canPad({ minimumOrderMinor = 0, freeShippingFromMinor, shipping }: PackSupplier): boolean {
  if (minimumOrderMinor > 0) return true;
  const costs = shipping.kind === 'flat' ? [shipping.minor] : shipping.steps.map((s) => s.minor);
  const ends = shipping.kind !== 'flat' && shipping.steps.at(-1)?.upTo !== null;
  if (freeShippingFromMinor !== undefined) return ends || costs.some((cost) => cost > 0);
  return costs.some((cost, index) => index > 0 && cost < (costs[index - 1] ?? 0));
}

/** Builds the search's model of a checked request. */
export function packModel(request: PackRequest): PackModel {
  const offerIds = request.offers.map((offer) => offer.id).sort(compareIds);
  const rank = new Map(offerIds.map((id, index) => [id, index]));
  const places = new Map(request.suppliers.map((supplier, index) => [supplier.id, index]));
  const linesOf = request.suppliers.map(() => new Set<string>());

  const items = new Map<string, Item[]>(request.lines.map((line) => [line.id, []]));
  for (const offer of request.offers) {
    const packs = offer.multipleOf ?? 1;
    const max = offer.maxPacks === undefined ? Infinity : Math.floor(offer.maxPacks / packs);
    if (max === 0) continue;
    const supplier = places.get(offer.supplierId) ?? 0;
    linesOf[supplier]?.add(offer.lineId);
    items.get(offer.lineId)?.push({
      offer: rank.get(offer.id) ?? 0,
      supplier,
      mass: offer.packMg * packs,
      price: offer.priceMinor * packs,
      packs,
      max,
    });
  }

  const suppliers = request.suppliers.map((terms, index): SupplierModel => ({
    terms,
    minimum: terms.minimumOrderMinor ?? 0,
    free: terms.freeShippingFromMinor ?? Infinity,
    shared: (linesOf[index]?.size ?? 0) > 1,
    padded: canPad(terms),
  }));
  const lines = request.lines.map(({ id, neededMg }, index): LineModel => {
    const own = (items.get(id) ?? []).sort((a, b) => a.offer - b.offer);
    const used = [...new Set(own.map((item) => item.supplier))];
    return {
      index,
      need: neededMg,
      items: own,
      privates: used.filter((supplier) => !suppliers[supplier]?.shared),
      shared: used.filter((supplier) => suppliers[supplier]?.shared),
    };
  });
  return { lines, suppliers, offerIds };
}

/**
 * What a supplier's terms make of a basket.
 *
 * @returns shipping in minor units; Infinity when it doesn't deliver that
 */
export function termsCost(supplier: SupplierModel, value: number, mass: number): number {
  if (mass === 0) return 0;
  if (value < supplier.minimum) return Infinity;
  return shippingCost(supplier.terms, value, mass) ?? Infinity;
}
