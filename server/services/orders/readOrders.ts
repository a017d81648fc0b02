import type { OrdersReply } from '#shared/schemas/orders.ts';
import { Buy } from '../../models/Buy.ts';
import { canOrder, canSeeMoneyOfBuy } from '../../policies/orders.ts';
import { presentOrder } from '../../presenters/orders/presentOrder.ts';
import type { BuyActor } from '../actors.ts';
import { expectedShares, shareChanges } from './expectedShares.ts';
import { knownCosts } from './findBills.ts';
import { loadOrderBook } from './orderBook.ts';
import { supplierContacts } from './supplierContacts.ts';
import { whoWaits } from './whoWaits.ts';

const nameOnly = ({ id, name }: { id: string; name: string }) => ({ id, name });

/** A buy's orders, and what the prices known now make of each share. */
export async function readOrders(actor: BuyActor): Promise<OrdersReply> {
  const buy = await Buy.findByPk(actor.buy.id, { rejectOnEmpty: true });
  const book = await loadOrderBook(buy.id);
  const known = await knownCosts(buy.id);
  const seesMoney = canSeeMoneyOfBuy(actor);
  const contacts = seesMoney
    ? await supplierContacts(book.orders.map(({ supplierId }) => supplierId))
    : new Map<string, never>();
  const billed = new Set(
    known.bills.flatMap(({ supplierId, goods }) => (goods.length > 0 ? [supplierId] : [])),
  );
  const locked = new Map(
    [...book.members.values()].map(({ id, lockedMinor }) => [id, lockedMinor]),
  );
  const shares = shareChanges(book, locked, expectedShares(book, known), buy.priceLimitPermille);
  const waits = seesMoney ? await whoWaits(buy.id, book) : { unpaid: [], overLimit: [] };
  return {
    state: buy.state,
    termsVersion: buy.termsVersion,
    priceLimitPermille: buy.priceLimitPermille,
    orders: book.orders.map((order) =>
      presentOrder(book, order, contacts.get(order.supplierId), billed.has(order.supplierId)),
    ),
    shares: seesMoney ? shares : [],
    mine: shares.find(({ memberId }) => memberId === actor.membershipId) ?? null,
    waits: { unpaid: waits.unpaid.map(nameOnly), overLimit: waits.overLimit.map(nameOnly) },
    may: { order: canOrder(actor), seeSheets: seesMoney },
  };
}
