import { checkOwnSalt } from '#shared/domain/salts/checkOwnSalt.ts';
import { signalWordOf } from '#shared/domain/salts/hazards.ts';
import type { ClubSalt as ClubSaltReply, OwnSaltBody } from '#shared/schemas/salts.ts';
import { isUniqueViolation, transact, type Tx } from '../../config/database.ts';
import { ClubSalt } from '../../models/ClubSalt.ts';
import { presentOwnSalt } from '../../presenters/salts.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { invalid, notFound, stale } from '../problem.ts';

const taken = { name: 'Your club already has a salt of this name.' };

function columnsOf(body: OwnSaltBody) {
  const errors = checkOwnSalt(body);
  if (Object.keys(errors).length > 0) throw invalid(errors);
  const statements = [...new Set(body.statements)].sort();
  return {
    kind: body.kind,
    name: body.name,
    formula: body.formula,
    cas: body.cas,
    composition: body.compositionPpm,
    hazardStatements: statements,
    signalWord: signalWordOf(statements, body.signalWord),
    storage: body.storage,
    note: body.note,
  };
}

async function orTaken<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (isUniqueViolation(error, 'club_salts_name')) throw invalid(taken);
    throw error;
  }
}

/**
 * Adds a salt or trace mix of the club's own.
 * @throws DomainProblem 422 by field: formula, CAS number, composition, hazard statements, a name that is taken
 */
export async function addOwnSalt(actor: ClubActor, body: OwnSaltBody): Promise<ClubSaltReply> {
  const columns = columnsOf(body);
  return orTaken(() =>
    transact(async (tx) => {
      const salt = await ClubSalt.create(
        { clubId: actor.club.id, ...columns },
        { transaction: tx.transaction },
      );
      await writeAudit(tx, {
        clubId: actor.club.id,
        by: byActor(actor),
        action: 'salts.add',
        subject: { type: 'salt', id: salt.id },
        after: columns,
      });
      return presentOwnSalt(salt, false);
    }),
  );
}

async function lockOwn(actor: ClubActor, id: string, version: number, tx: Tx): Promise<ClubSalt> {
  const salt = /^[0-9a-f-]{36}$/.test(id) ? await ClubSalt.lock(actor.club.id, id, tx) : null;
  if (!salt) throw notFound('This salt');
  if (salt.version !== version) {
    throw stale('Someone changed this salt since you opened it.', presentOwnSalt(salt, false));
  }
  return salt;
}

/**
 * Changes one of the club's own salts.
 * @throws DomainProblem 404, also for a salt of the shipped list; 409 `stale`; 422 by field
 */
export async function changeOwnSalt(
  actor: ClubActor,
  id: string,
  version: number,
  body: OwnSaltBody,
): Promise<ClubSaltReply> {
  const columns = columnsOf(body);
  return orTaken(() =>
    transact(async (tx) => {
      const salt = await lockOwn(actor, id, version, tx);
      salt.set(columns);
      const keys = (Object.keys(columns) as (keyof typeof columns)[]).filter((key) =>
        salt.changed(key),
      );
      if (keys.length > 0) {
        await writeAudit(tx, {
          clubId: actor.club.id,
          by: byActor(actor),
          action: 'salts.change',
          subject: { type: 'salt', id: salt.id },
          before: Object.fromEntries(keys.map((key) => [key, salt.previous(key)])),
          after: Object.fromEntries(keys.map((key) => [key, salt.get(key)])),
        });
        salt.version += 1;
        await salt.save({ transaction: tx.transaction });
      }
      return presentOwnSalt(salt, false);
    }),
  );
}

/**
 * Archives one of the club's own salts, or brings it back. Buys and offers that have it keep it.
 * @throws DomainProblem 404; 409 `stale`; 422 when its name is taken meanwhile
 */
export async function archiveOwnSalt(
  actor: ClubActor,
  id: string,
  version: number,
  archived: boolean,
): Promise<ClubSaltReply> {
  return orTaken(() =>
    transact(async (tx) => {
      const salt = await lockOwn(actor, id, version, tx);
      if ((salt.archivedAt !== null) !== archived) {
        salt.archivedAt = archived ? new Date() : null;
        salt.version += 1;
        await salt.save({ transaction: tx.transaction });
        await writeAudit(tx, {
          clubId: actor.club.id,
          by: byActor(actor),
          action: archived ? 'salts.archive' : 'salts.restore',
          subject: { type: 'salt', id: salt.id },
          after: { name: salt.name },
        });
      }
      return presentOwnSalt(salt, false);
    }),
  );
}
