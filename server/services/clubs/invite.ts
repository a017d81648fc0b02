import type { InviteBody, InvitedReply } from '#shared/schemas/invitations.ts';
import { isUniqueViolation, select, transact, type Tx } from '../../config/database.ts';
import { hashToken, makeToken } from '../accounts/tokens.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { invalid, notFound, wrongState } from '../problem.ts';
import { getInvitation } from './findInvitations.ts';
import { lockClub, lockMember } from './lockClub.ts';
import { mailInvitation } from './mailInvitation.ts';

/** How long a join link and an e-mailed invitation can be used. */
export const invitationDays = 14;

async function requireNotMember(tx: Tx, clubId: string, email: string): Promise<void> {
  const [row] = await select<{ name: string }>(
    `select m.display_name as name from memberships m join accounts a on a.id = m.account_id
     where m.club_id = :clubId and m.status = 'active' and lower(a.email) = lower(:email) and a.deleted_at is null`,
    { clubId, email },
    tx,
  );
  if (row) throw invalid({ email: `${row.name} is in the club already.` });
}

async function requireGuest(tx: Tx, clubId: string, guestId: string): Promise<string> {
  const guest = await lockMember(tx, clubId, guestId);
  if (!guest.isGuest) throw notFound('This guest');
  if (guest.status !== 'active') throw wrongState(`${guest.displayName} is not in the club.`);
  const [open] = await select<{ id: string }>(
    'select id from invitations where guest_membership_id = :guestId and revoked_at is null and accepted_at is null',
    { guestId },
    tx,
  );
  if (open)
    throw invalid({ guestId: `${guest.displayName} is invited already. Resend it, or revoke it.` });
  return guest.displayName;
}

async function write(
  tx: Tx,
  actor: ClubActor,
  wanted: { kind: 'link' | 'email'; email?: string; name: string; guestId?: string },
): Promise<{ id: string; token: string }> {
  const token = makeToken();
  const [row] = await select<{ id: string }>(
    `insert into invitations (club_id, kind, token_hash, email, name, guest_membership_id, created_by_id, expires_at)
     values (:clubId, :kind, :hash, :email, :name, :guestId, :byId, clock_timestamp() + make_interval(days => :days))
     returning id`,
    {
      clubId: actor.club.id,
      kind: wanted.kind,
      hash: hashToken(token),
      email: wanted.email ?? null,
      name: wanted.name,
      guestId: wanted.guestId ?? null,
      byId: actor.membershipId,
      days: invitationDays,
    },
    tx,
  );
  if (!row) throw new Error('invitation not written');
  await writeAudit(tx, {
    clubId: actor.club.id,
    by: byActor(actor),
    action: wanted.kind === 'link' ? 'clubs.join_link' : 'clubs.invite',
    subject: { type: 'invitation', id: row.id },
    ...(wanted.email
      ? { after: { email: wanted.email, ...(wanted.guestId ? { guest: wanted.name } : {}) } }
      : {}),
  });
  return { id: row.id, token };
}

/**
 * A join link, told this once, or an invitation by e-mail to a newcomer or a guest.
 * @throws DomainProblem 422 at `email` or `guestId` when that person is in the club or invited already
 */
export async function invite(actor: ClubActor, body: InviteBody): Promise<InvitedReply> {
  const clubId = actor.club.id;
  try {
    return await transact(async (tx) => {
      await lockClub(tx, clubId);
      if (body.kind === 'link') {
        const { id, token } = await write(tx, actor, { kind: 'link', name: '' });
        return { invitation: await getInvitation(clubId, id, tx), path: `/join/${token}` };
      }
      await requireNotMember(tx, clubId, body.email);
      const name = body.guestId ? await requireGuest(tx, clubId, body.guestId) : body.name;
      const { id, token } = await write(tx, actor, {
        kind: 'email',
        email: body.email,
        name,
        ...(body.guestId ? { guestId: body.guestId } : {}),
      });
      await mailInvitation(tx, actor, { id, token, email: body.email, name });
      return { invitation: await getInvitation(clubId, id, tx), path: null };
    });
  } catch (error) {
    if (!isUniqueViolation(error, 'invitations_open_email')) throw error;
    throw invalid({ email: 'This address is invited already. Resend it, or revoke it.' });
  }
}
