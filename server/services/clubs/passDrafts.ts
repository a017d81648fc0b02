import { execute, select, type Tx } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import type { Membership } from '../../models/Membership.ts';
import type { By } from '../actorName.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { cancelUnderLock } from '../buys/cancelBuy.ts';
import { changeTerms } from '../buys/withBuy.ts';

async function findSuccessor(tx: Tx, buyId: string, memberId: string) {
  const [row] = await select<{ id: string; name: string }>(
    `select m.id, m.display_name as name from buy_organisers o join memberships m on m.id = o.membership_id
     where o.buy_id = :buyId and m.id <> :memberId and m.status = 'active' order by o.created_at, m.id limit 1`,
    { buyId, memberId },
    tx,
  );
  return row ?? null;
}

/**
 * Drafts of somebody who goes: the earliest co-organiser becomes responsible, or nobody could see the draft and it is
 * discarded.
 */
export async function passDrafts(tx: Tx, member: Membership, by: By): Promise<void> {
  const drafts = await select<{ id: string }>(
    `select id from buys where responsible_id = :memberId and state = 'draft' order by id`,
    { memberId: member.id },
    tx,
  );
  for (const { id } of drafts) {
    const buy = await Buy.lock(id, tx);
    if (buy.state !== 'draft' || buy.responsibleId !== member.id) continue;
    const successor = await findSuccessor(tx, id, member.id);
    if (!successor) {
      await cancelUnderLock(buy, '', by, tx);
      continue;
    }
    buy.responsibleId = successor.id;
    buy.offeredToId = null;
    await execute(
      'delete from buy_organisers where buy_id = :id and membership_id = :successorId',
      { id, successorId: successor.id },
      tx,
    );
    await changeTerms(buy, `${successor.name} is now responsible for the buy.`, by, tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: id,
      by,
      action: 'buys.passResponsibility',
      subject: { type: 'buy', id },
      before: { responsibleId: member.id, name: member.displayName },
      after: { responsibleId: successor.id, name: successor.name },
    });
  }
}
