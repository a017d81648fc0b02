import { transact } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { wrongState } from '../problem.ts';
import { endMembership } from './endMembership.ts';
import { lockClub, lockMember, rolesOf } from './lockClub.ts';

/**
 * A steward removes a member or a guest. Whoever is removed is told.
 * @throws DomainProblem 404, 409 `last_of_role`, 409 `wrong_state`
 */
export async function removeMember(actor: ClubActor, memberId: string): Promise<void> {
  const by = byActor(actor);
  await transact(async (tx) => {
    await lockClub(tx, actor.club.id);
    const member = await lockMember(tx, actor.club.id, memberId);
    if (member.status !== 'active') throw wrongState(`${member.displayName} is not in the club.`);
    const before = rolesOf(member);
    await endMembership(tx, member, 'removed', by);
    await writeAudit(tx, {
      clubId: actor.club.id,
      by,
      action: 'clubs.remove',
      subject: { type: 'membership', id: memberId },
      before: { status: 'active', roles: before },
      after: { status: 'removed' },
    });
    await queueNotice(tx, {
      clubId: actor.club.id,
      kind: 'account',
      eventKey: `membership:${memberId}:ended:${member.version}`,
      to: [memberId],
      content: {
        subject: `You are no longer in ${actor.club.name}`,
        paragraphs: [
          `A steward ended your membership of ${actor.club.name}. Your pledges in open buys were withdrawn.`,
          'What you have in buys that were locked already stays yours: you keep its slip, payment and pickup until it settles.',
        ],
      },
    });
  });
}

/**
 * A member leaves by themselves.
 * @throws DomainProblem 409 `last_of_role`, 409 `wrong_state`
 */
export async function leaveClub(actor: ClubActor): Promise<void> {
  const by = byActor(actor);
  await transact(async (tx) => {
    await lockClub(tx, actor.club.id);
    const member = await lockMember(tx, actor.club.id, actor.membershipId);
    if (member.status !== 'active') throw wrongState('You are not in this club any more.');
    const before = rolesOf(member);
    await endMembership(tx, member, 'left', by);
    await writeAudit(tx, {
      clubId: actor.club.id,
      by,
      action: 'clubs.leave',
      subject: { type: 'membership', id: member.id },
      before: { status: 'active', roles: before },
      after: { status: 'left' },
    });
  });
}
