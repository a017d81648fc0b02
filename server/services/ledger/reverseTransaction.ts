import { select, type Tx } from '../../config/database.ts';
import type { By } from '../actorName.ts';
import { wrongState } from '../problem.ts';
import { postTransaction, type LedgerAccountRef } from './postTransaction.ts';

interface PostedRow {
  club_id: string;
  buy_id: string | null;
  kind: LedgerAccountRef['kind'];
  ref_id: string | null;
  amount_minor: number;
  posting_buy_id: string | null;
}

function accountRef({ kind, ref_id }: PostedRow): LedgerAccountRef {
  return (ref_id === null ? { kind } : { kind, refId: ref_id }) as LedgerAccountRef;
}

/**
 * Takes a posted transaction back by its mirror image; nothing posted is ever changed.
 * @throws DomainProblem 409 `wrong_state` when it is reversed already
 */
export async function reverseTransaction(
  tx: Tx,
  reversal: { transactionId: string; onDate: string; reason: string; by: By },
): Promise<string> {
  const rows = await select<PostedRow>(
    `select t.club_id, t.buy_id, a.kind, a.ref_id, p.amount_minor, p.buy_id as posting_buy_id
     from ledger_transactions t join ledger_postings p on p.transaction_id = t.id
     join ledger_accounts a on a.id = p.account_id
     where t.id = :id order by p.id`,
    { id: reversal.transactionId },
    tx,
  );
  const [first] = rows;
  if (!first) throw new Error(`no ledger transaction ${reversal.transactionId}`);
  const posted = await postTransaction(tx, {
    clubId: first.club_id,
    eventType: 'reversal',
    eventId: reversal.transactionId,
    onDate: reversal.onDate,
    memo: reversal.reason,
    ...(first.buy_id === null ? {} : { buyId: first.buy_id }),
    reversesId: reversal.transactionId,
    by: reversal.by,
    postings: rows.map((row) => ({
      account: accountRef(row),
      amountMinor: 0 - row.amount_minor,
      buyId: row.posting_buy_id,
    })),
  });
  if (!posted) throw wrongState('This is reversed already.');
  return posted;
}

/** Ids of the transactions that events posted, in the order of the events. */
export async function transactionsOf(
  clubId: string,
  events: readonly (readonly [type: string, id: string])[],
  tx: Tx,
): Promise<string[]> {
  const found: string[] = [];
  for (const [eventType, eventId] of events) {
    const rows = await select<{ id: string }>(
      `select id from ledger_transactions
       where club_id = :clubId and event_type = :eventType and event_id = :eventId order by created_at`,
      { clubId, eventType, eventId },
      tx,
    );
    found.push(...rows.map(({ id }) => id));
  }
  return found;
}
