import type { LossBody, SupplierRefundBody } from '#shared/schemas/orders.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { checkNotAhead, clubToday } from '../ledger/clubDay.ts';
import { postTransaction } from '../ledger/postTransaction.ts';
import { reverseTransaction, transactionsOf } from '../ledger/reverseTransaction.ts';
import { invalid, notFound, wrongState } from '../problem.ts';
import { finalPosted } from './finalPosted.ts';
import { billStates } from './enterBill.ts';
import { tellBuyChanged } from './tellBuy.ts';

const refundStates = [...billStates, 'cancelled'] as const;

async function orderOf(
  buy: Buy,
  supplierId: string,
  tx: Tx,
): Promise<{ id: string; name: string }> {
  const [order] = await select<{ id: string; name: string }>(
    `select o.id, s.name from supplier_orders o join suppliers s on s.id = o.supplier_id
     where o.buy_id = :buyId and o.supplier_id = :supplierId and o.state <> 'draft'`,
    { buyId: buy.id, supplierId },
    tx,
  );
  if (!order) throw invalid({ supplierId: 'Nothing was ordered from this supplier.' });
  return order;
}

/** A treasurer records money that a supplier gave back; it lowers what the buy costs. The same key records once. */
export async function recordSupplierRefund(
  actor: BuyActor,
  body: SupplierRefundBody,
): Promise<{ id: string }> {
  return withBuy(actor.buy.id, { states: refundStates }, async (buy, tx) => {
    const order = await orderOf(buy, body.supplierId, tx);
    await checkNotAhead(buy.clubId, body.receivedOn, 'receivedOn', tx);
    const [row] = await select<{ id: string }>(
      `insert into supplier_refunds (buy_id, supplier_order_id, amount_minor, received_on, into_account, reference,
          recorded_by_id, idempotency_key)
       values (:buyId, :orderId, :amountMinor, :receivedOn, :into, :reference, :byId, :key)
       on conflict (buy_id, idempotency_key) do nothing returning id`,
      { ...body, buyId: buy.id, orderId: order.id, byId: actor.membershipId },
      tx,
    );
    if (!row) return getByKey('supplier_refunds', buy.id, body.key, tx);
    await postTransaction(tx, {
      clubId: buy.clubId,
      eventType: 'supplier_refund',
      eventId: row.id,
      onDate: body.receivedOn,
      memo: `Refund of ${order.name}`,
      buyId: buy.id,
      by: byActor(actor),
      postings: [
        { account: { kind: body.into }, amountMinor: body.amountMinor },
        { account: { kind: 'buy', refId: buy.id }, amountMinor: 0 - body.amountMinor },
      ],
    });
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'orders.supplier_refund',
      subject: { type: 'supplier_order', id: order.id },
      after: { amountMinor: body.amountMinor, supplier: order.name },
    });
    tellBuyChanged(buy, 'terms', tx);
    return row;
  });
}

async function getByKey(
  table: 'supplier_refunds' | 'buy_losses',
  buyId: string,
  key: string,
  tx: Tx,
): Promise<{ id: string }> {
  const [row] = await select<{ id: string }>(
    `select id from ${table} where buy_id = :buyId and idempotency_key = :key`,
    { buyId, key },
    tx,
  );
  if (!row) throw new Error('row of this key missing');
  return row;
}

/** A treasurer takes part of what a buy costs to the club's losses, before the shares are final. */
export async function bookLoss(actor: BuyActor, body: LossBody): Promise<{ id: string }> {
  return withBuy(actor.buy.id, { states: refundStates }, async (buy, tx) => {
    if (await finalPosted(buy.id, tx)) {
      throw wrongState('The final shares are posted: book what is left on the buy instead.');
    }
    const order = body.supplierId ? await orderOf(buy, body.supplierId, tx) : null;
    const [row] = await select<{ id: string }>(
      `insert into buy_losses (buy_id, supplier_order_id, amount_minor, reason, booked_by_id, idempotency_key)
       values (:buyId, :orderId, :amountMinor, :reason, :byId, :key)
       on conflict (buy_id, idempotency_key) do nothing returning id`,
      {
        buyId: buy.id,
        orderId: order?.id ?? null,
        amountMinor: body.amountMinor,
        reason: body.reason,
        byId: actor.membershipId,
        key: body.key,
      },
      tx,
    );
    if (!row) return getByKey('buy_losses', buy.id, body.key, tx);
    await postTransaction(tx, {
      clubId: buy.clubId,
      eventType: 'buy_loss',
      eventId: row.id,
      onDate: await clubToday(buy.clubId, tx),
      memo: body.reason,
      buyId: buy.id,
      by: byActor(actor),
      postings: [
        { account: { kind: 'losses' }, amountMinor: body.amountMinor },
        { account: { kind: 'buy', refId: buy.id }, amountMinor: 0 - body.amountMinor },
      ],
    });
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'orders.loss',
      subject: { type: 'buy', id: buy.id },
      after: { amountMinor: body.amountMinor, reason: body.reason },
    });
    tellBuyChanged(buy, 'terms', tx);
    return row;
  });
}

/** Takes a supplier's refund or a loss back, before the shares are final. */
export async function reverseSupplierMoney(
  actor: BuyActor,
  what: 'supplier_refunds' | 'buy_losses',
  id: string,
  reason: string,
): Promise<void> {
  await withBuy(actor.buy.id, { states: refundStates }, async (buy, tx) => {
    const [row] = await select<{ reversed_at: Date | null }>(
      `select reversed_at from ${what} where id = :id and buy_id = :buyId for no key update`,
      { id, buyId: buy.id },
      tx,
    );
    if (!row) throw notFound('This entry');
    if (row.reversed_at) throw wrongState('This entry is reversed already.');
    if (await finalPosted(buy.id, tx)) {
      throw wrongState('The final shares rest on this entry.');
    }
    const onDate = await clubToday(buy.clubId, tx);
    const event = [what === 'supplier_refunds' ? 'supplier_refund' : 'buy_loss', id] as const;
    for (const transactionId of await transactionsOf(buy.clubId, [event], tx)) {
      await reverseTransaction(tx, { transactionId, onDate, reason, by: byActor(actor) });
    }
    await execute(`update ${what} set reversed_at = clock_timestamp() where id = :id`, { id }, tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'orders.reverse_entry',
      subject: { type: what, id },
      after: { reason },
    });
    tellBuyChanged(buy, 'terms', tx);
  });
}
