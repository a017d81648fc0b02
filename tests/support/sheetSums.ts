import { planPacks, shareOut, type PackPlan, type ShareSheet } from '#shared/index.ts';
import { grossPriceMinor } from '#shared/domain/salts/grossPrice.ts';
import type { SheetReply } from '#shared/schemas/sheet.ts';

/** Plan and shares of a sheet, worked out from what the server sent and nothing else of it. */
export function sumsOf(sheet: SheetReply): { plan: PackPlan; shares: ShareSheet } {
  const { lines, offers, suppliers } = sheet.terms;
  const pledges = sheet.members.flatMap(({ membershipId, pledges: cells }) =>
    cells.map(([line, wantedMg, upToMg, , at]) => ({
      memberId: membershipId,
      lineId: lines[line]?.id ?? '',
      wantedMg,
      ...(upToMg === null ? {} : { upToMg }),
      at: new Date(at).toISOString(),
    })),
  );
  const pooled = (id: string) =>
    pledges.filter(({ lineId }) => lineId === id).reduce((sum, { wantedMg }) => sum + wantedMg, 0);
  const reserve = (line: (typeof lines)[number]) =>
    Math.ceil((pooled(line.id) * line.reservePermyriad) / 10_000);
  const plan = planPacks({
    lines: lines.map((line) => ({ id: line.id, neededMg: pooled(line.id) + reserve(line) })),
    offers: offers.map((offer) => ({
      ...offer,
      priceMinor: grossPriceMinor(offer),
      maxPacks: offer.maxPacks ?? 1_000_000,
    })),
    suppliers: suppliers.map(({ id, shipping, freeShippingFromMinor, minimumOrderMinor }) => ({
      id,
      shipping,
      ...(freeShippingFromMinor === null ? {} : { freeShippingFromMinor }),
      ...(minimumOrderMinor === null ? {} : { minimumOrderMinor }),
    })),
  });
  const bought = (id: string) =>
    offers.filter(({ lineId, id: o }) => lineId === id && plan.packs[o]);
  const shares = shareOut({
    currency: sheet.terms.currency,
    lines: lines.map((line) => ({
      id: line.id,
      availableMg: bought(line.id).reduce((mg, o) => mg + o.packMg * (plan.packs[o.id] ?? 0), 0),
      costMinor: bought(line.id).reduce(
        (sum, offer) => sum + grossPriceMinor(offer) * (plan.packs[offer.id] ?? 0),
        0,
      ),
      stepMg: line.stepMg,
      reserveMg: reserve(line),
      surplus: line.surplus,
      shortage: line.shortage,
      spreadMaxPermille: sheet.terms.spreadMaxPermille,
      shelfPays: sheet.terms.leftOverPayer === 'shelf',
    })),
    pledges,
    charges: suppliers.flatMap(({ id, shipping }) => {
      const amountMinor = plan.shippingBySupplier[id] ?? 0;
      const own = lines.filter((line) => bought(line.id).some((offer) => offer.supplierId === id));
      const basis = shipping.kind === 'byValue' ? ('value' as const) : ('mass' as const);
      return amountMinor === 0
        ? []
        : [{ id: `shipping:${id}`, amountMinor, basis, lineIds: own.map((line) => line.id) }];
    }),
  });
  return { plan, shares };
}
