import { execute, type Tx } from '../../config/database.ts';
import { disconnectAccount } from '../../sockets/publish.ts';

/**
 * Ends every session of an account, but the one named; the sockets of those are closed in all processes.
 */
export async function endSessions(tx: Tx, accountId: string, exceptSid?: string): Promise<void> {
  await execute(
    `delete from session where sess -> 'passport' ->> 'user' = :accountId and sid is distinct from :exceptSid`,
    { accountId, exceptSid: exceptSid ?? null },
    tx,
  );
  tx.afterCommit(() => disconnectAccount(accountId, exceptSid));
}
