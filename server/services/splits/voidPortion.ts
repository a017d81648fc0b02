import type { SplitChange, VoidBody } from '#shared/schemas/splits.ts';
import { execute } from '../../config/database.ts';
import { presentPortion } from '../../presenters/splits.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { stale, wrongState } from '../problem.ts';
import { changeSplit } from './changeSplit.ts';
import { lockedPortion } from './lockedPortion.ts';

const states = ['splitting'] as const;

/**
 * An organiser takes a portion out: its member gets and pays nothing for it, its grams stay in the bag.
 * @throws DomainProblem 409 when it is weighed already or somebody else changed it
 */
export async function voidPortion(
  actor: BuyActor,
  portionId: string,
  body: VoidBody,
): Promise<SplitChange> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const portion = await lockedPortion(buy.id, portionId, body.version, tx);
    if (portion.state === 'done') {
      throw stale('It is weighed already. Undo the weighing first.', presentPortion(portion));
    }
    await execute(
      `update portions set state = 'void', void_reason = :reason, voided_by_id = :byId, claimed_by_id = null,
         claimed_at = null, version = version + 1, updated_at = now() where id = :id`,
      { id: portionId, reason: body.reason, byId: actor.membershipId },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'splits.void',
      subject: { type: 'portion', id: portionId },
      before: { state: portion.state, targetMg: portion.target_mg, code: portion.code },
      after: { state: 'void', reason: body.reason },
    });
    return changeSplit(buy, { portionIds: [portionId] }, tx);
  });
}

/** An organiser puts a portion back that was taken out by hand. */
export async function restorePortion(
  actor: BuyActor,
  portionId: string,
  version: number,
): Promise<SplitChange> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const portion = await lockedPortion(buy.id, portionId, version, tx);
    if (portion.state !== 'void') throw wrongState('This portion is not taken out.');
    if (portion.voided_by_id === null) {
      throw wrongState('The targets no longer hold this portion. Work them out again.');
    }
    await execute(
      `update portions set state = 'waiting', void_reason = '', voided_by_id = null, version = version + 1,
         updated_at = now() where id = :id`,
      { id: portionId },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'splits.restore',
      subject: { type: 'portion', id: portionId },
      before: { state: 'void', reason: portion.void_reason },
      after: { state: 'waiting' },
    });
    return changeSplit(buy, { portionIds: [portionId] }, tx);
  });
}
