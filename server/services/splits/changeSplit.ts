import type { SplitChange } from '#shared/schemas/splits.ts';
import { select, type Tx } from '../../config/database.ts';
import { presentBag, presentPortion } from '../../presenters/splits.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import { hiddenLines } from './hiddenLines.ts';
import { findBags, findPortions } from './splitRows.ts';

/**
 * Counts one change of the bags or portions of a buy that is locked, and tells every open page after the commit; what
 * the club hides from most members is left out there, with `partly`, as is what `more` says changed besides.
 * @returns the change in full, as reply to the one who made it
 */
export async function changeSplit(
  buy: { id: string },
  changed: { portionIds?: readonly string[]; bagIds?: readonly string[]; more?: boolean },
  tx: Tx,
): Promise<SplitChange> {
  const [row] = await select<{ split_version: number }>(
    'update buys set split_version = split_version + 1 where id = :id returning split_version',
    { id: buy.id },
    tx,
  );
  if (!row) throw new Error('no such buy');
  const [bags, portions] = [
    await findBags(buy.id, tx, changed.bagIds ?? []),
    await findPortions(buy.id, tx, changed.portionIds ?? []),
  ];
  const change: SplitChange = {
    buyId: buy.id,
    splitVersion: row.split_version,
    bags: bags.map(presentBag),
    portions: portions.map(presentPortion),
    partly: changed.more === true,
  };
  const hidden = await hiddenLines(buy.id, tx);
  const told = change.portions.filter(({ lineId }) => !hidden.has(lineId));
  tx.afterCommit(() =>
    publishToBuy(buy.id, 'split:changed', {
      ...change,
      portions: told,
      partly: changed.more === true || told.length < change.portions.length,
    }),
  );
  return change;
}
