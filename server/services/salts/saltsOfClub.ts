import { catalogue } from '#shared/domain/salts/data/catalogue.ts';
import { findCatalogueSalt } from '#shared/domain/salts/findCatalogueSalt.ts';
import type { ClubSalt } from '#shared/schemas/salts.ts';
import { select, type Tx } from '../../config/database.ts';
import { presentCatalogueSalt, presentOwnSalt, type OwnSaltRow } from '../../presenters/salts.ts';

const ownColumns = `id, kind, name, formula, cas, composition, hazard_statements as "hazardStatements",
  signal_word as "signalWord", storage, note, archived_at as "archivedAt", version`;

async function hiddenIds(clubId: string, tx?: Tx): Promise<Set<string>> {
  const rows = await select<{ salt_id: string }>(
    'select salt_id from hidden_salts where club_id = :clubId',
    { clubId },
    tx,
  );
  return new Set(rows.map((row) => row.salt_id));
}

/** All salts of a club by name: the shipped list and its own, hidden and archived ones included and marked. */
export async function listSalts(clubId: string, tx?: Tx): Promise<ClubSalt[]> {
  const hidden = await hiddenIds(clubId, tx);
  const own = await select<OwnSaltRow>(
    `select ${ownColumns} from club_salts where club_id = :clubId`,
    { clubId },
    tx,
  );
  return [
    ...catalogue.map((salt) => presentCatalogueSalt(salt, hidden.has(salt.id))),
    ...own.map((row) => presentOwnSalt(row, hidden.has(row.id))),
  ].sort((a, b) => a.name.localeCompare(b.name, 'en') || (a.id < b.id ? -1 : 1));
}

/**
 * The salts with these ids, by id. Hidden and archived ones are found too, for buys that already have them; another
 * club's own salt is not.
 */
export async function saltsByIds(
  clubId: string,
  ids: readonly string[],
  tx?: Tx,
): Promise<Map<string, ClubSalt>> {
  const found = new Map<string, ClubSalt>();
  if (ids.length === 0) return found;
  const hidden = await hiddenIds(clubId, tx);
  const others: string[] = [];
  for (const id of ids) {
    const shipped = findCatalogueSalt(id);
    if (shipped) found.set(id, presentCatalogueSalt(shipped, hidden.has(id)));
    else others.push(id);
  }
  if (others.length > 0) {
    const own = await select<OwnSaltRow>(
      `select ${ownColumns} from club_salts where club_id = :clubId and id::text in (:others)`,
      { clubId, others },
      tx,
    );
    own.forEach((row) => found.set(row.id, presentOwnSalt(row, hidden.has(row.id))));
  }
  return found;
}

/** One salt of a club, or null. */
export async function findSalt(clubId: string, saltId: string, tx?: Tx): Promise<ClubSalt | null> {
  return (await saltsByIds(clubId, [saltId], tx)).get(saltId) ?? null;
}
