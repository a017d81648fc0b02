import { select, type Tx } from '../../config/database.ts';
import { invalid } from '../problem.ts';

/** Today in the club's zone by the database's clock, YYYY-MM-DD. */
export async function clubToday(clubId: string, tx?: Tx): Promise<string> {
  const [row] = await select<{ today: string }>(
    'select (clock_timestamp() at time zone time_zone)::date as today from clubs where id = :clubId',
    { clubId },
    tx,
  );
  if (!row) throw new Error(`no club ${clubId}`);
  return row.today;
}

/** @throws DomainProblem 422 at `field` when the day hasn't come yet in the club's zone */
export async function checkNotAhead(
  clubId: string,
  day: string,
  field: string,
  tx: Tx,
): Promise<void> {
  if (day > (await clubToday(clubId, tx))) {
    throw invalid({ [field]: 'This day has not come yet.' });
  }
}
