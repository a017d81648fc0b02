import { transact } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { lockClub, lockMember } from './lockClub.ts';

/** The name by which the actor is known in this club. */
export async function renameSelf(actor: ClubActor, displayName: string): Promise<void> {
  await transact(async (tx) => {
    await lockClub(tx, actor.club.id);
    const member = await lockMember(tx, actor.club.id, actor.membershipId);
    if (member.displayName === displayName) return;
    await writeAudit(tx, {
      clubId: actor.club.id,
      by: byActor(actor),
      action: 'clubs.rename',
      subject: { type: 'membership', id: member.id },
      before: { displayName: member.displayName },
      after: { displayName },
    });
    member.displayName = displayName;
    await member.save({ transaction: tx.transaction });
  });
}
