import { netOfBag } from '#shared/domain/splits/netOfBag.ts';
import type { BagBody, SplitChange } from '#shared/schemas/splits.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { changeOrderState } from '../orders/changeOrderState.ts';
import { invalid, wrongState } from '../problem.ts';
import { changeSplit } from './changeSplit.ts';
import { orderIsComplete } from './createBags.ts';
import { lockedBag, type LockedBag } from './lockedBag.ts';

function netOrNull(body: BagBody) {
  if (body.grossMg === null) return { netMg: null, tareMg: body.tareMg, assumed: true };
  if (body.tareMg !== null && body.tareMg >= body.grossMg) {
    throw invalid({ tareMg: 'The empty bag must weigh less than the full one.' });
  }
  const { netMg, tareMg, tareAssumed } = netOfBag(body.grossMg, body.tareMg);
  return { netMg, tareMg: tareAssumed ? null : tareMg, assumed: tareAssumed };
}

async function followOrder(buy: Buy, actor: BuyActor, bag: LockedBag, tx: Tx): Promise<void> {
  const [order] = await select<{ supplier_id: string; state: string; version: number }>(
    'select supplier_id, state, version from supplier_orders where id = :id',
    { id: bag.supplierOrderId },
    tx,
  );
  const state = (await orderIsComplete(bag.supplierOrderId, tx)) ? 'arrived' : 'short';
  if (!order || order.state === state) return;
  const { supplier_id: supplierId, version } = order;
  await changeOrderState(
    buy,
    actor.club,
    { supplierId, version, state, note: '' },
    byActor(actor),
    tx,
  );
}

/**
 * Counts and weighs one bag. An empty bag that isn't weighed yet counts as 0.5 % of gross, and is marked so. Whether a
 * pack is missing also decides whether its order is short.
 * @throws DomainProblem 409 `stale` by the bag's version, 422 for masses that can't be
 */
export async function countBag(
  actor: BuyActor,
  bagId: string,
  body: BagBody,
): Promise<SplitChange> {
  const states = ['locked', 'ordered', 'arrived', 'splitting'] as const;
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const bag = await lockedBag(buy.id, bagId, body.version, tx);
    if (bag.closed) throw wrongState('This bag is closed. Open it again to correct it.');
    if (body.missing && body.grossMg !== null) {
      throw invalid({ missing: 'A bag that is missing has no weight. Empty its gross first.' });
    }
    if (bag.used && (body.missing || body.grossMg === null)) {
      throw invalid({ grossMg: 'Portions came out of this bag already, so it needs its weight.' });
    }
    const { netMg, tareMg, assumed } = netOrNull(body);
    await execute(
      `update bags set gross_mg = :grossMg, tare_mg = :tareMg, tare_assumed = :assumed, net_mg = :netMg, lot = :lot,
         missing = :missing, damage = :damage, note = :note, counted_by_id = :byId, counted_at = clock_timestamp(),
         version = version + 1, updated_at = now() where id = :id`,
      {
        id: bagId,
        grossMg: body.grossMg,
        tareMg,
        assumed,
        netMg,
        lot: body.lot,
        missing: body.missing,
        damage: body.damage,
        note: body.note,
        byId: actor.membershipId,
      },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'splits.count',
      subject: { type: 'bag', id: bagId },
      before: bag.facts,
      after: {
        grossMg: body.grossMg,
        tareMg,
        netMg,
        lot: body.lot,
        missing: body.missing,
        damage: body.damage,
      },
    });
    if (body.missing !== bag.facts.missing && (buy.state === 'locked' || buy.state === 'ordered')) {
      await followOrder(buy, actor, bag, tx);
    }
    return changeSplit(buy, { bagIds: [bagId] }, tx);
  });
}
