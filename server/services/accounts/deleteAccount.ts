import { execute, select, transact, type Tx } from '../../config/database.ts';
import { DomainProblem } from '../problem.ts';
import type { AccountActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { endMembership } from '../clubs/endMembership.ts';
import { lockClub, lockMember } from '../clubs/lockClub.ts';
import { owedOfMember } from '../ledger/owed.ts';
import { endSessions } from './endSessions.ts';
import { lockOwnAccount } from './lockOwnAccount.ts';

async function requireNothingOwed(tx: Tx, clubId: string, memberId: string): Promise<void> {
  const { openMinor } = await owedOfMember(clubId, memberId, tx);
  if (openMinor <= 0) return;
  const [club] = await select<{ name: string }>(
    'select name from clubs where id = :clubId',
    { clubId },
    tx,
  );
  throw new DomainProblem(
    409,
    'still_owed',
    `You still owe ${club?.name ?? 'a club'} money. Pay it first, then delete your account.`,
  );
}

/** Names stay where a buy or the books need them; elsewhere they go with the account. */
async function forgetNames(tx: Tx, accountId: string): Promise<void> {
  await execute(
    `update memberships m set display_name = 'Former member', legal_name = null, updated_at = now()
     where m.account_id = :accountId
       and not exists (select 1 from pledges p where p.membership_id = m.id)
       and not exists (select 1 from ledger_accounts l where l.ref_id = m.id)
       and not exists (select 1 from ledger_transactions t where t.created_by_id = m.id)
       and not exists (select 1 from buys b where b.responsible_id = m.id)
       and not exists (select 1 from precursor_records r where r.membership_id = m.id or r.handed_by_id = m.id)`,
    { accountId },
    tx,
  );
}

async function endMemberships(tx: Tx, actor: AccountActor): Promise<void> {
  const rows = await select<{ id: string; club_id: string; status: string }>(
    'select id, club_id, status from memberships where account_id = :accountId order by club_id',
    { accountId: actor.accountId },
    tx,
  );
  for (const { id, club_id: clubId } of rows) {
    await lockClub(tx, clubId);
    const member = await lockMember(tx, clubId, id);
    await requireNothingOwed(tx, clubId, id);
    if (member.status === 'pending') {
      member.status = 'left';
      member.endedAt = new Date();
      await member.save({ transaction: tx.transaction });
    }
    if (member.status !== 'active') continue;
    const by = {
      membershipId: member.id,
      name: member.displayName,
      requestId: actor.requestId,
    };
    await endMembership(tx, member, 'left', by);
    await writeAudit(tx, {
      clubId,
      by,
      action: 'clubs.leave',
      subject: { type: 'membership', id },
      before: { status: 'active' },
      after: { status: 'left', accountDeleted: true },
    });
  }
}

/**
 * Deletes one's own account: memberships are left, sessions end, the address is free again. What a buy that was locked
 * holds under the person's name stays until it settles.
 * @throws DomainProblem 422 at `password`; 409 `last_of_role`, `still_owed`, or `wrong_state` while responsible for a buy
 */
export async function deleteAccount(actor: AccountActor, password: string): Promise<void> {
  await transact(async (tx) => {
    const account = await lockOwnAccount(tx, actor.accountId, password, 'password');
    await endMemberships(tx, actor);
    await forgetNames(tx, account.id);
    await execute('delete from account_tokens where account_id = :id', { id: account.id }, tx);
    account.email = '';
    account.displayName = 'Deleted account';
    account.passwordHash = '';
    account.deletedAt = new Date();
    await account.save({ transaction: tx.transaction });
    await endSessions(tx, account.id);
  });
}
