import { execute, type Tx } from '../../config/database.ts';
import { disconnectAccount } from '../../sockets/publish.ts';

/**
 * Ends every session of an account, but the one named; its sockets are closed in all processes, and a page that is
 * still signed in connects again.
 */
export async function endSessions(tx: Tx, accountId: string, exceptSid?: string): Promise<void> {
  await execute(
    `delete from session where sess -> 'passport' ->> 'user' = :accountId and sid is distinct from :exceptSid`,
    { accountId, exceptSid: exceptSid ?? null },
    tx,
  );
  tx.afterCommit(() => disconnectAccount(accountId));
}
