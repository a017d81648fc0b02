import { shareOut } from '#shared/domain/shares/shareOut.ts';
import { shareRequestOf } from '#shared/domain/buys/requests.ts';
import { isIn, isPlaced } from '#shared/domain/orders/orderTypes.ts';
import { pricePacks } from '#shared/domain/packs/pricePacks.ts';
import { packRequestOf } from '#shared/domain/buys/requests.ts';
import { databaseNow, execute, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { By } from '../actorName.ts';
import type { ActorClub } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { cancelUnderLock } from '../buys/cancelBuy.ts';
import { changeTerms, pledgersOf } from '../buys/withBuy.ts';
import { clubMoney } from '../ledger/paymentWords.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { chosenPacks, quotedTerms } from './expectedShares.ts';
import { loadOrderBook, type OrderBook } from './orderBook.ts';
import { tellBuyChanged } from './tellBuy.ts';

async function writeOrderedSnapshot(buy: Buy, book: OrderBook, tx: Tx) {
  const terms = quotedTerms(book.terms, book.orders);
  const chosen = chosenPacks(book.orders);
  const request = shareRequestOf(terms, book.pledges, chosen);
  const sheet = shareOut(request);
  const price = pricePacks(packRequestOf(terms, book.pledges), chosen.packs);
  const shippingMinor = Object.values(chosen.shippingBySupplier).reduce((a, b) => a + b, 0);
  const plan = {
    feasible: true,
    exact: true,
    packs: chosen.packs,
    goodsMinor: price.goodsMinor,
    shippingMinor,
    shippingBySupplier: chosen.shippingBySupplier,
    totalMinor: price.goodsMinor + shippingMinor,
    leftOverMg: price.leftOverMg,
  };
  await execute(
    `insert into snapshots (buy_id, kind, terms_version, request, sheet, plan, terms)
     values (:buyId, 'ordered', :termsVersion, :request, :sheet, :plan, :terms)`,
    {
      buyId: buy.id,
      termsVersion: buy.termsVersion,
      request: JSON.stringify(request),
      sheet: JSON.stringify(sheet),
      plan: JSON.stringify(plan),
      terms: JSON.stringify(terms),
    },
    tx,
  );
  return sheet;
}

async function tellOrdered(
  buy: Buy,
  club: ActorClub,
  book: OrderBook,
  shares: ReadonlyMap<string, number>,
  tx: Tx,
): Promise<void> {
  const money = (minor: number) => clubMoney(club, minor);
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'ordered',
    eventKey: `buy:${buy.id}:ordered:${buy.termsVersion}`,
    to: await pledgersOf(buy.id, tx),
    content: (memberId) => {
      const locked = book.members.get(memberId)?.lockedMinor ?? 0;
      const share = shares.get(memberId) ?? 0;
      return {
        subject: `${buy.name} is ordered`,
        paragraphs: [
          'The order is out with every supplier.',
          share === locked
            ? `Your share is ${money(share)}, as it was locked.`
            : `Your share was ${money(locked)} when the buy was locked and is ${money(share)} at the prices ordered. The difference comes with your final share.`,
        ],
        action: { label: 'See the orders', path: `/c/${club.slug}/buys/${buy.id}/orders` },
      };
    },
  });
}

/**
 * Moves the buy on when its orders say so, under its lock: ordered once each is placed or failed, cancelled when all
 * failed.
 * @returns whether each order is arrived, short or failed, so that the buy may be `arrived`
 */
export async function moveOnByOrders(
  buy: Buy,
  club: ActorClub,
  by: By,
  tx: Tx,
): Promise<{ allIn: boolean }> {
  const book = await loadOrderBook(buy.id, tx);
  const { orders } = book;
  if (orders.every(({ state }) => state === 'failed')) {
    await cancelUnderLock(buy, 'No supplier could deliver.', by, tx);
    return { allIn: false };
  }
  if (
    buy.state === 'locked' &&
    orders.every(({ state }) => isPlaced(state) || state === 'failed')
  ) {
    buy.state = 'ordered';
    buy.orderedAt = await databaseNow(tx);
    await changeTerms(buy, 'The order is out with every supplier.', by, tx);
    const sheet = await writeOrderedSnapshot(buy, book, tx);
    const shares = new Map(sheet.members.map((member) => [member.memberId, member.totalMinor]));
    await tellOrdered(buy, club, book, shares, tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by,
      action: 'orders.ordered',
      subject: { type: 'buy', id: buy.id },
      before: { state: 'locked' },
      after: { state: 'ordered' },
    });
    tellBuyChanged(buy, 'state', tx);
  }
  return { allIn: orders.every(({ state }) => isIn(state)) };
}
