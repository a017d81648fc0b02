import type { Tx } from '../../config/database.ts';
import { Account } from '../../models/Account.ts';
import { invalid, notFound } from '../problem.ts';
import { verifyPassword } from './passwords.ts';

/**
 * One's own account under its row lock, once its password was given again.
 * @param field where the form shows that it is wrong
 * @throws DomainProblem 422 at `field`
 */
export async function lockOwnAccount(
  tx: Tx,
  accountId: string,
  password: string,
  field: string,
): Promise<Account> {
  const account = await Account.findOne({
    where: { id: accountId, deletedAt: null },
    transaction: tx.transaction,
    lock: tx.transaction.LOCK.UPDATE,
  });
  if (!account) throw notFound('This account');
  if (!(await verifyPassword(account.passwordHash, password))) {
    throw invalid({ [field]: 'This is not your password.' });
  }
  return account;
}
