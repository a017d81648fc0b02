import type { SpillBody, SplitChange } from '#shared/schemas/splits.ts';
import { execute, select } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { withBuy } from '../buys/withBuy.ts';
import { DomainProblem, forbidden, invalid, notFound, wrongState } from '../problem.ts';
import { changeSplit } from './changeSplit.ts';
import { lockedBag } from './lockedBag.ts';

const states = ['splitting'] as const;

/**
 * Notes what was spilled from a bag: it counts as lost and never goes back. Sending it again changes nothing.
 * @throws DomainProblem 409 when the bag is closed, 422 when it never held so much
 */
export async function noteSpill(
  actor: BuyActor,
  bagId: string,
  body: SpillBody,
): Promise<SplitChange> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const bag = await lockedBag(buy.id, bagId, undefined, tx);
    const [known] = await select<{ bag_id: string; mg: number }>(
      'select bag_id, mg from spills where id = :id',
      { id: body.id },
      tx,
    );
    if (known) {
      if (known.bag_id !== bagId || known.mg !== body.mg) {
        throw new DomainProblem(409, 'already_there', 'Another spill has this id already.');
      }
      return changeSplit(buy, { bagIds: [bagId] }, tx);
    }
    if (bag.closed) throw wrongState('This bag is closed.');
    if (bag.facts.netMg === null) throw invalid({ mg: 'This bag is not weighed yet.' });
    if (body.mg > bag.facts.netMg) throw invalid({ mg: 'The bag never held so much.' });
    await execute(
      `insert into spills (id, buy_id, bag_id, mg, note, noted_by_id) values (:id, :buyId, :bagId, :mg, :note, :byId)`,
      { ...body, buyId: buy.id, bagId, byId: actor.membershipId },
      tx,
    );
    return changeSplit(buy, { bagIds: [bagId] }, tx);
  });
}

/** Takes a note of a spill back: by who made it, or an organiser. */
export async function undoSpill(actor: BuyActor, spillId: string): Promise<SplitChange> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const [row] = await select<{ bag_id: string; noted_by_id: string }>(
      'select bag_id, noted_by_id from spills where id = :spillId and buy_id = :buyId',
      { spillId, buyId: buy.id },
      tx,
    );
    if (!row) throw notFound('This spill');
    if (row.noted_by_id !== actor.membershipId && !actor.buy.organises) {
      throw forbidden('Only who noted it, or an organiser, takes a spill back.');
    }
    const bag = await lockedBag(buy.id, row.bag_id, undefined, tx);
    if (bag.closed) throw wrongState('This bag is closed. Open it again first.');
    await execute(
      'update spills set undone_at = coalesce(undone_at, clock_timestamp()) where id = :spillId',
      { spillId },
      tx,
    );
    return changeSplit(buy, { bagIds: [row.bag_id] }, tx);
  });
}
