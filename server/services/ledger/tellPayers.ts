import type { PaymentReply } from '#shared/schemas/ledger.ts';
import { select, type Tx } from '../../config/database.ts';
import { publishToBuy } from '../../sockets/publish.ts';

/** After the commit, lets open pages of the buys that a payment concerns look again; what was paid is not said. */
export async function tellPaymentPages(payment: PaymentReply, tx: Tx): Promise<void> {
  const ids = payment.parts.flatMap(({ buyId }) => buyId ?? []);
  if (ids.length === 0) return;
  const buys = await select<{ id: string; sheet_version: number }>(
    'select id, sheet_version from buys where id in (:ids)',
    { ids },
    tx,
  );
  tx.afterCommit(() => {
    for (const { id: buyId, sheet_version: sheetVersion } of buys) {
      publishToBuy(buyId, 'buy:changed', { kind: 'terms', buyId, sheetVersion });
    }
  });
}
