import type { OrderPack } from '#shared/domain/orders/orderTypes.ts';
import type { ArrivalBody, SplitChange } from '#shared/schemas/splits.ts';
import { select } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { changeOrderState } from '../orders/changeOrderState.ts';
import { invalid, wrongState } from '../problem.ts';
import { changeSplit } from './changeSplit.ts';
import { createBags } from './createBags.ts';

/**
 * An organiser says that a supplier's order has come and how many packs of each offer: the order is arrived, or short
 * when some are missing, and each pack gets its bag.
 * @throws DomainProblem 409 when it has come already, 422 when nothing came or an offer isn't in the order
 */
export async function recordArrival(
  actor: BuyActor,
  supplierId: string,
  body: ArrivalBody,
): Promise<SplitChange> {
  return withBuy(actor.buy.id, { states: ['locked', 'ordered'] }, async (buy, tx) => {
    const [order] = await select<{ id: string; state: string; packs: OrderPack[] }>(
      'select id, state, packs from supplier_orders where buy_id = :buyId and supplier_id = :supplierId',
      { buyId: buy.id, supplierId },
      tx,
    );
    if (!order) throw wrongState('This order is not placed yet.');
    if (order.state === 'arrived' || order.state === 'short') {
      throw wrongState('This order has come already. Correct its bags below.');
    }
    const ordered = new Map(order.packs.map(({ offerId, packs }) => [offerId, packs]));
    const received = new Map(body.packs.map(({ offerId, packs }) => [offerId, packs]));
    const unknown = body.packs.findIndex(({ offerId }) => !ordered.has(offerId));
    if (unknown >= 0) {
      throw invalid({ [`packs.${unknown}.offerId`]: 'This pack is not in the order.' });
    }
    const came = (offerId: string) => received.get(offerId) ?? ordered.get(offerId) ?? 0;
    if ([...ordered.keys()].every((offerId) => came(offerId) === 0)) {
      throw invalid({ packs: 'Nothing came: mark the order as failed instead.' });
    }
    const isShort = [...ordered].some(([offerId, packs]) => came(offerId) < packs);
    const change = {
      supplierId,
      version: body.version,
      state: isShort ? ('short' as const) : ('arrived' as const),
      note: body.note,
    };
    await changeOrderState(buy, actor.club, change, byActor(actor), tx);
    const bagIds = await createBags(buy.id, order, received, tx);
    return changeSplit(buy, { bagIds }, tx);
  });
}
