import { transact } from '../../config/database.ts';
import { Account } from '../../models/Account.ts';
import { mailAccount } from './mailAccount.ts';
import { issueAccountToken } from './tokens.ts';

const minutes = 60;
// The reply takes as long whether or not there is an account, so that its time tells nothing.
const leastMs = 250;

/** Sends a link that sets a new password once, within an hour, if the address has an account. */
export async function requestReset(email: string): Promise<void> {
  const work = transact(async (tx) => {
    const account = await Account.findByEmail(email, tx, true);
    if (!account) return;
    const { id, token } = await issueAccountToken(tx, {
      accountId: account.id,
      kind: 'reset',
      minutes,
    });
    await mailAccount(tx, {
      accountId: account.id,
      eventKey: `reset:${id}`,
      address: account.email,
      greeting: account.displayName,
      content: {
        subject: 'Set a new password',
        paragraphs: [
          'Somebody asked to reset the password of your account. The link below works once, within an hour.',
          "If it wasn't you, do nothing: your password stays as it is.",
        ],
        action: { label: 'Set a new password', path: `/reset/${token}` },
      },
    });
  });
  await Promise.all([work, new Promise((resolve) => setTimeout(resolve, leastMs))]);
}
