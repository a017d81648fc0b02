import { isUniqueViolation, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import { Line } from '../../models/Line.ts';
import { invalid, notFound } from '../problem.ts';
import { findSalt } from '../salts/saltsOfClub.ts';

/** A living line of a buy, under its buy's lock. */
export async function getLine(buy: Buy, lineId: string, tx: Tx): Promise<Line> {
  const line = await Line.findOne({
    where: { id: lineId, buyId: buy.id, removedAt: null },
    transaction: tx.transaction,
  });
  if (!line) throw notFound('This line');
  return line;
}

/** Who has a living pledge on a line. */
export async function pledgersOfLine(lineId: string, tx: Tx): Promise<string[]> {
  const rows = await select<{ membership_id: string }>(
    `select membership_id from pledges where line_id = :lineId and dropped_at is null
       and (wanted_mg > 0 or up_to_mg > 0) order by membership_id`,
    { lineId },
    tx,
  );
  return rows.map((row) => row.membership_id);
}

/** A line's salt as the club calls it. */
export const nameOf = async (buy: Buy, saltId: string, tx: Tx) =>
  (await findSalt(buy.clubId, saltId, tx))?.name ?? saltId;

/**
 * Says of a unique violation that the salt is a line already; anything else is thrown on.
 * @throws DomainProblem 422 at `saltId`
 */
export function oneOfItsSalt(error: unknown): never {
  if (isUniqueViolation(error, 'lines_salt'))
    throw invalid({ saltId: 'This salt is a line of the buy already.' });
  throw error;
}
