import { exactSum, safeNumber } from '../money/minor.ts';
import { grossPriceMinor } from '../salts/grossPrice.ts';
import type { ShareCharge } from '../shares/shareTypes.ts';
import type { SheetCharge, SheetOffer, SheetTerms } from './sheetTerms.ts';

/** Packs by offer id and the shipping they cause; every PackPlan is one. */
export type ChosenPacks = {
  packs: Record<string, number>;
  shippingBySupplier: Record<string, number>;
};

const shippingPrefix = 'shipping:';

/** The id under which a supplier's shipping stands among the charges. */
export const shippingChargeId = (supplierId: string) => shippingPrefix + supplierId;

/** The supplier whose shipping a charge id means, or null. */
export const supplierOfShipping = (chargeId: string) =>
  chargeId.startsWith(shippingPrefix) ? chargeId.slice(shippingPrefix.length) : null;

/** The tax that an amount contains, half up. */
function containedTax(amount: number, ppm: number): number {
  const over = 1_000_000n + BigInt(ppm);
  return safeNumber((BigInt(amount) * BigInt(ppm) * 2n + over) / (over * 2n), 'taxMinor');
}

/** What the club pays for a pack, tax included. */
export const offerPriceMinor = (offer: SheetOffer): number => grossPriceMinor(offer);

/** What the chosen packs bring for a line. */
export type Bought = {
  availableMg: number;
  costMinor: number;
  taxRate: number;
  suppliers: Set<string>;
};

/** Mass, cost and contained tax of the packs chosen for each line. */
export function boughtByLine(
  terms: SheetTerms,
  packs: Record<string, number>,
): Map<string, Bought> {
  return new Map(
    terms.lines.map(({ id }): [string, Bought] => {
      const offers = terms.offers.filter(({ id: offer, lineId }) => lineId === id && packs[offer]);
      const costs = offers.map((offer) =>
        safeNumber(BigInt(offerPriceMinor(offer)) * BigInt(packs[offer.id] ?? 0), 'costMinor'),
      );
      const masses = offers.map((offer) =>
        safeNumber(BigInt(offer.packMg) * BigInt(packs[offer.id] ?? 0), 'availableMg'),
      );
      const costMinor = exactSum(costs, 'costMinor');
      return [
        id,
        {
          availableMg: exactSum(masses, 'availableMg'),
          costMinor,
          taxRate: rateOf(offers, costs, costMinor),
          suppliers: new Set(offers.map(({ supplierId }) => supplierId)),
        },
      ];
    }),
  );
}

/** The packs' common rate; where they differ, the rate at which the sum contains all their taxes. */
function rateOf(offers: readonly SheetOffer[], costs: readonly number[], cost: number): number {
  const rates = new Set(offers.map(({ taxRatePpm }) => taxRatePpm));
  if (rates.size <= 1) return (offers[0]?.taxRatePpm ?? 0) / 1_000_000;
  const taxes = offers.map(({ taxRatePpm: ppm }, index) => containedTax(costs[index] ?? 0, ppm));
  const tax = exactSum(taxes, 'taxMinor');
  return tax / Math.max(1, cost - tax);
}

function chargeLines(
  charge: SheetCharge,
  terms: SheetTerms,
  linesOf: ReadonlyMap<string, string[]>,
): string[] | null {
  const known = new Set(terms.lines.map(({ id }) => id));
  if (charge.supplierId !== null) return linesOf.get(charge.supplierId) ?? [];
  return charge.lineIds?.filter((id) => known.has(id)) ?? null;
}

/** Charges of the terms, and each used supplier's shipping; those of a supplier nothing is bought from don't arise. */
export function estimatedCharges(
  terms: SheetTerms,
  chosen: ChosenPacks,
  bought: ReadonlyMap<string, Bought>,
): ShareCharge[] {
  const linesOf = new Map<string, string[]>();
  for (const [lineId, { suppliers }] of bought) {
    for (const id of suppliers) linesOf.set(id, [...(linesOf.get(id) ?? []), lineId]);
  }
  const shipping = terms.suppliers.flatMap(({ id, shipping: table }): ShareCharge[] => {
    const amountMinor = chosen.shippingBySupplier[id] ?? 0;
    const lineIds = linesOf.get(id);
    if (amountMinor === 0 || !lineIds) return [];
    const basis = table.kind === 'byValue' ? 'value' : 'mass';
    return [{ id: shippingChargeId(id), amountMinor, basis, lineIds }];
  });
  const own = terms.charges.flatMap((charge): ShareCharge[] => {
    const { id, amountMinor, basis, taxRatePpm } = charge;
    const lineIds = chargeLines(charge, terms, linesOf);
    if (lineIds?.length === 0) return [];
    const taxRate = taxRatePpm / 1_000_000;
    return [{ id, amountMinor, basis, taxRate, ...(lineIds ? { lineIds } : {}) }];
  });
  return [...shipping, ...own];
}
