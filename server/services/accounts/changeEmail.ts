import type { ChangeEmailBody } from '#shared/schemas/accounts.ts';
import { isUniqueViolation, transact, type Tx } from '../../config/database.ts';
import { Account } from '../../models/Account.ts';
import { invalid } from '../problem.ts';
import { lockOwnAccount } from './lockOwnAccount.ts';
import { mailAccount } from './mailAccount.ts';
import { findAccountToken, issueAccountToken, takeAccountToken, tokenSpent } from './tokens.ts';

const minutes = 24 * 60;

async function mailNewAddress(
  tx: Tx,
  account: Account,
  email: string,
  token: { id: string; token: string },
): Promise<void> {
  const taken = await Account.findByEmail(email, tx);
  const content = taken
    ? {
        subject: 'This address has an account already',
        paragraphs: [
          'Somebody asked to use this address for another account. It has an account already, so nothing was changed.',
        ],
      }
    : {
        subject: 'Confirm your new address',
        paragraphs: [
          'You asked to use this address for your account. The link below confirms it, once, within 24 hours.',
          "If it wasn't you, do nothing.",
        ],
        action: { label: 'Confirm this address', path: `/confirm-email/${token.token}` },
      };
  await mailAccount(tx, {
    accountId: account.id,
    eventKey: `email:${token.id}`,
    address: email,
    greeting: account.displayName,
    content,
  });
}

/**
 * Asks for another address, which changes only once it is confirmed there. The reply is the same whether or not that
 * address has an account.
 * @throws DomainProblem 422 at `password` or `email`
 */
export async function requestEmailChange(accountId: string, body: ChangeEmailBody): Promise<void> {
  await transact(async (tx) => {
    const account = await lockOwnAccount(tx, accountId, body.password, 'password');
    if (account.email.toLowerCase() === body.email.toLowerCase()) {
      throw invalid({ email: 'This is your address already.' });
    }
    const token = await issueAccountToken(tx, {
      accountId,
      kind: 'email',
      minutes,
      newEmail: body.email,
    });
    await mailNewAddress(tx, account, body.email, token);
  });
}

/**
 * The address that a link confirms; the link stays unused.
 * @throws DomainProblem 409 `token_spent`
 */
export async function readEmailChange(token: string): Promise<{ email: string }> {
  const found = await findAccountToken('email', token);
  if (!found?.newEmail) throw tokenSpent('This link');
  return { email: found.newEmail };
}

/**
 * Puts the confirmed address in place and tells the old one.
 * @throws DomainProblem 409 `token_spent`, also when another account has taken the address meanwhile
 */
export async function confirmEmailChange(token: string): Promise<{ email: string }> {
  try {
    return await transact(async (tx) => {
      const taken = await takeAccountToken(tx, 'email', token);
      if (!taken?.newEmail) throw tokenSpent('This link');
      const account = await Account.findByPk(taken.accountId, {
        transaction: tx.transaction,
        lock: tx.transaction.LOCK.UPDATE,
        rejectOnEmpty: true,
      });
      const old = account.email;
      account.email = taken.newEmail;
      await account.save({ transaction: tx.transaction });
      await mailAccount(tx, {
        accountId: account.id,
        eventKey: `email-done:${taken.id}`,
        address: old,
        greeting: account.displayName,
        content: {
          subject: 'Your address was changed',
          paragraphs: [
            `Your account now uses ${taken.newEmail}. Mail no longer goes to this address.`,
            "If it wasn't you, tell your club's steward at once.",
          ],
        },
      });
      return { email: account.email };
    });
  } catch (error) {
    if (isUniqueViolation(error, 'accounts_email')) throw tokenSpent('This link');
    throw error;
  }
}
