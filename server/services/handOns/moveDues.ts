import { execute, type Tx } from '../../config/database.ts';
import type { By } from '../actorName.ts';
import { postTransaction } from '../ledger/postTransaction.ts';
import type { Hand } from './moveSnapshots.ts';

async function shift(
  buyId: string,
  membershipId: string,
  change: { dueMinor: number; finalMinor: number | null },
  tx: Tx,
): Promise<void> {
  const { dueMinor, finalMinor } = change;
  await execute(
    `insert into buy_members (buy_id, membership_id, locked_minor, due_minor, final_minor)
     values (:buyId, :membershipId, :dueMinor, :dueMinor, :finalMinor)
     on conflict (buy_id, membership_id) do update set
       locked_minor = case when buy_members.dropped_at is null then coalesce(buy_members.locked_minor, 0) else 0 end + :dueMinor,
       due_minor = case when buy_members.dropped_at is null then coalesce(buy_members.due_minor, 0) else 0 end + :dueMinor,
       final_minor = case when :finalMinor::bigint is null then buy_members.final_minor
         else coalesce(buy_members.final_minor, 0) + :finalMinor::bigint end,
       dropped_at = null, version = buy_members.version + 1, updated_at = now()`,
    { buyId, membershipId, dueMinor, finalMinor },
    tx,
  );
}

/**
 * What the giver owes less, the taker owes more. Before the final share the dues move; after it the money moves by a
 * posting between the two accounts. What the giver has paid stays theirs, as credit.
 */
export async function moveDues(
  hand: Hand,
  sums: { amountMinor: number; estimateMinor: number; isFinal: boolean },
  entry: { handOnId: string; clubId: string; onDate: string; memo: string; by: By },
  tx: Tx,
): Promise<void> {
  const { buyId, fromId, toId } = hand;
  const { amountMinor, estimateMinor, isFinal } = sums;
  const change = { dueMinor: estimateMinor, finalMinor: isFinal ? amountMinor : null };
  await shift(
    buyId,
    fromId,
    { dueMinor: -estimateMinor, finalMinor: isFinal ? -amountMinor : null },
    tx,
  );
  await shift(buyId, toId, change, tx);
  if (!isFinal) return;
  await postTransaction(tx, {
    clubId: entry.clubId,
    buyId,
    eventType: 'hand_on',
    eventId: entry.handOnId,
    onDate: entry.onDate,
    memo: entry.memo,
    by: entry.by,
    postings: [
      { account: { kind: 'member', refId: fromId }, amountMinor: -amountMinor },
      { account: { kind: 'member', refId: toId }, amountMinor },
    ],
  });
}
