import { reconcileBag } from '#shared/domain/splits/bagSums.ts';
import { netOfBag } from '#shared/domain/splits/netOfBag.ts';
import type { CloseBagBody, LineNoteBody, SplitChange } from '#shared/schemas/splits.ts';
import { execute, select } from '../../config/database.ts';
import { presentBag } from '../../presenters/splits.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { invalid, notFound, wrongState } from '../problem.ts';
import { changeSplit } from './changeSplit.ts';
import { lockedBag } from './lockedBag.ts';
import { findBags } from './splitRows.ts';

const states = ['splitting'] as const;

/**
 * Closes a bag: what is left in it was weighed and goes to the shelf. The empty bag's weight may come with it and mends
 * the assumed one. What then is unaccounted for needs a note above 1 %.
 * @throws DomainProblem 409 `stale` by the bag's version, 422 without the note
 */
export async function closeBag(
  actor: BuyActor,
  bagId: string,
  body: CloseBagBody,
): Promise<SplitChange> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const bag = await lockedBag(buy.id, bagId, body.version, tx);
    if (bag.closed) throw wrongState('This bag is closed already.');
    const { grossMg, missing } = bag.facts;
    if (missing || grossMg === null) throw wrongState('This bag is missing or not weighed yet.');
    if (body.tareMg !== null && body.tareMg >= grossMg) {
      throw invalid({ tareMg: 'The empty bag must weigh less than the full one.' });
    }
    const tareMg = body.tareMg ?? bag.facts.tareMg;
    const { netMg, tareAssumed } = netOfBag(grossMg, tareMg);
    const [row] = await findBags(buy.id, tx, [bagId]);
    if (!row) throw notFound('This bag');
    const sums = reconcileBag({ ...presentBag(row), netMg, shelfMg: body.shelfMg });
    if (sums.needsNote && body.unaccountedNote === '') {
      throw invalid({
        unaccountedNote: 'More than 1 % is unaccounted for. Write down why, as far as you know.',
      });
    }
    await execute(
      `update bags set shelf_mg = :shelfMg, tare_mg = :tareMg, tare_assumed = :tareAssumed, net_mg = :netMg,
         unaccounted_note = :note, closed_at = clock_timestamp(), closed_by_id = :byId, version = version + 1,
         updated_at = now() where id = :id`,
      {
        id: bagId,
        shelfMg: body.shelfMg,
        tareMg,
        tareAssumed,
        netMg,
        note: body.unaccountedNote,
        byId: actor.membershipId,
      },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'splits.closeBag',
      subject: { type: 'bag', id: bagId },
      after: { shelfMg: body.shelfMg, netMg, unaccountedMg: sums.unaccountedMg },
    });
    return changeSplit(buy, { bagIds: [bagId] }, tx);
  });
}

/** Opens a closed bag again, to correct it. */
export async function reopenBag(
  actor: BuyActor,
  bagId: string,
  version: number,
): Promise<SplitChange> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const bag = await lockedBag(buy.id, bagId, version, tx);
    if (!bag.closed) throw wrongState('This bag is open.');
    await execute(
      `update bags set shelf_mg = null, closed_at = null, closed_by_id = null, version = version + 1, updated_at = now()
       where id = :bagId`,
      { bagId },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'splits.reopenBag',
      subject: { type: 'bag', id: bagId },
    });
    return changeSplit(buy, { bagIds: [bagId] }, tx);
  });
}

/** Says why more than 1 % of a line is unaccounted for. */
export async function noteLine(
  actor: BuyActor,
  lineId: string,
  { note }: LineNoteBody,
): Promise<SplitChange> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const lines = await select<{ id: string }>(
      'update lines set unaccounted_note = :note, updated_at = now() where id = :lineId and buy_id = :buyId returning id',
      { note, lineId, buyId: buy.id },
      tx,
    );
    if (lines.length === 0) throw notFound('This line');
    return changeSplit(buy, { more: true }, tx);
  });
}
