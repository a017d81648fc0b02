import type { ClubReply, FirstSteps, PublicClub } from '#shared/schemas/clubs.ts';
import { select } from '../../config/database.ts';
import { Club } from '../../models/Club.ts';
import { presentClub } from '../../presenters/clubs.ts';
import { canChangeClub, canSetShelfLimit } from '../../policies/clubs.ts';
import type { ClubActor } from '../actors.ts';
import { notFound } from '../problem.ts';
import { hasBooks } from './updateClub.ts';

/** The club's particulars, and which of them the reader may change. */
export async function readClub(actor: ClubActor): Promise<ClubReply> {
  const club = await Club.findByPk(actor.club.id, { rejectOnEmpty: true });
  return presentClub(club, {
    currencyFixed: await hasBooks(club.id),
    may: { edit: canChangeClub(actor), setShelfLimit: canSetShelfLimit(actor) },
  });
}

/**
 * What strangers see of a club: name, note and contact, nothing else.
 * @throws DomainProblem 404
 */
export async function readPublicClub(slug: string): Promise<PublicClub> {
  const [row] = await select<PublicClub>(
    'select slug, name, note, contact from clubs where slug = :slug',
    { slug },
  );
  if (!row) throw notFound('This club');
  return row;
}

/** How far the club has come on the way to its first buy. */
export async function readFirstSteps(actor: ClubActor): Promise<FirstSteps> {
  const [row] = await select<FirstSteps>(
    `select
       (select count(*)::integer from memberships where club_id = c.id and status = 'active') as members,
       (select count(*)::integer from invitations where club_id = c.id and revoked_at is null
          and accepted_at is null and expires_at > now()) as invited,
       (select count(*)::integer from suppliers where club_id = c.id and archived_at is null and not is_shelf) as suppliers,
       (select count(*)::integer from offers where club_id = c.id and archived_at is null) as offers,
       (select count(*)::integer from buys where club_id = c.id and (opened_at is not null or responsible_id = :memberId)) as buys,
       c.contact <> '' as "hasContact", c.transfer_how <> '' as "hasTransfer"
     from clubs c where c.id = :clubId`,
    { clubId: actor.club.id, memberId: actor.membershipId },
  );
  if (!row) throw notFound('This club');
  return row;
}
