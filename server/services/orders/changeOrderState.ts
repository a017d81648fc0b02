import { nextOrderStates, type OrderState } from '#shared/domain/orders/orderTypes.ts';
import type { OrderStateBody } from '#shared/schemas/orders.ts';
import type { Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { By } from '../actorName.ts';
import type { ActorClub, BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { invalid, wrongState } from '../problem.ts';
import { orderFacts } from './expectedShares.ts';
import { moveOnByOrders } from './moveOn.ts';
import { loadOrderBook, orderWith } from './orderBook.ts';
import { checkOrderVersion, saveOrder } from './saveOrder.ts';
import { returnShelfOrder } from './shelfOrder.ts';
import { tellBuyChanged } from './tellBuy.ts';

const words: Record<OrderState, string> = {
  draft: 'not placed',
  placed: 'placed',
  confirmed: 'confirmed',
  arrived: 'arrived',
  short: 'arrived short',
  failed: 'failed',
};

/**
 * The one place where a supplier's order changes its state, under the buy's lock, whose states the caller checked. When
 * all failed, the buy is cancelled.
 * @returns whether each order of the buy is arrived, short or failed
 * @throws DomainProblem 409 `stale` or `wrong_state`
 */
export async function changeOrderState(
  buy: Buy,
  club: ActorClub,
  change: { supplierId: string; version: number; state: OrderState; note: string },
  by: By,
  tx: Tx,
): Promise<{ allIn: boolean }> {
  const book = await loadOrderBook(buy.id, tx);
  const order = orderWith(book, change.supplierId);
  checkOrderVersion(order, change.version);
  if (!nextOrderStates(order.state).includes(change.state)) {
    throw wrongState(
      `This order is ${words[order.state]}; it can't become ${words[change.state]}.`,
      { version: order.version, state: order.state },
    );
  }
  const { note } = change;
  await saveOrder(buy.id, order, { state: change.state, ...(note ? { note } : {}) }, tx);
  if (change.state === 'failed' && orderFacts(book.terms, order).isShelf) {
    await returnShelfOrder(buy, club, order, note || 'The shelf could not deliver.', by, tx);
  }
  await writeAudit(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    by,
    action: `orders.${change.state}`,
    subject: { type: 'supplier_order', id: change.supplierId },
    before: { state: order.state },
    after: { state: change.state, note },
  });
  const moved = await moveOnByOrders(buy, club, by, tx);
  tellBuyChanged(buy, 'terms', tx);
  return moved;
}

/** An organiser marks a supplier's order as confirmed or failed; arrivals are marked where the bags are counted. */
export async function markOrder(
  actor: BuyActor,
  supplierId: string,
  body: OrderStateBody,
): Promise<void> {
  if (body.state === 'failed' && body.note.length < 3) {
    throw invalid({ note: 'Say what happened, in a few words.' });
  }
  await withBuy(actor.buy.id, { states: ['locked', 'ordered'] }, (buy, tx) =>
    changeOrderState(buy, actor.club, { supplierId, ...body }, byActor(actor), tx),
  );
}
