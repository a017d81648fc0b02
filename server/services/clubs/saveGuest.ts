import type { GuestBody, UpdateGuestBody } from '#shared/schemas/members.ts';
import { select, transact, type Tx } from '../../config/database.ts';
import { Membership } from '../../models/Membership.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { invalid, notFound, stale } from '../problem.ts';
import { lockClub, lockMember } from './lockClub.ts';

async function requireVoucher(tx: Tx, clubId: string, memberId: string): Promise<void> {
  const [row] = await select<{ id: string }>(
    `select id from memberships where id = :memberId and club_id = :clubId and status = 'active' and not is_guest`,
    { memberId, clubId },
    tx,
  );
  if (!row)
    throw invalid({ vouchedById: 'Choose a member of the club who vouches for the guest.' });
}

/**
 * Adds a guest: a membership without sign-in.
 * @returns the membership's id
 * @throws DomainProblem 422 at `vouchedById`
 */
export async function addGuest(actor: ClubActor, body: GuestBody): Promise<string> {
  return transact(async (tx) => {
    await lockClub(tx, actor.club.id);
    await requireVoucher(tx, actor.club.id, body.vouchedById);
    const guest = await Membership.create(
      {
        clubId: actor.club.id,
        displayName: body.displayName,
        isGuest: true,
        guestContact: body.contact,
        vouchedById: body.vouchedById,
      },
      { transaction: tx.transaction },
    );
    await writeAudit(tx, {
      clubId: actor.club.id,
      by: byActor(actor),
      action: 'clubs.guest_add',
      subject: { type: 'membership', id: guest.id },
      after: { ...body },
    });
    return guest.id;
  });
}

/**
 * Changes a guest's name, contact or who vouches for them.
 * @throws DomainProblem 404 when it is no guest, 409 `stale`, 422 at `vouchedById`
 */
export async function updateGuest(
  actor: ClubActor,
  guestId: string,
  body: UpdateGuestBody,
): Promise<void> {
  await transact(async (tx) => {
    await lockClub(tx, actor.club.id);
    const guest = await lockMember(tx, actor.club.id, guestId);
    if (!guest.isGuest) throw notFound('This guest');
    if (guest.version !== body.version) {
      throw stale(`${guest.displayName} was changed since you opened the page.`, {
        version: guest.version,
      });
    }
    if (guest.vouchedById !== body.vouchedById) {
      await requireVoucher(tx, actor.club.id, body.vouchedById);
    }
    const before = {
      displayName: guest.displayName,
      contact: guest.guestContact,
      vouchedById: guest.vouchedById,
    };
    guest.displayName = body.displayName;
    guest.guestContact = body.contact;
    guest.vouchedById = body.vouchedById;
    guest.version += 1;
    await guest.save({ transaction: tx.transaction });
    await writeAudit(tx, {
      clubId: actor.club.id,
      by: byActor(actor),
      action: 'clubs.guest_change',
      subject: { type: 'membership', id: guestId },
      before,
      after: {
        displayName: body.displayName,
        contact: body.contact,
        vouchedById: body.vouchedById,
      },
    });
  });
}
