import { shelfPriceMinor } from '#shared/domain/shelf/shelfPrice.ts';
import type { OfferBody } from '#shared/schemas/suppliers.ts';
import { select, type Tx } from '../../config/database.ts';
import { Offer } from '../../models/Offer.ts';

/** What a buy takes from the shelf comes in packs of so much, each from one lot. */
export const shelfPackMg = 100_000;

/** What the shelf can offer of a salt at one price. */
export interface ShelfGroup {
  readonly saltId: string;
  readonly packs: number;
  readonly packPriceMinor: number;
}

/** Whole packs on the shelf by salt and price; what has no price or no whole pack is left out. */
export async function shelfGroups(clubId: string, tx: Tx): Promise<ShelfGroup[]> {
  const rows = await select<{ salt_id: string; price: number; packs: number }>(
    `select salt_id, price_minor_per_kg as price, sum(mg / :packMg)::int as packs from shelf_stock
     where club_id = :clubId and price_minor_per_kg is not null and mg >= :packMg
     group by salt_id, price_minor_per_kg order by salt_id, price_minor_per_kg`,
    { clubId, packMg: shelfPackMg },
    tx,
  );
  return rows.map((row) => ({
    saltId: row.salt_id,
    packs: row.packs,
    packPriceMinor: shelfPriceMinor(shelfPackMg, row.price),
  }));
}

/** The offer that stands for each group: the one of its price before a living one, a living one before an old one. */
export function matchOffers(
  groups: readonly ShelfGroup[],
  offers: readonly Offer[],
): { matched: Map<ShelfGroup, Offer | null>; rest: Offer[] } {
  const free = new Set(offers);
  const matched = new Map<ShelfGroup, Offer | null>();
  const take = (group: ShelfGroup, fits: (offer: Offer) => boolean) => {
    if (matched.has(group)) return;
    const found = [...free].find((offer) => offer.saltId === group.saltId && fits(offer));
    if (!found) return;
    free.delete(found);
    matched.set(group, found);
  };
  const alive = (offer: Offer) => offer.archivedAt === null;
  for (const group of groups)
    take(group, (offer) => alive(offer) && offer.priceMinor === group.packPriceMinor);
  for (const group of groups) take(group, alive);
  for (const group of groups) take(group, (offer) => offer.priceMinor === group.packPriceMinor);
  for (const group of groups) take(group, () => true);
  for (const group of groups) if (!matched.has(group)) matched.set(group, null);
  return { matched, rest: [...free].filter(alive) };
}

/** A group as the terms of its offer. */
export function offerTerms(group: ShelfGroup): OfferBody {
  return {
    saltId: group.saltId,
    label: '',
    packMg: shelfPackMg,
    priceMinor: group.packPriceMinor,
    // The shelf sends no bill, so nothing says what tax is in it.
    priceIncludesTax: true,
    taxRatePpm: 0,
    stockPacks: group.packs,
    multipleOf: 1,
    link: '',
  };
}
