import type { AccountReply } from '#shared/schemas/accounts.ts';
import { select } from '../../config/database.ts';
import type { AccountActor } from '../actors.ts';

interface ClubRow {
  club_slug: string;
  club_name: string;
  membership_id: string;
  display_name: string;
  status: AccountReply['clubs'][number]['status'];
  is_organiser: boolean;
  is_treasurer: boolean;
  is_steward: boolean;
}

/** One's own account, with the clubs it stands in. */
export async function readAccount(actor: AccountActor, sid: string): Promise<AccountReply> {
  const { accountId } = actor;
  const [facts] = await select<{ pending_email: string | null; other_sessions: number }>(
    `select
       (select new_email from account_tokens where account_id = :accountId and kind = 'email'
          and used_at is null and expires_at > now() order by created_at desc limit 1) as pending_email,
       (select count(*)::integer from session
          where sess -> 'passport' ->> 'user' = :accountId and sid <> :sid and expire > now()) as other_sessions`,
    { accountId, sid },
  );
  const clubs = await select<ClubRow>(
    `select c.slug as club_slug, c.name as club_name, m.id as membership_id, m.display_name, m.status,
        m.is_organiser, m.is_treasurer, m.is_steward
     from memberships m join clubs c on c.id = m.club_id
     where m.account_id = :accountId and m.status in ('active', 'pending') order by lower(c.name), c.id`,
    { accountId },
  );
  return {
    email: actor.email,
    displayName: actor.accountName,
    pendingEmail: facts?.pending_email ?? null,
    otherSessions: facts?.other_sessions ?? 0,
    clubs: clubs.map((row) => ({
      clubSlug: row.club_slug,
      clubName: row.club_name,
      membershipId: row.membership_id,
      displayName: row.display_name,
      status: row.status,
      roles: { organiser: row.is_organiser, treasurer: row.is_treasurer, steward: row.is_steward },
    })),
  };
}
