import type { PlaceOrderBody } from '#shared/schemas/orders.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { checkNotAhead } from '../ledger/clubDay.ts';
import { DomainProblem, wrongState } from '../problem.ts';
import { expectedShares, nothingBilled, orderFacts } from './expectedShares.ts';
import { moveOnByOrders } from './moveOn.ts';
import { loadOrderBook, orderWith } from './orderBook.ts';
import { applyPriceLimit } from './priceLimit.ts';
import { checkOrderVersion, saveOrder } from './saveOrder.ts';
import { postShelfOrder } from './shelfOrder.ts';
import { tellBuyChanged } from './tellBuy.ts';
import { nameSome, whoWaits } from './whoWaits.ts';

/**
 * Places the order with one supplier. Before it each member has paid or is vouched for, and whoever's share rose past
 * the price limit has agreed. With the last one placed the buy is ordered.
 * @throws DomainProblem 409 `unpaid`, `price_limit`, `stale` or `wrong_state`
 */
export async function placeOrder(
  actor: BuyActor,
  supplierId: string,
  body: PlaceOrderBody,
): Promise<void> {
  const { termsVersion } = body;
  const by = byActor(actor);
  await withBuy(actor.buy.id, { states: ['locked'], termsVersion }, async (buy, tx) => {
    const book = await loadOrderBook(buy.id, tx);
    const order = orderWith(book, supplierId);
    checkOrderVersion(order, body.version);
    if (order.state !== 'draft') throw wrongState('This order is placed already.');
    await checkNotAhead(buy.clubId, body.placedOn, 'placedOn', tx);

    // The shares may have moved with another supplier's order since they were last looked at.
    await applyPriceLimit(buy, actor.club, book, expectedShares(book, nothingBilled), tx);
    const { unpaid, overLimit } = await whoWaits(buy.id, await loadOrderBook(buy.id, tx), tx);
    if (overLimit.length > 0) {
      throw new DomainProblem(
        409,
        'price_limit',
        `The order waits: ${nameSome(overLimit)} must first agree to the higher share, or leave.`,
        { current: overLimit.map(({ id, name }) => ({ id, name })) },
      );
    }
    if (unpaid.length > 0) {
      throw new DomainProblem(
        409,
        'unpaid',
        `The order waits: ${nameSome(unpaid)} has not paid. Vouch for each or drop them first.`,
        { current: unpaid.map(({ id, name }) => ({ id, name })) },
      );
    }

    await saveOrder(
      buy.id,
      order,
      {
        state: 'placed',
        reference: body.reference,
        note: body.note,
        placedOn: body.placedOn,
        placedById: actor.membershipId,
      },
      tx,
    );
    if (orderFacts(book.terms, order).isShelf) {
      await postShelfOrder(buy, actor.club, order, body.placedOn, by, tx);
    }
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by,
      action: 'orders.place',
      subject: { type: 'supplier_order', id: supplierId },
      after: { placedOn: body.placedOn, reference: body.reference, packs: order.packs },
    });
    await moveOnByOrders(buy, actor.club, by, tx);
    tellBuyChanged(buy, 'terms', tx);
  });
}
