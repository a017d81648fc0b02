import type { QuoteBody, QuoteEffect } from '#shared/schemas/orders.ts';
import type { OrderPack } from '#shared/domain/orders/orderTypes.ts';
import { goodsOf } from '#shared/domain/orders/orderTypes.ts';
import type { BuyActor } from '../actors.ts';
import { Buy } from '../../models/Buy.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, changeTerms, withBuy } from '../buys/withBuy.ts';
import { clubMoney } from '../ledger/paymentWords.ts';
import { invalid, wrongState } from '../problem.ts';
import { expectedShares, nothingBilled, shareChanges } from './expectedShares.ts';
import { loadOrderBook, orderWith, type BookOrder, type OrderBook } from './orderBook.ts';
import { applyPriceLimit } from './priceLimit.ts';
import { checkOrderVersion, saveOrder } from './saveOrder.ts';
import { tellBuyChanged } from './tellBuy.ts';

type Quote = Pick<QuoteBody, 'prices' | 'shippingMinor'>;

/** @throws DomainProblem 422 at `prices.N.offerId` for an offer that isn't in the order */
function quotedPacks(order: BookOrder, { prices }: Quote): OrderPack[] {
  const offers = new Set(order.packs.map(({ offerId }) => offerId));
  prices.forEach(({ offerId }, index) => {
    if (!offers.has(offerId)) {
      throw invalid({ [`prices.${index}.offerId`]: 'This pack is not in the order.' });
    }
  });
  const byOffer = new Map(prices.map(({ offerId, priceMinor }) => [offerId, priceMinor]));
  return order.packs.map((pack) => ({
    ...pack,
    priceMinor: byOffer.get(pack.offerId) ?? pack.priceMinor,
  }));
}

function withQuote(book: OrderBook, supplierId: string, quote: Quote): OrderBook {
  const order = orderWith(book, supplierId);
  if (order.state !== 'draft') throw wrongState('This order is placed already.');
  const quoted: BookOrder = {
    ...order,
    packs: quotedPacks(order, quote),
    shippingMinor: quote.shippingMinor,
  };
  return {
    ...book,
    orders: book.orders.map((each) => (each.supplierId === supplierId ? quoted : each)),
  };
}

const totalOf = (orders: readonly BookOrder[]) =>
  orders.reduce(
    (sum, order) =>
      sum + (order.state === 'failed' ? 0 : goodsOf(order.packs) + order.shippingMinor),
    0,
  );

/** What a supplier's real prices would do to every share; writes nothing. */
export async function checkQuote(
  actor: BuyActor,
  supplierId: string,
  quote: Quote,
): Promise<QuoteEffect> {
  const book = await loadOrderBook(actor.buy.id);
  const buy = await Buy.findByPk(actor.buy.id, { rejectOnEmpty: true });
  const after = withQuote(book, supplierId, quote);
  const shares = shareChanges(
    book,
    expectedShares(book, nothingBilled),
    expectedShares(after, nothingBilled),
    buy.priceLimitPermille,
  );
  return {
    shares,
    oldTotalMinor: totalOf(book.orders),
    newTotalMinor: totalOf(after.orders),
    mustAgree: shares.filter(({ overLimit, agreed }) => overLimit && !agreed).length,
  };
}

/**
 * Takes over the prices a supplier quoted before its order goes out. Whoever's share rises past the price limit has to
 * agree, or leave, before any order is placed.
 */
export async function setQuote(
  actor: BuyActor,
  supplierId: string,
  body: QuoteBody,
): Promise<void> {
  const { version, termsVersion, ...quote } = body;
  await withBuy(actor.buy.id, { states: ['locked'], termsVersion }, async (buy, tx) => {
    const book = await loadOrderBook(buy.id, tx);
    const order = orderWith(book, supplierId);
    checkOrderVersion(order, version);
    const after = withQuote(book, supplierId, quote);
    const quoted = orderWith(after, supplierId);
    await saveOrder(
      buy.id,
      order,
      {
        packs: quoted.packs,
        shippingMinor: quoted.shippingMinor,
        quotedById: actor.membershipId,
      },
      tx,
    );
    const [oldTotal, newTotal] = [totalOf([order]), totalOf([quoted])];
    const supplier = book.terms.suppliers.find(({ id }) => id === supplierId)?.name ?? '';
    if (oldTotal !== newTotal) {
      await changeTerms(
        buy,
        `${supplier} quoted ${clubMoney(actor.club, newTotal)} instead of ${clubMoney(actor.club, oldTotal)}.`,
        byActor(actor),
        tx,
      );
    }
    await applyPriceLimit(buy, actor.club, after, expectedShares(after, nothingBilled), tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'orders.quote',
      subject: { type: 'supplier_order', id: supplierId },
      before: { packs: order.packs, shippingMinor: order.shippingMinor },
      after: { packs: quoted.packs, shippingMinor: quoted.shippingMinor },
    });
    tellBuyChanged(buy, 'terms', tx);
  });
}
