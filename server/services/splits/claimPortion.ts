import type { ClaimBody, SplitChange } from '#shared/schemas/splits.ts';
import { execute } from '../../config/database.ts';
import { presentPortion } from '../../presenters/splits.ts';
import type { BuyActor } from '../actors.ts';
import { withBuy } from '../buys/withBuy.ts';
import { forbidden, stale, wrongState } from '../problem.ts';
import { changeSplit } from './changeSplit.ts';
import { lockedPortion } from './lockedPortion.ts';

const states = ['splitting'] as const;

/**
 * Somebody takes a portion to weigh it; whoever comes second is told who has it. Claiming one's own again changes the
 * station only.
 * @throws DomainProblem 409 when another has it, or it is done or void
 */
export async function claimPortion(
  actor: BuyActor,
  portionId: string,
  { station }: ClaimBody,
): Promise<SplitChange> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const portion = await lockedPortion(buy.id, portionId, undefined, tx);
    const now = presentPortion(portion);
    if (portion.state === 'done') throw stale('This portion is weighed already.', now);
    if (portion.state === 'void') throw wrongState('This portion was taken out.', now);
    if (portion.state === 'claimed' && portion.claimed_by_id !== actor.membershipId) {
      throw stale(`${portion.claimed_by ?? 'Somebody else'} is weighing this portion.`, now);
    }
    await execute(
      `update portions set state = 'claimed', claimed_by_id = :byId, claimed_at = clock_timestamp(), station = :station,
         version = version + 1, updated_at = now() where id = :id`,
      { id: portionId, byId: actor.membershipId, station },
      tx,
    );
    return changeSplit(buy, { portionIds: [portionId] }, tx);
  });
}

/**
 * Gives a claimed portion back: by who claimed it, or by an organiser.
 * @throws DomainProblem 403 for anybody else
 */
export async function releasePortion(actor: BuyActor, portionId: string): Promise<SplitChange> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const portion = await lockedPortion(buy.id, portionId, undefined, tx);
    if (portion.state === 'claimed') {
      if (portion.claimed_by_id !== actor.membershipId && !actor.buy.organises) {
        throw forbidden('Only who weighs it, or an organiser, gives this portion back.');
      }
      await execute(
        `update portions set state = 'waiting', claimed_by_id = null, claimed_at = null, station = '',
           version = version + 1, updated_at = now() where id = :id`,
        { id: portionId },
        tx,
      );
    }
    return changeSplit(buy, { portionIds: [portionId] }, tx);
  });
}
