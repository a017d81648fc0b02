import type { AuditChoices, AuditPage, AuditQuery } from '#shared/schemas/audit.ts';
import { select } from '../../config/database.ts';
import { canSeeBalances } from '../../policies/clubs.ts';
import { presentAuditEntry, type AuditRow } from '../../presenters/audit.ts';
import type { ClubActor } from '../actors.ts';

const pageSize = 50;

/** One page of the club's audit log, newest first. Members' money is shown to treasurers and to the buy's organisers. */
export async function listAudit(actor: ClubActor, query: AuditQuery): Promise<AuditPage> {
  const where = [
    'e.club_id = :clubId',
    ...(query.action ? ['e.action = :action'] : []),
    ...(query.buy ? ['e.buy_id = :buy'] : []),
    ...(query.before ? ['e.id < :before'] : []),
    ...(query.person === 'jobs' ? ['e.actor_id is null'] : []),
    ...(query.person && query.person !== 'jobs'
      ? [
          `(e.actor_id = :person or (e.subject_type = 'membership' and e.subject_id = :person::text))`,
        ]
      : []),
  ];
  const rows = await select<AuditRow>(
    `select e.id, e.at, e.actor_id, e.actor_name, e.action, e.subject_type, e.before, e.after,
        b.id as buy_id, b.name as buy_name,
        case e.subject_type when 'membership' then m.display_name when 'buy' then sb.name
          when 'invitation' then coalesce(e.after ->> 'email', e.before ->> 'email') end as subject_name,
        (b.responsible_id = :memberId or exists (
          select 1 from buy_organisers o where o.buy_id = e.buy_id and o.membership_id = :memberId)) as own_buy
     from audit_entries e
     left join buys b on b.id = e.buy_id
     left join memberships m on e.subject_type = 'membership' and m.id::text = e.subject_id
     left join buys sb on e.subject_type = 'buy' and sb.id::text = e.subject_id
     where ${where.join(' and ')} order by e.id desc limit :limit`,
    {
      clubId: actor.club.id,
      memberId: actor.membershipId,
      limit: pageSize + 1,
      ...query,
    },
  );
  const entries = rows.slice(0, pageSize);
  const seesAll = canSeeBalances(actor);
  return {
    entries: entries.map((row) => presentAuditEntry(row, seesAll || row.own_buy === true)),
    next: rows.length > pageSize ? (entries.at(-1)?.id ?? null) : null,
  };
}

/** Acts, people and buys that occur in the club's audit log. */
export async function listAuditChoices(actor: ClubActor): Promise<AuditChoices> {
  const clubId = actor.club.id;
  const [actions, people, buys] = await Promise.all([
    select<{ action: string }>(
      'select distinct action from audit_entries where club_id = :clubId order by action',
      { clubId },
    ),
    select<{ id: string; name: string }>(
      `select coalesce(e.actor_id::text, 'jobs') as id, coalesce(m.display_name, case when e.actor_id is null then 'Tarewell itself' else min(e.actor_name) end) as name
       from audit_entries e left join memberships m on m.id = e.actor_id
       where e.club_id = :clubId group by e.actor_id, m.display_name order by 2`,
      { clubId },
    ),
    select<{ id: string; name: string }>(
      `select b.id, b.name from buys b
       where b.club_id = :clubId and exists (select 1 from audit_entries e where e.buy_id = b.id)
       order by b.created_at desc`,
      { clubId },
    ),
  ]);
  return { actions: actions.map(({ action }) => action), people, buys };
}
