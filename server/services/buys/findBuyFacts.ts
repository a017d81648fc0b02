import { select, type Tx } from '../../config/database.ts';
import type { BuyFactsRow } from '../../presenters/buys/rows.ts';

const columns = `b.*, r.display_name as responsible_name, ot.display_name as offered_to_name,
  c.shelf_limit_minor as club_shelf_limit_minor, cf.name as copied_from_name,
  (select count(*)::int from lines l where l.buy_id = b.id and l.removed_at is null) as lines,
  p.members, p.pledged_mg, p.mine_mg,
  (b.responsible_id = :me or exists (
    select 1 from buy_organisers o where o.buy_id = b.id and o.membership_id = :me)) as organises,
  m.over_limit, m.must_agree, m.collected, m.vouched_for,
  (select count(*)::int from bills x where x.buy_id = b.id and x.confirmed_at is null and x.voided_at is null) as unconfirmed_bills,
  (select count(*)::int from hand_ons h where h.buy_id = b.id and h.to_id = :me and h.state = 'offered') as offered_lines,
  s.portions, s.portions_done, s.shares_waiting`;

const joins = `from buys b
  join memberships r on r.id = b.responsible_id
  join clubs c on c.id = b.club_id
  left join buys cf on cf.id = b.copied_from_id
  left join memberships ot on ot.id = b.offered_to_id
  cross join lateral (
    select count(distinct membership_id)::int as members, coalesce(sum(wanted_mg), 0)::bigint as pledged_mg,
      coalesce(sum(wanted_mg) filter (where membership_id = :me), 0)::bigint as mine_mg
    from pledges where buy_id = b.id and dropped_at is null and (wanted_mg > 0 or up_to_mg > 0)) p
  cross join lateral (
    select count(*) filter (where over_limit_minor > 0 and agreed_at is null)::int as over_limit,
      bool_or(over_limit_minor > 0 and agreed_at is null) filter (where membership_id = :me) as must_agree,
      bool_or(collected_at is not null) filter (where membership_id = :me) as collected,
      array(select bm.membership_id::text from buy_members bm where bm.buy_id = b.id
        and (bm.vouched_at is not null or bm.dropped_at is not null)) as vouched_for
    from buy_members where buy_id = b.id and dropped_at is null) m
  cross join lateral (
    select count(*)::int as portions, count(*) filter (where state = 'done')::int as portions_done,
      count(distinct membership_id) filter (where handed_over_at is null)::int as shares_waiting
    from portions where buy_id = b.id and state <> 'void') s`;

/** The facts of all buys of a club that the viewer can see, newest first; drafts only for their organisers. */
export async function findBuyFacts(
  clubId: string,
  membershipId: string,
  buyId?: string,
  tx?: Tx,
): Promise<BuyFactsRow[]> {
  return select<BuyFactsRow>(
    `select ${columns} ${joins}
     where b.club_id = :clubId ${buyId ? 'and b.id = :buyId' : ''}
       and (b.opened_at is not null or b.responsible_id = :me or b.offered_to_id = :me
         or exists (select 1 from buy_organisers o where o.buy_id = b.id and o.membership_id = :me))
     order by b.created_at desc, b.id`,
    { clubId, me: membershipId, ...(buyId ? { buyId } : {}) },
    tx,
  );
}
