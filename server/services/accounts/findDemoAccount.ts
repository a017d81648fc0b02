import { select } from '../../config/database.ts';
import { notFound } from '../problem.ts';

/**
 * Account of a demo club's member by address.
 * @throws DomainProblem 404 for anybody else's address
 */
export async function findDemoAccount(email: string): Promise<string> {
  const [row] = await select<{ id: string }>(
    `select a.id from accounts a where lower(a.email) = lower(:email) and a.deleted_at is null
       and exists (select 1 from memberships m join clubs c on c.id = m.club_id where m.account_id = a.id and c.is_demo)
       and not exists (select 1 from memberships m join clubs c on c.id = m.club_id where m.account_id = a.id and not c.is_demo)`,
    { email },
  );
  if (!row) throw notFound('This demo account');
  return row.id;
}
