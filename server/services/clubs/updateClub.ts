import type { ShelfLimitBody, UpdateClubBody } from '#shared/schemas/clubs.ts';
import { select, transact, type Tx } from '../../config/database.ts';
import { Club } from '../../models/Club.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { invalid, stale } from '../problem.ts';

type Changes = Partial<Omit<UpdateClubBody, 'version'> & { shelfLimitMinor: number }>;

/** Whether anything was ever posted in a club's books: from then on its currency is fixed. */
export async function hasBooks(clubId: string, tx?: Tx): Promise<boolean> {
  const [row] = await select<{ posted: boolean }>(
    'select exists (select 1 from ledger_transactions where club_id = :clubId) as posted',
    { clubId },
    tx,
  );
  return row?.posted ?? false;
}

async function change(actor: ClubActor, version: number, changes: Changes): Promise<void> {
  await transact(async (tx) => {
    // `for update` also holds back a first posting, which refers to this row.
    const club = await Club.findByPk(actor.club.id, {
      transaction: tx.transaction,
      lock: tx.transaction.LOCK.UPDATE,
      rejectOnEmpty: true,
    });
    if (club.version !== version) {
      throw stale(
        'Someone changed the settings since you opened the page. Nothing of yours was saved.',
        {
          version: club.version,
        },
      );
    }
    club.set(changes);
    const keys = (Object.keys(changes) as (keyof Changes)[]).filter((key) => club.changed(key));
    if (keys.length === 0) return;
    if (keys.includes('currency') && (await hasBooks(club.id, tx))) {
      throw invalid({ currency: 'The books have entries, so the currency stays as it is.' });
    }
    const pick = (read: (key: keyof Changes) => unknown) =>
      Object.fromEntries(keys.map((key) => [key, read(key)]));
    await writeAudit(tx, {
      clubId: club.id,
      by: byActor(actor),
      action: 'clubs.settings',
      subject: { type: 'club', id: club.id },
      before: pick((key) => club.previous(key)),
      after: pick((key) => club.get(key)),
    });
    club.version += 1;
    await club.save({ transaction: tx.transaction });
  });
}

/**
 * Changes some of a club's settings.
 * @throws DomainProblem 409 `stale`; 422 at `currency` once the books have entries
 */
export async function updateClub(actor: ClubActor, body: UpdateClubBody): Promise<void> {
  const { version, ...changes } = body;
  await change(actor, version, changes as Changes);
}

/**
 * Sets how much the club's shelf pays for left over, at most.
 * @throws DomainProblem 409 `stale`
 */
export async function setShelfLimit(actor: ClubActor, body: ShelfLimitBody): Promise<void> {
  await change(actor, body.version, { shelfLimitMinor: body.shelfLimitMinor });
}
