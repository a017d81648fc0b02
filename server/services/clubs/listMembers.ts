import type { MemberOwed } from '#shared/domain/ledger/owed.ts';
import type { MembersReply } from '#shared/schemas/members.ts';
import { select } from '../../config/database.ts';
import { canManageMembers, canSeeBalances, canSeeEmails } from '../../policies/clubs.ts';
import { presentMember, type MemberRow } from '../../presenters/members.ts';
import type { ClubActor } from '../actors.ts';
import { owedInClub } from '../ledger/owed.ts';

async function findRows(actor: ClubActor): Promise<MemberRow[]> {
  // An organiser sees the addresses of those who pledged in a buy of their own.
  return select<MemberRow>(
    `with own_people as (
       select distinct p.membership_id from pledges p join buys b on b.id = p.buy_id
       where b.club_id = :clubId and (p.wanted_mg > 0 or p.up_to_mg > 0) and (b.responsible_id = :memberId or exists (
         select 1 from buy_organisers o where o.buy_id = b.id and o.membership_id = :memberId)))
     select m.id, m.display_name, m.status, m.is_organiser, m.is_treasurer, m.is_steward, m.is_guest,
        m.guest_contact, m.joined_at, m.ended_at, m.version, a.email,
        v.id as vouched_by_id, v.display_name as vouched_by_name,
        (m.id in (select membership_id from own_people)) as in_own_buy
     from memberships m
     left join accounts a on a.id = m.account_id and a.deleted_at is null
     left join memberships v on v.id = m.vouched_by_id
     where m.club_id = :clubId and (m.status = 'active' or :manages)
     order by lower(m.display_name), m.id`,
    {
      clubId: actor.club.id,
      memberId: actor.membershipId,
      manages: canManageMembers(actor),
    },
  );
}

/** Standings of those whose balance the actor may see: everyone's, or their own. */
function findOwed(actor: ClubActor): Promise<Map<string, MemberOwed>> {
  return canSeeBalances(actor)
    ? owedInClub(actor.club.id)
    : owedInClub(actor.club.id, undefined, [actor.membershipId]);
}

/** What is asked for, or, below zero, the free credit. */
function openBalance(owed: MemberOwed | undefined): number {
  if (!owed) return 0;
  return owed.openMinor > 0 ? owed.openMinor : 0 - owed.creditMinor;
}

/** Everyone in the club whom the actor may know of, with what they may see of each. */
export async function listMembers(actor: ClubActor): Promise<MembersReply> {
  const [rows, owed] = await Promise.all([findRows(actor), findOwed(actor)]);
  const may = {
    manage: canManageMembers(actor),
    seeEmails: canSeeEmails(actor),
    seeBalances: canSeeBalances(actor),
  };
  const holders = {
    organiser: rows.filter((row) => row.status === 'active' && row.is_organiser).length,
    treasurer: rows.filter((row) => row.status === 'active' && row.is_treasurer).length,
    steward: rows.filter((row) => row.status === 'active' && row.is_steward).length,
  };
  return {
    may,
    members: rows.map((row) => {
      const you = row.id === actor.membershipId;
      return presentMember(row, {
        you,
        holders,
        seesContact: you || may.seeEmails || row.in_own_buy,
        balanceMinor: you || may.seeBalances ? openBalance(owed.get(row.id)) : null,
      });
    }),
  };
}
