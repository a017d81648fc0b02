import type { BillBody } from '#shared/schemas/orders.ts';
import { isPlaced } from '#shared/domain/orders/orderTypes.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { checkNotAhead } from '../ledger/clubDay.ts';
import { invalid, notFound, stale, wrongState } from '../problem.ts';
import { billRows } from './billRows.ts';
import { loadOrderBook } from './orderBook.ts';
import { finalPosted } from './finalPosted.ts';
import { tellBuyChanged } from './tellBuy.ts';

/** States in which bills come in. */
export const billStates = ['locked', 'ordered', 'arrived', 'splitting', 'pickup'] as const;

interface BillValues {
  orderId: string | null;
  payee: string;
  number: string;
  billedOn: string;
  goods: string;
  charges: string;
  goodsMinor: number;
  chargesMinor: number;
  taxMinor: number;
  totalMinor: number;
  paidBy: 'club' | 'member';
  advancedById: string | null;
}

async function checkAdvancer(buy: Buy, body: BillBody, tx: Tx): Promise<string | null> {
  if (body.paidBy === 'club') return null;
  const [member] = await select<{ id: string }>(
    `select id from memberships where id = :id::uuid and club_id = :clubId and status <> 'pending'`,
    { id: body.advancedById, clubId: buy.clubId },
    tx,
  );
  if (!member) throw invalid({ advancedById: 'Choose who advanced the money.' });
  return member.id;
}

async function billValues(buy: Buy, body: BillBody, tx: Tx): Promise<BillValues> {
  const book = await loadOrderBook(buy.id, tx);
  const order = book.orders.find(({ supplierId }) => supplierId === body.supplierId);
  if (
    body.supplierId !== null &&
    (!order?.id || !(isPlaced(order.state) || order.state === 'failed'))
  ) {
    throw invalid({ supplierId: 'The order with this supplier is not placed yet.' });
  }
  const supplier = book.terms.suppliers.find(({ id }) => id === body.supplierId);
  if (supplier?.isShelf) throw invalid({ supplierId: 'The shelf sends no bill.' });
  if (body.supplierId === null && body.payee === '') throw invalid({ payee: 'Say who was paid.' });
  if (body.goods.length + body.charges.length === 0) {
    throw invalid({ goods: 'Enter what the bill is for.' });
  }
  await checkNotAhead(buy.clubId, body.billedOn, 'billedOn', tx);
  const { goods, charges } = billRows(book, body);
  const goodsMinor = goods.reduce((sum, { amountMinor }) => sum + amountMinor, 0);
  const chargesMinor = charges.reduce((sum, { amountMinor }) => sum + amountMinor, 0);
  const totalMinor = goodsMinor + chargesMinor;
  if (totalMinor <= 0) throw invalid({ goods: 'The bill must come to more than zero.' });
  if (body.taxMinor >= totalMinor) {
    throw invalid({ taxMinor: 'The tax contained must be less than the total.' });
  }
  return {
    orderId: order?.id ?? null,
    payee: body.supplierId === null ? body.payee : '',
    number: body.number,
    billedOn: body.billedOn,
    goods: JSON.stringify(goods),
    charges: JSON.stringify(charges),
    goodsMinor,
    chargesMinor,
    taxMinor: body.taxMinor,
    totalMinor,
    paidBy: body.paidBy,
    advancedById: await checkAdvancer(buy, body, tx),
  };
}

async function audit(actor: BuyActor, buy: Buy, action: string, id: string, v: BillValues, tx: Tx) {
  await writeAudit(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    by: byActor(actor),
    action,
    subject: { type: 'bill', id },
    after: { number: v.number, billedOn: v.billedOn, totalMinor: v.totalMinor, paidBy: v.paidBy },
  });
  tellBuyChanged(buy, 'terms', tx);
}

/** An organiser types a bill in; it counts for the shares at once, and is posted when a treasurer confirms it. */
export async function enterBill(actor: BuyActor, body: BillBody): Promise<{ id: string }> {
  return withBuy(actor.buy.id, { states: billStates }, async (buy, tx) => {
    const values = await billValues(buy, body, tx);
    const [row] = await select<{ id: string }>(
      `insert into bills (buy_id, supplier_order_id, payee, number, billed_on, lines, charges, goods_minor,
          charges_minor, tax_minor, total_minor, paid_by, advanced_by_id, entered_by_id)
       values (:buyId, :orderId, :payee, :number, :billedOn, :goods, :charges, :goodsMinor, :chargesMinor, :taxMinor,
          :totalMinor, :paidBy, :advancedById, :byId) returning id`,
      { ...values, buyId: buy.id, byId: actor.membershipId },
      tx,
    );
    if (!row) throw new Error('bill missing');
    await audit(actor, buy, 'bills.enter', row.id, values, tx);
    return row;
  });
}

/** A bill of the buy, locked, at the version that was seen. */
export async function lockBill(
  buy: Buy,
  billId: string,
  version: number,
  tx: Tx,
): Promise<{ confirmedAt: Date | null; voidedAt: Date | null }> {
  const [row] = await select<{
    version: number;
    confirmedAt: Date | null;
    voidedAt: Date | null;
  }>(
    `select version, confirmed_at as "confirmedAt", voided_at as "voidedAt" from bills
     where id = :billId and buy_id = :buyId for no key update`,
    { billId, buyId: buy.id },
    tx,
  );
  if (!row) throw notFound('This bill');
  if (row.version !== version) {
    throw stale('This bill has changed since you opened it. Look at it again.', {
      version: row.version,
    });
  }
  if (row.voidedAt) throw wrongState('This bill is void.');
  return row;
}

/** Corrects a bill that no treasurer has confirmed and no final share rests on. */
export async function changeBill(actor: BuyActor, billId: string, body: BillBody): Promise<void> {
  await withBuy(actor.buy.id, { states: billStates }, async (buy, tx) => {
    const bill = await lockBill(buy, billId, body.version, tx);
    if (bill.confirmedAt) throw wrongState('A treasurer has confirmed this bill already.');
    if (await finalPosted(buy.id, tx)) {
      throw wrongState('The final shares rest on this bill. Enter another for the difference.');
    }
    const values = await billValues(buy, body, tx);
    await execute(
      `update bills set supplier_order_id = :orderId, payee = :payee, number = :number, billed_on = :billedOn,
         lines = :goods, charges = :charges, goods_minor = :goodsMinor, charges_minor = :chargesMinor,
         tax_minor = :taxMinor, total_minor = :totalMinor, paid_by = :paidBy, advanced_by_id = :advancedById,
         version = version + 1, updated_at = now()
       where id = :billId`,
      { ...values, billId },
      tx,
    );
    await audit(actor, buy, 'bills.change', billId, values, tx);
  });
}
