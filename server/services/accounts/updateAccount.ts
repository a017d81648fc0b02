import { execute, transact } from '../../config/database.ts';
import { endSessions } from './endSessions.ts';

/** The name that new clubs start with; names in present clubs stay. */
export async function renameAccount(accountId: string, displayName: string): Promise<void> {
  await transact((tx) =>
    execute(
      'update accounts set display_name = :displayName, updated_at = now() where id = :accountId and deleted_at is null',
      { accountId, displayName },
      tx,
    ),
  );
}

/** Signs an account out everywhere, the place that asks included. */
export async function signOutEverywhere(accountId: string): Promise<void> {
  await transact((tx) => endSessions(tx, accountId));
}
