import type { ClubSalt } from '#shared/schemas/salts.ts';
import { execute, select, transact } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { notFound } from '../problem.ts';
import { findSalt } from './saltsOfClub.ts';

/**
 * Hides a salt from the club's list, or shows it again; a repeat changes nothing.
 * @throws DomainProblem 404
 */
export async function hideSalt(
  actor: ClubActor,
  saltId: string,
  hidden: boolean,
): Promise<ClubSalt> {
  return transact(async (tx) => {
    const clubId = actor.club.id;
    await select('select id from clubs where id = :clubId for no key update', { clubId }, tx);
    const salt = await findSalt(clubId, saltId, tx);
    if (!salt) throw notFound('This salt');
    if (salt.hidden === hidden) return salt;
    await execute(
      hidden
        ? 'insert into hidden_salts (club_id, salt_id) values (:clubId, :saltId)'
        : 'delete from hidden_salts where club_id = :clubId and salt_id = :saltId',
      { clubId, saltId },
      tx,
    );
    await writeAudit(tx, {
      clubId,
      by: byActor(actor),
      action: hidden ? 'salts.hide' : 'salts.show',
      subject: { type: 'salt', id: saltId },
      after: { name: salt.name },
    });
    return { ...salt, hidden };
  });
}
