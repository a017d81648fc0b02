import { execute, type Tx } from '../../config/database.ts';
import type { By } from '../actorName.ts';

/**
 * One line of the audit log, in the transaction of what it tells. `before` and `after` hold only what changed; money
 * of members goes under a key `private`, which is left out for readers who may not see balances.
 */
export async function writeAudit(
  tx: Tx,
  entry: {
    clubId: string;
    buyId?: string;
    by: By;
    /** feature and verb, e.g. "buys.lock" */
    action: string;
    subject: { type: string; id?: string };
    before?: Record<string, unknown>;
    after?: Record<string, unknown>;
  },
): Promise<void> {
  await execute(
    `insert into audit_entries
      (club_id, buy_id, actor_id, actor_name, action, subject_type, subject_id, before, after, request_id)
     values (:clubId, :buyId, :actorId, :actorName, :action, :subjectType, :subjectId, :before, :after, :requestId)`,
    {
      clubId: entry.clubId,
      buyId: entry.buyId ?? null,
      actorId: entry.by.membershipId,
      actorName: entry.by.name,
      action: entry.action,
      subjectType: entry.subject.type,
      subjectId: entry.subject.id ?? null,
      before: entry.before ? JSON.stringify(entry.before) : null,
      after: entry.after ? JSON.stringify(entry.after) : null,
      requestId: entry.by.requestId ?? null,
    },
    tx,
  );
}
