import { listRoles, roleNames } from '#shared/domain/clubs/roles.ts';
import type { ChangeRolesBody } from '#shared/schemas/members.ts';
import { transact } from '../../config/database.ts';
import { disconnectAccount } from '../../sockets/publish.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { stale, wrongState } from '../problem.ts';
import { lockClub, lockMember, requireOthers, rolesLost, rolesOf, setRoles } from './lockClub.ts';

/**
 * Gives and takes roles; the member is told. Who lost one has their sockets closed, so that rooms are asked for anew.
 * @throws DomainProblem 404, 409 `stale`, 409 `last_of_role`, 409 `wrong_state` for guests and for who isn't in the club
 */
export async function changeRoles(
  actor: ClubActor,
  memberId: string,
  body: ChangeRolesBody,
): Promise<void> {
  const by = byActor(actor);
  await transact(async (tx) => {
    await lockClub(tx, actor.club.id);
    const member = await lockMember(tx, actor.club.id, memberId);
    const before = rolesOf(member);
    if (member.version !== body.version) {
      throw stale(`${member.displayName} was changed since you opened the page.`, {
        roles: before,
        version: member.version,
      });
    }
    if (member.status !== 'active') throw wrongState(`${member.displayName} is not in the club.`);
    if (member.isGuest) throw wrongState('A guest carries no roles. Invite them first.');
    if (roleNames.every((role) => before[role] === body.roles[role])) return;
    await requireOthers(tx, member, body.roles);
    setRoles(member, body.roles);
    member.version += 1;
    await member.save({ transaction: tx.transaction });
    await writeAudit(tx, {
      clubId: actor.club.id,
      by,
      action: 'clubs.roles',
      subject: { type: 'membership', id: memberId },
      before,
      after: body.roles,
    });
    const held = roleNames.filter((role) => body.roles[role]);
    await queueNotice(tx, {
      clubId: actor.club.id,
      kind: 'role_changed',
      eventKey: `membership:${memberId}:roles:${member.version}`,
      to: [memberId],
      content: {
        subject: `Your roles in ${actor.club.name} changed`,
        paragraphs: [
          held.length > 0
            ? `${actor.name} changed your roles: you are now ${listRoles(held)}.`
            : `${actor.name} changed your roles: you are now a member without a role.`,
        ],
        action: { label: 'Open the club', path: `/c/${actor.club.slug}/members` },
      },
    });
    const { accountId } = member;
    if (accountId && rolesLost(before, body.roles)) {
      tx.afterCommit(() => disconnectAccount(accountId));
    }
  });
}
