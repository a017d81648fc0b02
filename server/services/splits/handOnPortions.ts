import { execute, select, type Tx } from '../../config/database.ts';
import { changeSplit } from './changeSplit.ts';

/**
 * After a line was handed on from one member to another, its portions are the other's: codes, targets and weights stay.
 * The buy is locked and the hand-on itself is done by the caller.
 */
export async function handOnPortions(
  tx: Tx,
  hand: { buyId: string; lineId: string; fromId: string; toId: string },
): Promise<void> {
  const portions = await select<{ id: string }>(
    `select id from portions where buy_id = :buyId and line_id = :lineId and membership_id = :fromId
       and state <> 'void' and handed_over_at is null order by code`,
    hand,
    tx,
  );
  if (portions.length === 0) return;
  const ids = portions.map(({ id }) => id);
  await execute(
    `update portions set membership_id = :toId, version = version + 1, updated_at = now() where id in (:ids)`,
    { ids, toId: hand.toId },
    tx,
  );
  await changeSplit({ id: hand.buyId }, { portionIds: ids }, tx);
}
