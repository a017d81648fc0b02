import type { SignUpBody } from '#shared/schemas/accounts.ts';
import { isUniqueViolation, transact } from '../../config/database.ts';
import { Account } from '../../models/Account.ts';
import { DomainProblem } from '../problem.ts';
import { requireGoodPassword } from './passwordRules.ts';
import { hashPassword } from './passwords.ts';

/**
 * A new account, without a club yet.
 * @returns the account's id
 * @throws DomainProblem 422 for a common password, 409 `already_there` when the address has an account
 */
export async function signUp(body: SignUpBody): Promise<string> {
  requireGoodPassword(body.password);
  const passwordHash = await hashPassword(body.password);
  try {
    return await transact(async (tx) => {
      const account = await Account.create(
        { email: body.email, displayName: body.displayName, passwordHash },
        { transaction: tx.transaction },
      );
      return account.id;
    });
  } catch (error) {
    if (!isUniqueViolation(error, 'accounts_email')) throw error;
    throw new DomainProblem(
      409,
      'already_there',
      'This address has an account already. Sign in, or reset its password.',
      { errors: { email: 'This address has an account already.' } },
    );
  }
}
