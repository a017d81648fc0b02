import type { Offer, OfferPrice, Supplier } from '#shared/schemas/suppliers.ts';
import { select, type Tx } from '../../config/database.ts';
import {
  presentOffer,
  presentSupplier,
  type OfferRow,
  type SupplierRow,
} from '../../presenters/suppliers.ts';
import { notFound } from '../problem.ts';

const supplierColumns = `s.id, s.name, s.contact, s.email, s.website, s.note, s.shipping,
  s.free_shipping_from_minor as "freeShippingFromMinor", s.minimum_order_minor as "minimumOrderMinor",
  s.is_shelf as "isShelf", s.archived_at as "archivedAt", s.version,
  (select count(*)::int from offers o where o.supplier_id = s.id and o.archived_at is null) as offers`;

const offerColumns = `o.id, o.supplier_id as "supplierId", o.salt_id as "saltId", o.label, o.pack_mg as "packMg",
  o.price_minor as "priceMinor", o.price_includes_tax as "priceIncludesTax", o.tax_rate_ppm as "taxRatePpm",
  o.stock_packs as "stockPacks", o.multiple_of as "multipleOf", o.link, o.archived_at as "archivedAt",
  o.updated_at as "updatedAt", o.version,
  (select count(distinct b.id)::int from buys b join lines l on l.buy_id = b.id and l.removed_at is null
    where b.club_id = o.club_id and b.state = 'open' and l.salt_id = o.salt_id
      and (l.any_of_supplier_id = o.supplier_id
        or exists (select 1 from line_offers lo where lo.line_id = l.id and lo.offer_id = o.id))) as "openBuys"`;

/** All suppliers of a club by name, archived ones included and marked. */
export async function listSuppliers(clubId: string, tx?: Tx): Promise<Supplier[]> {
  const rows = await select<SupplierRow>(
    `select ${supplierColumns} from suppliers s where s.club_id = :clubId
     order by s.is_shelf, lower(s.name), s.id`,
    { clubId },
    tx,
  );
  return rows.map(presentSupplier);
}

/**
 * One supplier.
 * @throws DomainProblem 404
 */
export async function getSupplier(clubId: string, id: string, tx?: Tx): Promise<Supplier> {
  const [row] = await select<SupplierRow>(
    `select ${supplierColumns} from suppliers s where s.club_id = :clubId and s.id = :id`,
    { clubId, id },
    tx,
  );
  if (!row) throw notFound('This supplier');
  return presentSupplier(row);
}

/** Offers of a supplier by salt and pack, archived ones included and marked. */
export async function listOffers(clubId: string, supplierId: string, tx?: Tx): Promise<Offer[]> {
  const rows = await select<OfferRow>(
    `select ${offerColumns} from offers o where o.club_id = :clubId and o.supplier_id = :supplierId
     order by o.salt_id, o.pack_mg, o.label, o.id`,
    { clubId, supplierId },
    tx,
  );
  return rows.map(presentOffer);
}

/**
 * One offer of a supplier.
 * @throws DomainProblem 404
 */
export async function getOffer(
  clubId: string,
  supplierId: string,
  id: string,
  tx?: Tx,
): Promise<Offer> {
  const [row] = await select<OfferRow>(
    `select ${offerColumns} from offers o where o.club_id = :clubId and o.supplier_id = :supplierId and o.id = :id`,
    { clubId, supplierId, id },
    tx,
  );
  if (!row) throw notFound('This offer');
  return presentOffer(row);
}

/**
 * Every price an offer had, the newest first.
 * @throws DomainProblem 404
 */
export async function listOfferPrices(
  clubId: string,
  supplierId: string,
  offerId: string,
): Promise<OfferPrice[]> {
  await getOffer(clubId, supplierId, offerId);
  const rows = await select<Omit<OfferPrice, 'setAt'> & { setAt: Date }>(
    `select p.price_minor as "priceMinor", p.price_includes_tax as "priceIncludesTax",
        p.tax_rate_ppm as "taxRatePpm", m.display_name as "setBy", p.set_at as "setAt"
     from offer_prices p left join memberships m on m.id = p.set_by_id
     where p.offer_id = :offerId order by p.id desc limit 500`,
    { offerId },
  );
  return rows.map((row) => ({ ...row, setAt: row.setAt.toISOString() }));
}
