import { cutPortion } from '#shared/domain/splits/cutPortion.ts';
import { portionCode } from '#shared/domain/splits/portionCode.ts';
import type { CutBody, SplitChange } from '#shared/schemas/splits.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import type { PortionRow } from '../../presenters/splits.ts';
import type { BuyActor } from '../actors.ts';
import { withBuy } from '../buys/withBuy.ts';
import { invalid, stale, wrongState } from '../problem.ts';
import { nextSequence } from './applyTargets.ts';
import { changeSplit } from './changeSplit.ts';
import { lockedPortion } from './lockedPortion.ts';
import { findPortions } from './splitRows.ts';

const states = ['splitting'] as const;

function requireFree(portion: PortionRow, actor: BuyActor): void {
  if (portion.state === 'done' || portion.state === 'void') {
    throw wrongState('This portion is weighed or taken out already.');
  }
  if (portion.state === 'claimed' && portion.claimed_by_id !== actor.membershipId) {
    throw stale(`${portion.claimed_by ?? 'Somebody else'} is weighing this portion.`);
  }
}

async function siblings(buyId: string, portion: PortionRow, tx: Tx): Promise<PortionRow[]> {
  const all = await findPortions(buyId, tx);
  return all.filter(
    ({ line_id, membership_id, state }) =>
      line_id === portion.line_id && membership_id === portion.membership_id && state !== 'void',
  );
}

/** Numbers the living portions of one share anew: 1 of n, in the order of their codes. */
async function renumber(buyId: string, portion: PortionRow, tx: Tx): Promise<string[]> {
  const own = await siblings(buyId, portion, tx);
  for (const [index, { id }] of own.entries()) {
    await execute(
      `update portions set part = :part, parts = :parts, version = version + 1, updated_at = now() where id = :id`,
      { id, part: index + 1, parts: own.length },
      tx,
    );
  }
  return own.map(({ id }) => id);
}

function massesOf(body: CutBody, targetMg: number, stepMg: number): number[] {
  if (body.firstMg !== undefined) {
    if (body.firstMg >= targetMg) {
      throw invalid({ firstMg: 'The first part must be less than the whole.' });
    }
    return [body.firstMg, targetMg - body.firstMg];
  }
  if (body.capacityMg === undefined) throw invalid({ capacityMg: 'Say what the scale can carry.' });
  if (body.capacityMg < stepMg) {
    throw invalid({ capacityMg: 'This scale carries less than one step of the line.' });
  }
  const masses = cutPortion(targetMg, stepMg, body.capacityMg);
  if (masses.length > 50) throw invalid({ capacityMg: 'That would be more than 50 parts.' });
  return masses;
}

/**
 * Cuts a portion into parts that a scale can carry, or that one bag can still give; each gets a container and a code of
 * its own, together they are the target.
 * @throws DomainProblem 409 by its version or when another weighs it, 422 when it can't be cut so
 */
export async function cutIntoParts(
  actor: BuyActor,
  portionId: string,
  body: CutBody,
): Promise<SplitChange> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const portion = await lockedPortion(buy.id, portionId, body.version, tx);
    requireFree(portion, actor);
    const [line] = await select<{ step_mg: number }>(
      'select step_mg from lines where id = :id',
      { id: portion.line_id },
      tx,
    );
    const [first = 0, ...rest] = massesOf(body, portion.target_mg, line?.step_mg ?? 1);
    if (rest.length === 0) return changeSplit(buy, { portionIds: [portionId] }, tx);
    await execute(
      `update portions set target_mg = :first where id = :id`,
      { id: portionId, first },
      tx,
    );
    let sequence = await nextSequence(buy.id, tx);
    for (const targetMg of rest) {
      await execute(
        `insert into portions (buy_id, line_id, membership_id, code, target_mg, target_version)
         values (:buyId, :lineId, :membershipId, :code, :targetMg, :version)`,
        {
          buyId: buy.id,
          lineId: portion.line_id,
          membershipId: portion.membership_id,
          code: portionCode(sequence),
          targetMg,
          version: portion.target_version,
        },
        tx,
      );
      sequence += 1;
    }
    return changeSplit(buy, { portionIds: await renumber(buy.id, portion, tx) }, tx);
  });
}

/**
 * Puts the parts of a share that nobody has weighed yet together again, into the one named.
 * @throws DomainProblem 409 when another is weighing one of them
 */
export async function joinParts(
  actor: BuyActor,
  portionId: string,
  version: number,
): Promise<SplitChange> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const portion = await lockedPortion(buy.id, portionId, version, tx);
    requireFree(portion, actor);
    const open = (await siblings(buy.id, portion, tx)).filter(({ state }) => state !== 'done');
    for (const part of open) requireFree(part, actor);
    const others = open.filter(({ id }) => id !== portionId);
    if (others.length === 0) return changeSplit(buy, { portionIds: [portionId] }, tx);
    const targetMg = open.reduce((sum, { target_mg }) => sum + target_mg, 0);
    await execute(
      'update portions set target_mg = :targetMg where id = :id',
      { id: portionId, targetMg },
      tx,
    );
    const gone = others.map(({ id }) => id);
    await execute(
      `update portions set state = 'void', void_reason = 'Joined with another part.', voided_by_id = null,
         claimed_by_id = null, claimed_at = null, version = version + 1, updated_at = now() where id in (:gone)`,
      { gone },
      tx,
    );
    const kept = await renumber(buy.id, portion, tx);
    return changeSplit(buy, { portionIds: [...kept, ...gone] }, tx);
  });
}
