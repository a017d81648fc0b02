import type { Invitation, InvitationList } from '#shared/schemas/invitations.ts';
import { select, type Tx } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { notFound } from '../problem.ts';

interface Row {
  id: string;
  kind: Invitation['kind'];
  email: string | null;
  name: string;
  guest_name: string | null;
  created_by: string;
  sent_at: Date;
  expires_at: Date;
  expired: boolean;
}

const open = `select i.id, i.kind, i.email, i.name, g.display_name as guest_name, m.display_name as created_by,
    i.sent_at, i.expires_at, i.expires_at <= clock_timestamp() as expired
  from invitations i join memberships m on m.id = i.created_by_id
  left join memberships g on g.id = i.guest_membership_id
  where i.club_id = :clubId and i.revoked_at is null and i.accepted_at is null`;

function present(row: Row): Invitation {
  return {
    id: row.id,
    kind: row.kind,
    email: row.email,
    name: row.name,
    guestName: row.guest_name,
    createdBy: row.created_by,
    sentAt: row.sent_at.toISOString(),
    expiresAt: row.expires_at.toISOString(),
    expired: row.expired,
  };
}

/** Invitations that nobody took yet and nobody revoked, newest first. */
export async function listInvitations(actor: ClubActor): Promise<InvitationList> {
  const [rows, [club]] = await Promise.all([
    select<Row>(`${open} order by i.sent_at desc, i.id`, { clubId: actor.club.id }),
    select<{ approval: boolean }>(
      'select join_needs_approval as approval from clubs where id = :clubId',
      { clubId: actor.club.id },
    ),
  ]);
  return { invitations: rows.map(present), joinNeedsApproval: club?.approval ?? true };
}

/**
 * One open invitation of a club.
 * @throws DomainProblem 404
 */
export async function getInvitation(clubId: string, id: string, tx?: Tx): Promise<Invitation> {
  const [row] = await select<Row>(`${open} and i.id = :id`, { clubId, id }, tx);
  if (!row) throw notFound('This invitation');
  return present(row);
}
