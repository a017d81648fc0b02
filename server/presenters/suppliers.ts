import { SupplierBody, OfferBody, type Offer, type Supplier } from '#shared/schemas/suppliers.ts';

/** A supplier's row, with how many offers it has now. */
export type SupplierRow = Omit<Supplier, 'archivedAt'> & { archivedAt: Date | null };
/** An offer's row, with how many open buys draw on it. */
export type OfferRow = Omit<Offer, 'archivedAt' | 'updatedAt'> & {
  archivedAt: Date | null;
  updatedAt: Date;
};

function pick<K extends string, T extends Record<K, unknown>>(row: T, keys: readonly K[]) {
  return Object.fromEntries(keys.map((key) => [key, row[key]])) as Pick<T, K>;
}

const supplierKeys = Object.keys(SupplierBody.shape) as (keyof SupplierBody)[];
const offerKeys = Object.keys(OfferBody.shape) as (keyof OfferBody)[];

/** The fields of a supplier that people fill in. */
export function supplierFields(row: SupplierBody): SupplierBody {
  return pick(row, supplierKeys);
}

/** The fields of an offer that people fill in. */
export function offerFields(row: OfferBody): OfferBody {
  return pick(row, offerKeys);
}

/** A supplier for the wire. */
export function presentSupplier(row: SupplierRow): Supplier {
  return {
    ...supplierFields(row),
    id: row.id,
    isShelf: row.isShelf,
    archivedAt: row.archivedAt?.toISOString() ?? null,
    version: row.version,
    offers: row.offers,
  };
}

/** An offer for the wire. */
export function presentOffer(row: OfferRow): Offer {
  return {
    ...offerFields(row),
    id: row.id,
    supplierId: row.supplierId,
    openBuys: row.openBuys,
    archivedAt: row.archivedAt?.toISOString() ?? null,
    updatedAt: row.updatedAt.toISOString(),
    version: row.version,
  };
}
