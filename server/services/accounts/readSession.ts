import type { SessionMembership, SessionReply } from '#shared/schemas/session.ts';
import { select } from '../../config/database.ts';
import { env } from '../../config/runtime.ts';
import type { AccountActor } from '../actors.ts';

interface Row {
  club_id: string;
  slug: string;
  club_name: string;
  membership_id: string;
  status: SessionMembership['status'];
  is_organiser: boolean;
  is_treasurer: boolean;
  is_steward: boolean;
  currency: string;
  locale: string;
  time_zone: string;
  units: 'metric' | 'us';
}

/** The frame of the app for whoever is signed in. Former clubs stay listed while a buy of theirs is unsettled. */
export async function readSession(actor: AccountActor | null): Promise<SessionReply> {
  if (!actor) {
    const [row] = await select<{ empty: boolean }>(
      'select not exists (select 1 from accounts) as empty',
    );
    return { account: null, memberships: [], demo: env.demo, firstRun: row?.empty ?? false };
  }
  const rows = await select<Row>(
    `select c.id as club_id, c.slug, c.name as club_name, m.id as membership_id, m.status,
        m.is_organiser, m.is_treasurer, m.is_steward, c.currency, c.locale, c.time_zone, c.units
     from memberships m join clubs c on c.id = m.club_id
     where m.account_id = :accountId and (m.status in ('active', 'pending') or exists (
       select 1 from pledges p join buys b on b.id = p.buy_id
       where p.membership_id = m.id and b.state not in ('settled', 'cancelled')))
     order by lower(c.name), c.id`,
    { accountId: actor.accountId },
  );
  return {
    account: { id: actor.accountId, email: actor.email, displayName: actor.accountName },
    memberships: rows.map((row) => ({
      clubId: row.club_id,
      clubSlug: row.slug,
      clubName: row.club_name,
      membershipId: row.membership_id,
      status: row.status,
      roles: { organiser: row.is_organiser, treasurer: row.is_treasurer, steward: row.is_steward },
      currency: row.currency,
      locale: row.locale,
      timeZone: row.time_zone,
      units: row.units,
    })),
    demo: env.demo,
    firstRun: false,
  };
}
