import { goodsOf } from '#shared/domain/orders/orderTypes.ts';
import type { Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { By } from '../actorName.ts';
import type { ActorClub } from '../actors.ts';
import { clubToday } from '../ledger/clubDay.ts';
import { postTransaction } from '../ledger/postTransaction.ts';
import { reverseTransaction, transactionsOf } from '../ledger/reverseTransaction.ts';
import { drawFromShelf, mergePostings, returnToShelf } from '../pickup/shelfDraws.ts';
import { syncShelfSupplier } from '../pickup/syncShelfSupplier.ts';
import type { BookOrder } from './orderBook.ts';

/**
 * What a buy takes from the club's shelf leaves its lots and costs what it was priced at: no bill comes for it.
 * @throws DomainProblem 409 when less is left than the plan takes
 */
export async function postShelfOrder(
  buy: Buy,
  club: ActorClub,
  order: BookOrder,
  onDate: string,
  by: By,
  tx: Tx,
): Promise<void> {
  const drawn = await drawFromShelf(buy, order, tx);
  const amountMinor = goodsOf(order.packs) + order.shippingMinor;
  await postTransaction(tx, {
    clubId: buy.clubId,
    eventType: 'shelf_order',
    eventId: `${buy.id}:${order.supplierId}`,
    onDate,
    memo: `From the shelf for ${buy.name}`,
    buyId: buy.id,
    by,
    postings: mergePostings([
      { account: { kind: 'buy', refId: buy.id }, amountMinor },
      ...drawn,
      { account: { kind: 'losses' }, amountMinor: 0 - order.shippingMinor },
    ]),
  });
  await syncShelfSupplier(club, by, tx);
}

/** Gives it back to the shelf when that order fails. */
export async function returnShelfOrder(
  buy: Buy,
  club: ActorClub,
  order: BookOrder,
  reason: string,
  by: By,
  tx: Tx,
): Promise<void> {
  const onDate = await clubToday(buy.clubId, tx);
  const events = [['shelf_order', `${buy.id}:${order.supplierId}`]] as const;
  for (const transactionId of await transactionsOf(buy.clubId, events, tx)) {
    await reverseTransaction(tx, { transactionId, onDate, reason, by });
  }
  await returnToShelf(buy.id, order.supplierId, tx);
  await syncShelfSupplier(club, by, tx);
}
