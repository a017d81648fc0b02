import type { BillReply, BillsReply } from '#shared/schemas/orders.ts';
import { select } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import { canCloseBuy, canEnterBills } from '../../policies/orders.ts';
import type { BuyActor } from '../actors.ts';
import { expectedShares, shareChanges } from './expectedShares.ts';
import { findBills, knownCosts, type BillRow } from './findBills.ts';
import { loadOrderBook, type OrderBook } from './orderBook.ts';

const person = (id: string | null, name: string | null) => (id && name ? { id, name } : null);

function presentBill(book: OrderBook, row: BillRow): BillReply {
  return {
    id: row.id,
    version: row.version,
    supplierId: row.supplierId,
    payee: book.terms.suppliers.find(({ id }) => id === row.supplierId)?.name ?? row.payee,
    number: row.number,
    billedOn: row.billedOn,
    goods: row.goods.map((goods) => {
      const offer = book.terms.offers.find(({ id }) => id === goods.offerId);
      const line = book.terms.lines.find(({ id }) => id === goods.lineId);
      return {
        ...goods,
        salt: line?.salt.name ?? '',
        label: offer?.label ?? '',
        packMg: offer?.packMg ?? 0,
      };
    }),
    charges: row.charges.map(({ kind, name, amountMinor, taxRatePpm, chargeId, basis }) => ({
      kind,
      name,
      amountMinor,
      taxRatePpm,
      chargeId,
      basis,
    })),
    goodsMinor: row.goodsMinor,
    chargesMinor: row.chargesMinor,
    taxMinor: row.taxMinor,
    totalMinor: row.totalMinor,
    paidBy: row.paidBy,
    advancedBy: person(row.advancedById, row.advancedByName),
    enteredBy: { id: row.enteredById, name: row.enteredByName },
    confirmedBy: person(row.confirmedById, row.confirmedByName),
    confirmedAt: row.confirmedAt?.toISOString() ?? null,
    voidedAt: row.voidedAt?.toISOString() ?? null,
    voidedReason: row.voidedReason,
  };
}

/** A buy's bills, supplier refunds and losses, the planned costs no bill has yet, and what all that makes of each share. */
export async function readBills(actor: BuyActor): Promise<BillsReply> {
  const buy = await Buy.findByPk(actor.buy.id, { rejectOnEmpty: true });
  const book = await loadOrderBook(buy.id);
  const [rows, known] = [await findBills(buy.id), await knownCosts(buy.id)];
  const refunds = await select<
    Omit<BillsReply['refunds'][number], 'reversedAt'> & { at: Date | null }
  >(
    `select r.id, o.supplier_id as "supplierId", s.name as "supplierName", r.amount_minor as "amountMinor",
        r.received_on as "receivedOn", r.reference, r.reversed_at as at
     from supplier_refunds r join supplier_orders o on o.id = r.supplier_order_id
     join suppliers s on s.id = o.supplier_id where r.buy_id = :buyId order by r.created_at`,
    { buyId: buy.id },
  );
  const losses = await select<
    Omit<BillsReply['losses'][number], 'reversedAt'> & { at: Date | null }
  >(
    `select l.id, s.name as "supplierName", l.amount_minor as "amountMinor", l.reason, l.reversed_at as at
     from buy_losses l left join supplier_orders o on o.id = l.supplier_order_id
     left join suppliers s on s.id = o.supplier_id where l.buy_id = :buyId order by l.created_at`,
    { buyId: buy.id },
  );
  const billed = new Set(
    known.bills.flatMap(({ charges }) => charges.map(({ chargeId }) => chargeId)),
  );
  const locked = new Map(
    [...book.members.values()].map(({ id, lockedMinor }) => [id, lockedMinor]),
  );
  return {
    bills: rows.map((row) => presentBill(book, row)),
    refunds: refunds.map(({ at, ...row }) => ({ ...row, reversedAt: at?.toISOString() ?? null })),
    losses: losses.map(({ at, ...row }) => ({ ...row, reversedAt: at?.toISOString() ?? null })),
    plannedCharges: book.terms.charges.map(
      ({ id, kind, name, supplierId, amountMinor, taxRatePpm }) => ({
        id,
        kind,
        name,
        supplierId,
        amountMinor,
        taxRatePpm,
        billed: billed.has(id),
      }),
    ),
    taxRates: book.terms.offers.map(({ id, taxRatePpm }) => ({ offerId: id, taxRatePpm })),
    shares: shareChanges(book, locked, expectedShares(book, known), buy.priceLimitPermille),
    may: { enter: canEnterBills(actor), confirm: canCloseBuy(actor) },
  };
}
