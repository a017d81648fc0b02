import { execute, transact, type Tx } from '../../config/database.ts';
import { Account } from '../../models/Account.ts';
import type { Membership } from '../../models/Membership.ts';
import { mailAccount } from '../accounts/mailAccount.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { wrongState } from '../problem.ts';
import { lockClub, lockMember } from './lockClub.ts';

async function lockPending(tx: Tx, actor: ClubActor, memberId: string): Promise<Membership> {
  await lockClub(tx, actor.club.id);
  const member = await lockMember(tx, actor.club.id, memberId);
  if (member.status !== 'pending') {
    throw wrongState(`${member.displayName} was answered already.`, { status: member.status });
  }
  return member;
}

/**
 * Lets in somebody who asked to join; they are told.
 * @throws DomainProblem 404, 409 `wrong_state` when another steward has answered
 */
export async function approveMember(actor: ClubActor, memberId: string): Promise<void> {
  await transact(async (tx) => {
    const member = await lockPending(tx, actor, memberId);
    member.status = 'active';
    member.joinedAt = new Date();
    member.endedAt = null;
    member.version += 1;
    await member.save({ transaction: tx.transaction });
    await writeAudit(tx, {
      clubId: actor.club.id,
      by: byActor(actor),
      action: 'clubs.approve',
      subject: { type: 'membership', id: memberId },
      before: { status: 'pending' },
      after: { status: 'active' },
    });
    await queueNotice(tx, {
      clubId: actor.club.id,
      kind: 'invitation',
      eventKey: `membership:${memberId}:approved:${member.version}`,
      to: [memberId],
      content: {
        subject: `You are in ${actor.club.name}`,
        paragraphs: [
          `${actor.name} let you into ${actor.club.name}. You can pledge in its open buys.`,
        ],
        action: { label: 'Open the club', path: `/c/${actor.club.slug}/buys` },
      },
    });
  });
}

/**
 * Turns down somebody who asked to join; they are told. A newcomer leaves no membership behind, a former member stays
 * a former one.
 * @throws DomainProblem 404, 409 `wrong_state` when another steward has answered
 */
export async function refuseMember(actor: ClubActor, memberId: string): Promise<void> {
  await transact(async (tx) => {
    const member = await lockPending(tx, actor, memberId);
    const { displayName, accountId, version } = member;
    const former = member.endedAt !== null;
    if (former) {
      member.status = 'removed';
      member.version += 1;
      await member.save({ transaction: tx.transaction });
    } else {
      await execute('delete from memberships where id = :memberId', { memberId }, tx);
    }
    await writeAudit(tx, {
      clubId: actor.club.id,
      by: byActor(actor),
      action: 'clubs.refuse',
      subject: { type: 'membership', id: memberId },
      before: { displayName, status: 'pending' },
      after: { status: former ? 'removed' : 'none' },
    });
    const account = accountId
      ? await Account.findByPk(accountId, { transaction: tx.transaction })
      : null;
    if (!account || account.deletedAt) return;
    await mailAccount(tx, {
      accountId: account.id,
      eventKey: `membership:${memberId}:refused:${version}`,
      address: account.email,
      greeting: displayName,
      content: {
        subject: `${actor.club.name} has answered`,
        paragraphs: [
          `A steward of ${actor.club.name} did not let you in. If you think that is a mistake, write to the club.`,
        ],
        action: { label: 'The club', path: `/public/${actor.club.slug}` },
      },
    });
  });
}
