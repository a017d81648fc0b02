import { select, type Tx } from '../../config/database.ts';
import { invalid } from '../problem.ts';

/**
 * The member's row, locked: payments and refunds of one member come one after another.
 * @throws DomainProblem 422 at `memberId` when the club has no such member
 */
export async function lockMember(
  clubId: string,
  memberId: string,
  tx: Tx,
): Promise<{ id: string; name: string }> {
  const [row] = await select<{ id: string; name: string }>(
    `select id, display_name as name from memberships
     where id = :memberId and club_id = :clubId and status <> 'pending' for no key update`,
    { clubId, memberId },
    tx,
  );
  if (!row) throw invalid({ memberId: 'Choose a member of this club.' });
  return row;
}
