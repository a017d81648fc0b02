import type { SplitChange } from '#shared/schemas/splits.ts';
import { execute, select } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { forbidden, notFound, wrongState } from '../problem.ts';
import { changeSplit } from './changeSplit.ts';
import { lockedBag } from './lockedBag.ts';

interface Row {
  portion_id: string;
  bag_id: string;
  reading_mg: number;
  charged_mg: number;
  weighed_by_id: string;
  undone_at: Date | null;
}

/**
 * Takes a weighing back, by who made it or an organiser: the grams are in the bag again, the portion waits.
 * @throws DomainProblem 409 when its bag is closed; a second time changes nothing
 */
export async function undoWeighing(actor: BuyActor, weighingId: string): Promise<SplitChange> {
  return withBuy(actor.buy.id, { states: ['splitting'] }, async (buy, tx) => {
    const [row] = await select<Row>(
      `select portion_id, bag_id, reading_mg, charged_mg, weighed_by_id, undone_at from weighings
       where id = :weighingId and buy_id = :buyId`,
      { weighingId, buyId: buy.id },
      tx,
    );
    if (!row) throw notFound('This weighing');
    if (row.weighed_by_id !== actor.membershipId && !actor.buy.organises) {
      throw forbidden('Only who weighed it, or an organiser, takes a weighing back.');
    }
    const ids = { portionIds: [row.portion_id], bagIds: [row.bag_id] };
    if (row.undone_at) return changeSplit(buy, ids, tx);
    const bag = await lockedBag(buy.id, row.bag_id, undefined, tx);
    if (bag.closed) throw wrongState('Its bag is closed. Open the bag again first.');
    await execute(
      'update weighings set undone_at = clock_timestamp() where id = :weighingId',
      { weighingId },
      tx,
    );
    await execute(
      `update portions set state = 'waiting', weighed_mg = null, charged_mg = null, bag_id = null, done_at = null,
         station = '', version = version + 1, updated_at = now() where id = :id`,
      { id: row.portion_id },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'splits.undoWeighing',
      subject: { type: 'portion', id: row.portion_id },
      before: { readingMg: row.reading_mg, chargedMg: row.charged_mg },
      after: { state: 'waiting' },
    });
    return changeSplit(buy, ids, tx);
  });
}
