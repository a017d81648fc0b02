import type { PackPlan, PackRequest } from '../packs/packTypes.ts';
import { pricePacks } from '../packs/pricePacks.ts';
import { reserveMg } from '../mass/milligrams.ts';
import { shareOut } from '../shares/shareOut.ts';
import type { ShareCharge, ShareLine, ShareRequest, ShareSheet } from '../shares/shareTypes.ts';
import { boughtByLine, estimatedCharges, offerPriceMinor } from './boughtPacks.ts';
import type { Bought, ChosenPacks } from './boughtPacks.ts';
import type { SheetPledge, SheetTerms } from './sheetTerms.ts';

/** What came, net, and what it really cost: by line, with the charges of the bills. */
export type Received = {
  lines: Record<string, { availableMg: number; costMinor: number; taxRate?: number }>;
  charges: ShareCharge[];
};

/**
 * When the sums are made: `estimate` from the plan, `targets` from what came, `final` from what was weighed (steps of
 * 1 mg, the rest to the shelf; pledges then carry the charged milligrams as `wantedMg`).
 */
export type ShareStage = 'estimate' | 'targets' | 'final';

/** Pledged grams of each line, in milligrams. */
export function pooledMg(
  terms: Pick<SheetTerms, 'lines'>,
  pledges: readonly Pick<SheetPledge, 'lineId' | 'wantedMg'>[],
): Record<string, number> {
  const pooled: Record<string, number> = {};
  for (const { id } of terms.lines) pooled[id] = 0;
  for (const { lineId, wantedMg } of pledges) {
    if (lineId in pooled) pooled[lineId] = (pooled[lineId] ?? 0) + wantedMg;
  }
  return pooled;
}

/** What must be covered and from what: pledged grams and each line's reserve, every offer with its tax. */
export function packRequestOf(
  terms: SheetTerms,
  pledges: readonly Pick<SheetPledge, 'lineId' | 'wantedMg'>[],
): PackRequest {
  const pooled = pooledMg(terms, pledges);
  return {
    lines: terms.lines.map(({ id, reservePermyriad }) => {
      const wanted = pooled[id] ?? 0;
      return { id, neededMg: wanted + reserveMg(wanted, reservePermyriad) };
    }),
    offers: terms.offers.map((offer) => ({
      id: offer.id,
      lineId: offer.lineId,
      supplierId: offer.supplierId,
      packMg: offer.packMg,
      priceMinor: offerPriceMinor(offer),
      multipleOf: offer.multipleOf,
      ...(offer.maxPacks === null ? {} : { maxPacks: offer.maxPacks }),
    })),
    suppliers: terms.suppliers.map((supplier) => ({
      id: supplier.id,
      shipping: supplier.shipping,
      ...(supplier.freeShippingFromMinor === null
        ? {}
        : { freeShippingFromMinor: supplier.freeShippingFromMinor }),
      ...(supplier.minimumOrderMinor === null
        ? {}
        : { minimumOrderMinor: supplier.minimumOrderMinor }),
    })),
  };
}

function isReceived(source: ChosenPacks | Received): source is Received {
  return 'lines' in source;
}

/**
 * Who asked for what, what there is of it and what it costs, under the buy's policies: what `shareOut` divides.
 *
 * @param source packs chosen (estimate), or what came and its real cost
 * @throws RangeError past the safe integers
 */
export function shareRequestOf(
  terms: SheetTerms,
  pledges: readonly SheetPledge[],
  source: ChosenPacks | Received,
  stage: ShareStage = 'estimate',
): ShareRequest {
  const received = isReceived(source);
  const bought = received ? new Map<string, Bought>() : boughtByLine(terms, source.packs);
  const pooled = pooledMg(terms, pledges);
  const final = stage === 'final';
  const lines = terms.lines.map((line): ShareLine => {
    const have = received ? source.lines[line.id] : bought.get(line.id);
    return {
      id: line.id,
      availableMg: have?.availableMg ?? 0,
      costMinor: have?.costMinor ?? 0,
      taxRate: have?.taxRate ?? 0,
      stepMg: final ? 1 : line.stepMg,
      reserveMg: final ? 0 : reserveMg(pooled[line.id] ?? 0, line.reservePermyriad),
      surplus: final ? 'shelf' : line.surplus,
      spreadMaxPermille: terms.spreadMaxPermille,
      shortage: line.shortage,
      shelfPays: terms.leftOverPayer === 'shelf',
    };
  });
  const known = new Set(terms.lines.map(({ id }) => id));
  return {
    currency: terms.currency,
    lines,
    pledges: pledges
      .filter(({ lineId, wantedMg, upToMg }) => known.has(lineId) && (wantedMg > 0 || !!upToMg))
      .map(({ membershipId, lineId, wantedMg, upToMg, at }) => ({
        memberId: membershipId,
        lineId,
        wantedMg,
        at,
        ...(upToMg === null || final ? {} : { upToMg }),
      })),
    charges: received ? source.charges : estimatedCharges(terms, source, bought),
  };
}

/** What everybody would get and pay if the buy locked with these packs. */
export function estimateOf(
  terms: SheetTerms,
  pledges: readonly SheetPledge[],
  chosen: ChosenPacks,
): ShareSheet {
  return shareOut(shareRequestOf(terms, pledges, chosen, 'estimate'));
}

/**
 * The plan that counts: the organiser's own choice of packs as long as it can be ordered and covers every line, else
 * the computed one.
 */
export function planInForce(
  terms: SheetTerms,
  pledges: readonly Pick<SheetPledge, 'lineId' | 'wantedMg'>[],
  computed: PackPlan,
  override: Record<string, number> | null,
): { plan: PackPlan; overridden: boolean } {
  if (!override) return { plan: computed, overridden: false };
  const offers = new Set(terms.offers.map(({ id }) => id));
  if (Object.keys(override).some((id) => !offers.has(id)))
    return { plan: computed, overridden: false };
  const price = pricePacks(packRequestOf(terms, pledges), override);
  if (!price.feasible) return { plan: computed, overridden: false };
  const plan: PackPlan = {
    feasible: true,
    exact: true,
    packs: override,
    goodsMinor: price.goodsMinor,
    shippingMinor: price.shippingMinor,
    shippingBySupplier: price.shippingBySupplier,
    totalMinor: price.totalMinor,
    leftOverMg: price.leftOverMg,
  };
  return { plan, overridden: true };
}
