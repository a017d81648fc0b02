import { transact } from '../../config/database.ts';
import { Account } from '../../models/Account.ts';
import { endSessions } from './endSessions.ts';
import { mailAccount } from './mailAccount.ts';
import { requireGoodPassword } from './passwordRules.ts';
import { hashPassword } from './passwords.ts';
import { findAccountToken, takeAccountToken, tokenSpent } from './tokens.ts';

/**
 * The address whose password a link resets; the link stays unused.
 * @throws DomainProblem 409 `token_spent`
 */
export async function readReset(token: string): Promise<{ email: string }> {
  const found = await findAccountToken('reset', token);
  if (!found) throw tokenSpent('This link');
  return { email: found.email };
}

/**
 * Sets a new password by a link from a mail, and ends every session of the account.
 * @returns the account's id
 * @throws DomainProblem 422 for a common password (the link stays usable), 409 `token_spent`
 */
export async function resetPassword(token: string, password: string): Promise<string> {
  requireGoodPassword(password);
  const passwordHash = await hashPassword(password);
  return transact(async (tx) => {
    const taken = await takeAccountToken(tx, 'reset', token);
    if (!taken) throw tokenSpent('This link');
    const account = await Account.findByPk(taken.accountId, {
      transaction: tx.transaction,
      lock: tx.transaction.LOCK.UPDATE,
      rejectOnEmpty: true,
    });
    account.passwordHash = passwordHash;
    await account.save({ transaction: tx.transaction });
    await endSessions(tx, account.id);
    await tellPasswordChanged(tx, account, `reset-done:${taken.id}`);
    return account.id;
  });
}

/** Tells the owner of an account that its password was changed. */
export async function tellPasswordChanged(
  tx: Parameters<typeof mailAccount>[0],
  account: Account,
  eventKey: string,
): Promise<void> {
  await mailAccount(tx, {
    accountId: account.id,
    eventKey,
    address: account.email,
    greeting: account.displayName,
    content: {
      subject: 'Your password was changed',
      paragraphs: [
        'The password of your account was changed, and every other place was signed out.',
        "If it wasn't you, set a new one at once.",
      ],
      action: { label: 'Set a new password', path: '/reset' },
    },
  });
}
