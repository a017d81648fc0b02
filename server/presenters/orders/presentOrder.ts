import { goodsOf } from '#shared/domain/orders/orderTypes.ts';
import type { OrderPack } from '#shared/domain/orders/orderTypes.ts';
import { offerPriceMinor } from '#shared/domain/buys/boughtPacks.ts';
import type { SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import type { OrderPackRow, SupplierOrder } from '#shared/schemas/orders.ts';
import type { BookOrder, OrderBook } from './book.ts';

/** How to reach a supplier. */
export interface SupplierContact {
  readonly email: string;
  readonly contact: string;
}

/** Packs of an order with the words of their salts and offers. */
export function presentPacks(terms: SheetTerms, packs: readonly OrderPack[]): OrderPackRow[] {
  return packs.map((pack) => {
    const line = terms.lines.find(({ id }) => id === pack.lineId);
    const offer = terms.offers.find(({ id }) => id === pack.offerId);
    return {
      offerId: pack.offerId,
      lineId: pack.lineId,
      salt: line?.salt.name ?? '',
      formula: line?.salt.formula ?? null,
      label: offer?.label ?? '',
      packs: pack.packs,
      packMg: pack.packMg,
      lockedMinor: offer ? offerPriceMinor(offer) : pack.priceMinor,
      priceMinor: pack.priceMinor,
    };
  });
}

/** A supplier's order as pages show it. */
export function presentOrder(
  book: OrderBook,
  order: BookOrder,
  contact: SupplierContact | undefined,
  billed: boolean,
): SupplierOrder {
  const supplier = book.terms.suppliers.find(({ id }) => id === order.supplierId);
  const goodsMinor = goodsOf(order.packs);
  return {
    id: order.id,
    supplierId: order.supplierId,
    supplierName: supplier?.name ?? '',
    supplierEmail: contact?.email ?? '',
    supplierContact: contact?.contact ?? '',
    isShelf: supplier?.isShelf ?? false,
    state: order.state,
    version: order.version,
    packs: presentPacks(book.terms, order.packs),
    goodsMinor,
    lockedShippingMinor: book.plan.shippingBySupplier[order.supplierId] ?? 0,
    shippingMinor: order.shippingMinor,
    totalMinor: goodsMinor + order.shippingMinor,
    quotedAt: order.quotedAt?.toISOString() ?? null,
    reference: order.reference,
    note: order.note,
    placedOn: order.placedOn,
    placedBy: order.placedBy,
    billed,
  };
}
