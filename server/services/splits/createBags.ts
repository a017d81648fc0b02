import { select, type Tx } from '../../config/database.ts';
import type { OrderPack } from '#shared/domain/orders/orderTypes.ts';
import { lotsOfOrder } from '../pickup/shelfDraws.ts';

/**
 * One row for each pack of an order: those that came, those that are missing, and those beyond what was ordered. What was
 * taken from the shelf is one bag for each lot.
 * Numbers go on from the line's last bag.
 * @returns ids of the new bags
 */
export async function createBags(
  buyId: string,
  order: { id: string; packs: readonly OrderPack[] },
  received: ReadonlyMap<string, number>,
  tx: Tx,
): Promise<string[]> {
  const last = new Map(
    (
      await select<{ line_id: string; number: number }>(
        'select line_id, max(number) as number from bags where buy_id = :buyId group by line_id',
        { buyId },
        tx,
      )
    ).map((row) => [row.line_id, row.number]),
  );
  const ids: string[] = [];
  const lots = await lotsOfOrder(buyId, order.id, tx);
  for (const { offerId, lineId, packs, packMg } of order.packs) {
    const came = received.get(offerId) ?? packs;
    const taken = came === packs ? lots.get(offerId) : undefined;
    for (const { mg, lot } of taken ?? []) {
      const number = (last.get(lineId) ?? 0) + 1;
      last.set(lineId, number);
      const [bag] = await select<{ id: string }>(
        `insert into bags (buy_id, line_id, supplier_order_id, offer_id, number, nominal_mg, lot)
         values (:buyId, :lineId, :orderId, :offerId, :number, :mg, :lot) returning id`,
        { buyId, lineId, orderId: order.id, offerId, number, mg, lot },
        tx,
      );
      if (bag) ids.push(bag.id);
    }
    if (taken) continue;
    for (let index = 0; index < Math.max(packs, came); index += 1) {
      const number = (last.get(lineId) ?? 0) + 1;
      last.set(lineId, number);
      const [bag] = await select<{ id: string }>(
        `insert into bags (buy_id, line_id, supplier_order_id, offer_id, number, nominal_mg, missing, extra)
         values (:buyId, :lineId, :orderId, :offerId, :number, :packMg, :missing, :extra) returning id`,
        {
          buyId,
          lineId,
          orderId: order.id,
          offerId,
          number,
          packMg,
          missing: index >= came,
          extra: index >= packs,
        },
        tx,
      );
      if (bag) ids.push(bag.id);
    }
  }
  return ids;
}

/** Gives an order that came without its packs being counted one bag for each pack ordered. */
export async function createUncountedBags(buyId: string, tx: Tx): Promise<void> {
  const orders = await select<{ id: string; packs: OrderPack[] }>(
    `select o.id, o.packs from supplier_orders o where o.buy_id = :buyId and o.state in ('arrived', 'short')
       and not exists (select 1 from bags b where b.supplier_order_id = o.id) order by o.id`,
    { buyId },
    tx,
  );
  for (const order of orders) await createBags(buyId, order, new Map(), tx);
}

/** Whether the packs of an order are all there, in bags that are not missing. */
export async function orderIsComplete(orderId: string, tx: Tx): Promise<boolean> {
  const [row] = await select<{ missing: number }>(
    'select count(*)::int as missing from bags where supplier_order_id = :orderId and missing',
    { orderId },
    tx,
  );
  return row?.missing === 0;
}
