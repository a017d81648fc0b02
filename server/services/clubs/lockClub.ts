import {
  listRoles,
  rolesLeftEmpty,
  roleNames,
  type RoleCounts,
} from '#shared/domain/clubs/roles.ts';
import type { Roles } from '#shared/schemas/fields.ts';
import { select, type Tx } from '../../config/database.ts';
import { Membership } from '../../models/Membership.ts';
import { DomainProblem, notFound } from '../problem.ts';

/** Serialises who is in a club and with which roles: the first lock of every use case that changes that. */
export async function lockClub(tx: Tx, clubId: string): Promise<void> {
  // Not `for update`: rows that merely refer to the club go on being written.
  await select('select id from clubs where id = :clubId for no key update', { clubId }, tx);
}

/**
 * A membership of the club under its row lock.
 * @throws DomainProblem 404
 */
export async function lockMember(tx: Tx, clubId: string, memberId: string): Promise<Membership> {
  const member = await Membership.findOne({
    where: { id: memberId, clubId },
    transaction: tx.transaction,
    lock: tx.transaction.LOCK.UPDATE,
  });
  if (!member) throw notFound('This member');
  return member;
}

/** How many other active members hold each role; the club must be locked. */
async function countOthers(tx: Tx, clubId: string, memberId: string): Promise<RoleCounts> {
  const [row] = await select<RoleCounts>(
    `select count(*) filter (where is_organiser)::integer as organiser,
        count(*) filter (where is_treasurer)::integer as treasurer,
        count(*) filter (where is_steward)::integer as steward
     from memberships where club_id = :clubId and id <> :memberId and status = 'active'`,
    { clubId, memberId },
    tx,
  );
  return row ?? { organiser: 0, treasurer: 0, steward: 0 };
}

/** The roles of a membership. */
export function rolesOf(member: Membership): Roles {
  return {
    organiser: member.isOrganiser,
    treasurer: member.isTreasurer,
    steward: member.isSteward,
  };
}

/** No role at all. */
export const noRoles: Roles = { organiser: false, treasurer: false, steward: false };

/**
 * Refuses what would leave a club without a steward, organiser or treasurer; the club must be locked.
 * @throws DomainProblem 409 `last_of_role`
 */
export async function requireOthers(tx: Tx, member: Membership, kept: Roles): Promise<void> {
  const others = await countOthers(tx, member.clubId, member.id);
  const empty = rolesLeftEmpty(others, rolesOf(member), kept);
  if (empty.length === 0) return;
  throw new DomainProblem(
    409,
    'last_of_role',
    `${member.displayName} is the club's last ${listRoles(empty)}. Give ${empty.length > 1 ? 'those roles' : 'that role'} to someone else first.`,
  );
}

/** Writes roles into a membership that is going to be saved. */
export function setRoles(member: Membership, roles: Roles): void {
  member.isOrganiser = roles.organiser;
  member.isTreasurer = roles.treasurer;
  member.isSteward = roles.steward;
}

/** Roles held before and not after. */
export function rolesLost(before: Roles, after: Roles): boolean {
  return roleNames.some((role) => before[role] && !after[role]);
}
