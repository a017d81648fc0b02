import { select } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';

/** Whether somebody helps today at a buy of the club: then they may also sell from its shelf. */
export async function helpsAtAnyBuy(actor: ClubActor): Promise<boolean> {
  if (actor.status !== 'active') return false;
  const [row] = await select<{ helps: boolean }>(
    `select exists (
       select 1 from buy_helpers h join buys b on b.id = h.buy_id join clubs c on c.id = b.club_id
       where h.membership_id = :membershipId and b.club_id = :clubId and b.state in ('arrived', 'splitting', 'pickup')
         and (b.splits_at is null or (now() at time zone c.time_zone)::date
           <= (coalesce(b.split_ends_at, b.splits_at) at time zone c.time_zone)::date)) as helps`,
    { membershipId: actor.membershipId, clubId: actor.club.id },
  );
  return row?.helps ?? false;
}
