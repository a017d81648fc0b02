import type { DemoPerson } from '#shared/schemas/session.ts';
import { select } from '../../config/database.ts';

interface Row {
  email: string;
  name: string;
  club_name: string;
  is_organiser: boolean;
  is_treasurer: boolean;
  is_steward: boolean;
}

/** People of the demo's largest club who have an account, those with fewest roles first. */
export async function findDemoPeople(): Promise<DemoPerson[]> {
  const rows = await select<Row>(
    `with largest as (
       select c.id from clubs c join memberships m on m.club_id = c.id and m.status = 'active'
       where c.is_demo group by c.id order by count(*) desc, c.id limit 1)
     select a.email, m.display_name as name, c.name as club_name, m.is_organiser, m.is_treasurer, m.is_steward
     from memberships m join clubs c on c.id = m.club_id join accounts a on a.id = m.account_id
     where m.club_id in (select id from largest) and m.status = 'active' and a.deleted_at is null
       and not exists (select 1 from memberships o join clubs oc on oc.id = o.club_id
         where o.account_id = a.id and not oc.is_demo)
     order by m.is_organiser::integer + m.is_treasurer::integer + m.is_steward::integer, lower(m.display_name), m.id`,
  );
  return rows.map((row) => ({
    email: row.email,
    name: row.name,
    clubName: row.club_name,
    roles: [
      ...(row.is_organiser ? (['organiser'] as const) : []),
      ...(row.is_treasurer ? (['treasurer'] as const) : []),
      ...(row.is_steward ? (['steward'] as const) : []),
    ],
  }));
}
