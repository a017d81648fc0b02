import { goodsOf, type OrderPack } from '#shared/domain/orders/orderTypes.ts';
import { execute, type Tx } from '../../config/database.ts';
import { stale } from '../problem.ts';
import type { BookOrder } from './orderBook.ts';

/** @throws DomainProblem 409 `stale` when the order was changed since it was seen */
export function checkOrderVersion(order: BookOrder, version: number): void {
  if (order.version !== version) {
    throw stale('This order has changed since you opened it. Look at it again.', {
      version: order.version,
      state: order.state,
    });
  }
}

/** Writes an order's state, packs and prices, one version on; the buy's lock is held. */
export async function saveOrder(
  buyId: string,
  order: BookOrder,
  fields: Partial<{
    state: BookOrder['state'];
    packs: readonly OrderPack[];
    shippingMinor: number;
    note: string;
    reference: string;
    quotedById: string;
    placedOn: string;
    placedById: string;
  }>,
  tx: Tx,
): Promise<void> {
  const packs = fields.packs ?? order.packs;
  await execute(
    `insert into supplier_orders (buy_id, supplier_id, state, packs, goods_minor, shipping_minor, note, reference,
        quoted_at, quoted_by_id, placed_at, placed_on, placed_by_id)
     values (:buyId, :supplierId, :state, :packs, :goodsMinor, :shippingMinor, :note, :reference,
        case when :quotedById::uuid is not null then clock_timestamp() end, :quotedById::uuid,
        case when :placedById::uuid is not null then clock_timestamp() end, :placedOn, :placedById::uuid)
     on conflict (buy_id, supplier_id) do update set state = excluded.state, packs = excluded.packs,
        goods_minor = excluded.goods_minor, shipping_minor = excluded.shipping_minor, note = excluded.note,
        reference = excluded.reference, quoted_at = coalesce(excluded.quoted_at, supplier_orders.quoted_at),
        quoted_by_id = coalesce(excluded.quoted_by_id, supplier_orders.quoted_by_id),
        placed_at = coalesce(supplier_orders.placed_at, excluded.placed_at),
        placed_on = coalesce(excluded.placed_on, supplier_orders.placed_on),
        placed_by_id = coalesce(supplier_orders.placed_by_id, excluded.placed_by_id),
        version = supplier_orders.version + 1, updated_at = now()`,
    {
      buyId,
      supplierId: order.supplierId,
      state: fields.state ?? order.state,
      packs: JSON.stringify(packs),
      goodsMinor: goodsOf(packs),
      shippingMinor: fields.shippingMinor ?? order.shippingMinor,
      note: fields.note ?? order.note,
      reference: fields.reference ?? order.reference,
      quotedById: fields.quotedById ?? null,
      placedOn: fields.placedOn ?? null,
      placedById: fields.placedById ?? null,
    },
    tx,
  );
}
