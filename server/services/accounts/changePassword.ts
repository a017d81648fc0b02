import { randomUUID } from 'node:crypto';
import type { ChangePasswordBody } from '#shared/schemas/accounts.ts';
import { transact } from '../../config/database.ts';
import { endSessions } from './endSessions.ts';
import { lockOwnAccount } from './lockOwnAccount.ts';
import { requireGoodPassword } from './passwordRules.ts';
import { hashPassword } from './passwords.ts';
import { tellPasswordChanged } from './resetPassword.ts';

/**
 * A new password for one's own account; every session but the one at hand ends.
 * @throws DomainProblem 422 at `current` when the password given is wrong, at `password` for a common one
 */
export async function changePassword(
  accountId: string,
  body: ChangePasswordBody,
  sid: string,
): Promise<void> {
  requireGoodPassword(body.password);
  const passwordHash = await hashPassword(body.password);
  await transact(async (tx) => {
    const account = await lockOwnAccount(tx, accountId, body.current, 'current');
    account.passwordHash = passwordHash;
    await account.save({ transaction: tx.transaction });
    await endSessions(tx, accountId, sid);
    await tellPasswordChanged(tx, account, `password:${randomUUID()}`);
  });
}
