import type { AcceptedReply, InvitationCard } from '#shared/schemas/invitations.ts';
import { execute, select, transact, type Tx } from '../../config/database.ts';
import { Membership } from '../../models/Membership.ts';
import { hashToken, tokenSpent } from '../accounts/tokens.ts';
import type { AccountActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { DomainProblem, notFound } from '../problem.ts';
import { lockClub, lockMember } from './lockClub.ts';
import { tellStewards } from './tellStewards.ts';

interface Living {
  id: string;
  kind: 'link' | 'email';
  email: string | null;
  name: string;
  invited_by: string;
  guest_membership_id: string | null;
  expires_at: Date;
  club_id: string;
  slug: string;
  club_name: string;
  note: string;
  join_needs_approval: boolean;
}

async function findLiving(token: string, tx?: Tx): Promise<Living> {
  const [row] = await select<Living>(
    `select i.id, i.kind, i.email, i.name, m.display_name as invited_by, i.guest_membership_id, i.expires_at,
        i.club_id, c.slug, c.name as club_name, c.note, c.join_needs_approval
     from invitations i join clubs c on c.id = i.club_id join memberships m on m.id = i.created_by_id
     where i.token_hash = :hash and i.revoked_at is null and i.accepted_at is null
       and i.expires_at > clock_timestamp() ${tx ? 'for update of i' : ''}`,
    { hash: hashToken(token) },
    tx,
  );
  if (!row) throw tokenSpent('This invitation');
  return row;
}

/**
 * What an invitation's page shows, signed in or not.
 * @throws DomainProblem 409 `token_spent`
 */
export async function readInvitation(
  token: string,
  actor: AccountActor | null,
): Promise<InvitationCard> {
  const row = await findLiving(token);
  const own = actor
    ? await Membership.findOne({ where: { clubId: row.club_id, accountId: actor.accountId } })
    : null;
  return {
    club: { slug: row.slug, name: row.club_name, note: row.note },
    kind: row.kind,
    email: row.email,
    name: row.name,
    invitedBy: row.invited_by,
    needsApproval: row.kind === 'link' && row.join_needs_approval,
    expiresAt: row.expires_at.toISOString(),
    already: own?.status === 'active' || own?.status === 'pending' ? own.status : null,
  };
}

async function takeGuestOver(
  tx: Tx,
  actor: AccountActor,
  invitation: Living,
  own: Membership | null,
): Promise<Membership> {
  if (own) {
    throw new DomainProblem(
      409,
      'already_there',
      `You have a membership in ${invitation.club_name} of your own, so the guest's can't become yours.`,
    );
  }
  const guest = await lockMember(tx, invitation.club_id, invitation.guest_membership_id ?? '');
  if (guest.status !== 'active') throw tokenSpent('This invitation');
  guest.accountId = actor.accountId;
  guest.isGuest = false;
  guest.guestContact = '';
  return guest;
}

function join(actor: AccountActor, invitation: Living, own: Membership | null): Membership {
  // Whoever was removed comes back only by a steward's yes, whatever the club's default is.
  const asks =
    invitation.kind === 'link' && (invitation.join_needs_approval || own?.status === 'removed');
  const member =
    own ??
    Membership.build({
      clubId: invitation.club_id,
      accountId: actor.accountId,
      displayName: actor.accountName,
    });
  member.status = asks ? 'pending' : 'active';
  member.joinedAt = new Date();
  return member;
}

/**
 * Takes an invitation for the account that is signed in. An e-mailed one works once and lets in at once; a join link
 * asks a steward, unless the club lets everyone in who has it. Former members come back under their old membership; a
 * guest's history goes on under the account.
 * @throws DomainProblem 409 `token_spent`, 409 `already_there`
 */
export async function acceptInvitation(
  token: string,
  actor: AccountActor,
  displayName: string,
): Promise<AcceptedReply> {
  return transact(async (tx) => {
    const seen = await findLiving(token);
    await lockClub(tx, seen.club_id);
    const invitation = await findLiving(token, tx);
    const [account] = await select<{ id: string }>(
      'select id from accounts where id = :accountId and deleted_at is null for share',
      { accountId: actor.accountId },
      tx,
    );
    if (!account) throw notFound('This account');
    const own = await Membership.findOne({
      where: { clubId: invitation.club_id, accountId: actor.accountId },
      transaction: tx.transaction,
      lock: tx.transaction.LOCK.UPDATE,
    });
    const reply = { clubSlug: invitation.slug, clubName: invitation.club_name };
    if (own?.status === 'active') return { ...reply, status: 'active' as const };
    if (own?.status === 'pending' && invitation.kind === 'link') {
      return { ...reply, status: 'pending' as const };
    }
    const member = invitation.guest_membership_id
      ? await takeGuestOver(tx, actor, invitation, own)
      : join(actor, invitation, own);
    member.displayName = displayName;
    if (!member.isNewRecord) member.version += 1;
    await member.save({ transaction: tx.transaction });
    if (invitation.kind === 'email') {
      await execute(
        'update invitations set accepted_at = clock_timestamp(), accepted_by_id = :memberId where id = :id',
        { id: invitation.id, memberId: member.id },
        tx,
      );
    }
    const pending = member.status === 'pending';
    await writeAudit(tx, {
      clubId: invitation.club_id,
      by: { membershipId: member.id, name: displayName, requestId: actor.requestId },
      action: pending ? 'clubs.ask_to_join' : 'clubs.join',
      subject: { type: 'membership', id: member.id },
      after: { displayName, by: invitation.kind === 'link' ? 'join link' : 'e-mail' },
    });
    await tellStewards(tx, {
      clubId: invitation.club_id,
      slug: invitation.slug,
      clubName: invitation.club_name,
      memberId: member.id,
      version: member.version,
      name: displayName,
      pending,
    });
    return { ...reply, status: pending ? ('pending' as const) : ('active' as const) };
  });
}
