import { compareIds } from '../shares/pledgeOrder.ts';
import { exactSum, safeNumber, wholeAtLeast } from '../money/minor.ts';
import { checkPackRequest } from './checkPackRequest.ts';
import { shippingCost } from './shippingCost.ts';
import type { PackOffer, PackRequest } from './packTypes.ts';

/** Why chosen packs can't be ordered as they are. */
export type PackProblem =
  | { code: 'line_short'; lineId: string; missingMg: number }
  | { code: 'over_stock'; offerId: string; maxPacks: number }
  | { code: 'not_a_multiple'; offerId: string; multipleOf: number }
  | { code: 'below_minimum'; supplierId: string; missingMinor: number }
  | { code: 'not_delivered'; supplierId: string };

/** What chosen packs cost; `leftOverMg` is negative where a line isn't covered. */
export type PackPrice = {
  feasible: boolean;
  problems: PackProblem[];
  goodsMinor: number;
  goodsByLine: Record<string, number>;
  shippingMinor: number;
  shippingBySupplier: Record<string, number>;
  totalMinor: number;
  boughtMg: Record<string, number>;
  leftOverMg: Record<string, number>;
};

type Basket = { value: bigint; mass: bigint };

function offerProblems(offer: PackOffer, count: number): PackProblem[] {
  const problems: PackProblem[] = [];
  const { id: offerId, maxPacks, multipleOf = 1 } = offer;
  if (maxPacks !== undefined && count > maxPacks) {
    problems.push({ code: 'over_stock', offerId, maxPacks });
  }
  if (count % multipleOf !== 0) problems.push({ code: 'not_a_multiple', offerId, multipleOf });
  return problems;
}

function addTo(baskets: Map<string, Basket>, key: string, offer: PackOffer, count: number): void {
  const basket = baskets.get(key) ?? { value: 0n, mass: 0n };
  basket.value += BigInt(offer.priceMinor) * BigInt(count);
  basket.mass += BigInt(offer.packMg) * BigInt(count);
  baskets.set(key, basket);
}

/**
 * Prices a choice of packs, whoever made it: the plan's, or the organiser's own.
 *
 * @param packs packs by offer id; offers that are missing aren't bought
 * @throws RangeError for a bad request, an unknown offer, a count that isn't whole, or sums past the
 * safe integers
 */
export function pricePacks(request: PackRequest, packs: Record<string, number>): PackPrice {
  checkPackRequest(request);
  const offers = new Map(request.offers.map((offer) => [offer.id, offer]));
  const byLine = new Map<string, Basket>();
  const bySupplier = new Map<string, Basket>();
  const problems: PackProblem[] = [];

  for (const id of Object.keys(packs).sort(compareIds)) {
    const offer = offers.get(id);
    if (!offer) throw new RangeError(`packs names no offer: ${id}`);
    const count = wholeAtLeast(packs[id] ?? 0, `packs of ${id}`);
    if (count === 0) continue;
    problems.push(...offerProblems(offer, count));
    addTo(byLine, offer.lineId, offer, count);
    addTo(bySupplier, offer.supplierId, offer, count);
  }

  const goodsByLine: Record<string, number> = {};
  const boughtMg: Record<string, number> = {};
  const leftOverMg: Record<string, number> = {};
  for (const { id: lineId, neededMg } of request.lines) {
    const basket = byLine.get(lineId);
    goodsByLine[lineId] = safeNumber(basket?.value ?? 0n, 'goodsMinor');
    const bought = safeNumber(basket?.mass ?? 0n, 'boughtMg');
    boughtMg[lineId] = bought;
    leftOverMg[lineId] = bought - neededMg;
    if (bought < neededMg) {
      problems.push({ code: 'line_short', lineId, missingMg: neededMg - bought });
    }
  }

  const shippingBySupplier: Record<string, number> = {};
  for (const supplier of request.suppliers) {
    const basket = bySupplier.get(supplier.id);
    if (!basket) continue;
    const value = safeNumber(basket.value, 'goodsMinor');
    const minimum = supplier.minimumOrderMinor ?? 0;
    if (value < minimum) {
      const missingMinor = minimum - value;
      problems.push({ code: 'below_minimum', supplierId: supplier.id, missingMinor });
    }
    const shipping = shippingCost(supplier, value, safeNumber(basket.mass, 'massMg'));
    if (shipping === null) problems.push({ code: 'not_delivered', supplierId: supplier.id });
    shippingBySupplier[supplier.id] = shipping ?? 0;
  }

  const goodsMinor = exactSum(Object.values(goodsByLine), 'goodsMinor');
  const shippingMinor = exactSum(Object.values(shippingBySupplier), 'shippingMinor');
  return {
    feasible: problems.length === 0,
    problems,
    goodsMinor,
    goodsByLine,
    shippingMinor,
    shippingBySupplier,
    totalMinor: exactSum([goodsMinor, shippingMinor], 'totalMinor'),
    boughtMg,
    leftOverMg,
  };
}

/** Minor units per gram, for display only; 0 when nothing is bought. */
export function perGram(costMinor: number, mg: number): number {
  return mg === 0 ? 0 : (costMinor * 1000) / mg;
}
