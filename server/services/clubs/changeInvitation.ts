import { execute, select, transact, type Tx } from '../../config/database.ts';
import { hashToken, makeToken } from '../accounts/tokens.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { notFound, wrongState } from '../problem.ts';
import { invitationDays } from './invite.ts';
import { mailInvitation } from './mailInvitation.ts';

interface Open {
  id: string;
  kind: 'link' | 'email';
  email: string | null;
  name: string;
}

async function lockOpen(tx: Tx, clubId: string, id: string): Promise<Open> {
  const [row] = await select<Open>(
    `select id, kind, email, name from invitations
     where id = :id and club_id = :clubId and revoked_at is null and accepted_at is null for update`,
    { id, clubId },
    tx,
  );
  if (!row) throw notFound('This invitation');
  return row;
}

/**
 * Makes an invitation's link useless, at once.
 * @throws DomainProblem 404 when it was taken or revoked already
 */
export async function revokeInvitation(actor: ClubActor, id: string): Promise<void> {
  await transact(async (tx) => {
    const invitation = await lockOpen(tx, actor.club.id, id);
    await execute(
      'update invitations set revoked_at = clock_timestamp() where id = :id',
      { id },
      tx,
    );
    await writeAudit(tx, {
      clubId: actor.club.id,
      by: byActor(actor),
      action: 'clubs.invitation_revoke',
      subject: { type: 'invitation', id },
      before: invitation.email ? { email: invitation.email } : { kind: 'join link' },
    });
  });
}

/**
 * Sends an e-mailed invitation again under a new link, for another 14 days; the earlier link stops working.
 * @throws DomainProblem 404, 409 `wrong_state` for a join link, which is known to nobody here
 */
export async function resendInvitation(actor: ClubActor, id: string): Promise<void> {
  await transact(async (tx) => {
    const { kind, email, name } = await lockOpen(tx, actor.club.id, id);
    if (kind !== 'email' || !email) {
      throw wrongState("A join link can't be shown again. Make a new one.");
    }
    const token = makeToken();
    await execute(
      `update invitations set token_hash = :hash, sent_at = clock_timestamp(),
         expires_at = clock_timestamp() + make_interval(days => :days) where id = :id`,
      { id, hash: hashToken(token), days: invitationDays },
      tx,
    );
    await mailInvitation(tx, actor, { id, token, email, name });
    await writeAudit(tx, {
      clubId: actor.club.id,
      by: byActor(actor),
      action: 'clubs.invitation_resend',
      subject: { type: 'invitation', id },
      after: { email },
    });
  });
}
