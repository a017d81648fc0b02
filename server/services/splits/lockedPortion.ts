import type { Tx } from '../../config/database.ts';
import { presentPortion, type PortionRow } from '../../presenters/splits.ts';
import { notFound, stale } from '../problem.ts';
import { findPortions } from './splitRows.ts';

/**
 * A portion of a buy that is locked.
 * @param version what the actor saw; absent where the act doesn't depend on it
 * @throws DomainProblem 404, or 409 `stale` with the portion as it is now
 */
export async function lockedPortion(
  buyId: string,
  portionId: string,
  version: number | undefined,
  tx: Tx,
): Promise<PortionRow> {
  const [row] = await findPortions(buyId, tx, [portionId]);
  if (!row) throw notFound('This portion');
  if (version !== undefined && version !== row.version) {
    throw stale('Somebody changed this portion meanwhile.', presentPortion(row));
  }
  return row;
}
