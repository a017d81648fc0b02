import { execute, select, type Tx } from '../../config/database.ts';
import type { Membership } from '../../models/Membership.ts';
import { disconnectAccount } from '../../sockets/publish.ts';
import type { By } from '../actorName.ts';
import { wrongState } from '../problem.ts';
import { noRoles, requireOthers, setRoles } from './lockClub.ts';
import { passDrafts } from './passDrafts.ts';
import { withdrawPledges } from './withdrawPledges.ts';

async function requireNoBuyOfTheirs(tx: Tx, member: Membership): Promise<void> {
  const buys = await select<{ name: string }>(
    `select name from buys where responsible_id = :memberId and state not in ('draft', 'settled', 'cancelled') order by created_at`,
    { memberId: member.id },
    tx,
  );
  if (buys.length === 0) return;
  throw wrongState(
    `${member.displayName} is responsible for ${buys.map(({ name }) => name).join(', ')}. Pass ${buys.length > 1 ? 'these buys' : 'this buy'} on to another organiser first.`,
  );
}

/**
 * Ends a locked membership of a locked club: its roles and parts in running buys go, its pledges in open buys are
 * withdrawn, its sockets close. What it has in locked buys stays.
 * @throws DomainProblem 409 `last_of_role`, or `wrong_state` while the person is responsible for a buy that was opened
 */
export async function endMembership(
  tx: Tx,
  member: Membership,
  status: 'left' | 'removed',
  by: By,
): Promise<void> {
  await requireOthers(tx, member, noRoles);
  await requireNoBuyOfTheirs(tx, member);
  await passDrafts(tx, member, by);
  await withdrawPledges(tx, member.id, by);
  for (const table of ['buy_organisers', 'buy_helpers']) {
    await execute(
      `delete from ${table} where membership_id = :memberId
         and buy_id in (select id from buys where state not in ('settled', 'cancelled'))`,
      { memberId: member.id },
      tx,
    );
  }
  await execute(
    'update buys set offered_to_id = null where offered_to_id = :memberId',
    { memberId: member.id },
    tx,
  );
  await execute(
    'update invitations set revoked_at = clock_timestamp() where guest_membership_id = :memberId and accepted_at is null and revoked_at is null',
    { memberId: member.id },
    tx,
  );
  setRoles(member, noRoles);
  member.status = status;
  member.endedAt = new Date();
  member.version += 1;
  await member.save({ transaction: tx.transaction });
  const { accountId } = member;
  if (accountId) tx.afterCommit(() => disconnectAccount(accountId));
}
