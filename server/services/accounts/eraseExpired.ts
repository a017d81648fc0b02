import { execute, transact } from '../../config/database.ts';

const stale: readonly string[] = [
  'delete from rate_limits where resets_at < now()',
  `delete from account_tokens where expires_at < now() - interval '1 day' or used_at < now() - interval '1 day'`,
  // Addresses of people who never came; an invitation that was taken stays with the membership.
  `delete from invitations where accepted_at is null
     and least(expires_at, coalesce(revoked_at, expires_at)) < now() - interval '90 days'`,
];

/** Erases what has run out: limits, links' secrets, and invitations that nobody took within 90 days. */
export async function eraseExpired(): Promise<void> {
  await transact(async (tx) => {
    for (const sql of stale) await execute(sql, {}, tx);
  });
}
