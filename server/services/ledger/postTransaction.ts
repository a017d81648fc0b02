import { select, execute, type Tx } from '../../config/database.ts';
import type { By } from '../actorName.ts';

/** An account of the club's books; the member, supplier and buy accounts name whose they are. */
export type LedgerAccountRef =
  | { kind: 'bank' | 'cash' | 'card_clearing' | 'shelf' | 'fees' | 'losses' | 'rounding' }
  | { kind: 'cash_held' | 'member' | 'supplier' | 'buy'; refId: string };

export interface Posting {
  readonly account: LedgerAccountRef;
  /** Minor units; debit positive, credit negative. What a member owes is a debit on their account. */
  readonly amountMinor: number;
  /** The buy it concerns, when that isn't the entry's; null for none. */
  readonly buyId?: string | null;
}

async function accountId(clubId: string, ref: LedgerAccountRef, tx: Tx): Promise<string> {
  const refId = 'refId' in ref ? ref.refId : null;
  const values = { clubId, kind: ref.kind, refId };
  await execute(
    'insert into ledger_accounts (club_id, kind, ref_id) values (:clubId, :kind, :refId) on conflict do nothing',
    values,
    tx,
  );
  const [row] = await select<{ id: string }>(
    'select id from ledger_accounts where club_id = :clubId and kind = :kind and ref_id is not distinct from :refId::uuid',
    values,
    tx,
  );
  if (!row) throw new Error('ledger account missing');
  return row.id;
}

/**
 * Posts one event to the books. Zero amounts are left out; the sum is checked by the database at commit. The same
 * event (`eventType` + `eventId`) posts once: a repeat returns null and writes nothing.
 * @returns the transaction's id, or null when there was nothing to post or it is posted already
 */
export async function postTransaction(
  tx: Tx,
  entry: {
    clubId: string;
    eventType: string;
    eventId: string;
    /** Calendar day in the club's zone, YYYY-MM-DD. */
    onDate: string;
    memo: string;
    buyId?: string;
    reversesId?: string;
    by: By;
    postings: readonly Posting[];
  },
): Promise<string | null> {
  const postings = entry.postings.filter(({ amountMinor }) => amountMinor !== 0);
  if (postings.length === 0) return null;
  const [row] = await select<{ id: string }>(
    `insert into ledger_transactions (club_id, event_type, event_id, on_date, memo, buy_id, reverses_id, created_by_id)
     values (:clubId, :eventType, :eventId, :onDate, :memo, :buyId, :reversesId, :createdById)
     on conflict (club_id, event_type, event_id) do nothing returning id`,
    {
      clubId: entry.clubId,
      eventType: entry.eventType,
      eventId: entry.eventId,
      onDate: entry.onDate,
      memo: entry.memo,
      buyId: entry.buyId ?? null,
      reversesId: entry.reversesId ?? null,
      createdById: entry.by.membershipId,
    },
    tx,
  );
  if (!row) return null;
  for (const { account, amountMinor, buyId = entry.buyId ?? null } of postings) {
    await execute(
      `insert into ledger_postings (transaction_id, account_id, amount_minor, buy_id)
       values (:transactionId, :accountId, :amountMinor, :buyId)`,
      {
        transactionId: row.id,
        accountId: await accountId(entry.clubId, account, tx),
        amountMinor,
        buyId,
      },
      tx,
    );
  }
  return row.id;
}
