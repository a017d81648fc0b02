import type { Tx } from '../../config/database.ts';
import { hashToken } from '../accounts/tokens.ts';
import type { ClubActor } from '../actors.ts';
import { queueMail } from '../notices/queueNotice.ts';

/** The mail that carries an invitation's link; each token is mailed once. */
export async function mailInvitation(
  tx: Tx,
  actor: ClubActor,
  invitation: { id: string; token: string; email: string; name: string },
): Promise<void> {
  await queueMail(tx, {
    clubId: actor.club.id,
    kind: 'invitation',
    eventKey: `invitation:${invitation.id}:${hashToken(invitation.token).slice(0, 16)}`,
    address: invitation.email,
    greeting: invitation.name || 'there',
    from: actor.club.name,
    content: {
      subject: `${actor.name} invites you to ${actor.club.name}`,
      paragraphs: [
        `${actor.name} invites you to join ${actor.club.name}, a club that buys dry salts together, splits the sacks and shares the cost.`,
        'The link works once, for 14 days. If you did not expect this, do nothing.',
      ],
      action: { label: `Join ${actor.club.name}`, path: `/join/${invitation.token}` },
    },
  });
}
