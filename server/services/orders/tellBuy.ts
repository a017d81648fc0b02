import type { Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import { publishToBuy } from '../../sockets/publish.ts';

/** After the commit, tells all who look at the buy that its terms changed or that it moved on. */
export function tellBuyChanged(buy: Buy, kind: 'terms' | 'state', tx: Tx): void {
  const { id: buyId, sheetVersion, state } = buy;
  tx.afterCommit(() =>
    publishToBuy(
      buyId,
      'buy:changed',
      kind === 'terms'
        ? { kind, buyId, sheetVersion }
        : { kind, buyId, sheetVersion, state, frozen: false },
    ),
  );
}
