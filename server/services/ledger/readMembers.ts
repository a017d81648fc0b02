import type { LedgerMember, LedgerMembers } from '#shared/schemas/ledger.ts';
import { select } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { owedInClub } from './owed.ts';

interface MemberRow {
  id: string;
  name: string;
  guest: boolean;
  active: boolean;
}

/** Name and due day of a club's buys, by id. */
export async function buysOfClub(
  clubId: string,
): Promise<Map<string, { name: string; state: string; overdue: boolean }>> {
  const rows = await select<{ id: string; name: string; state: string; overdue: boolean }>(
    `select id, name, state, coalesce(due_at < clock_timestamp(), false) as overdue from buys where club_id = :clubId`,
    { clubId },
  );
  return new Map(rows.map(({ id, ...buy }) => [id, buy]));
}

/** Who owes what, for the treasurer: active members, and whoever else has dues, credit or a balance. */
export async function readMembersLedger(actor: ClubActor): Promise<LedgerMembers> {
  const clubId = actor.club.id;
  const rows = await select<MemberRow>(
    `select id, display_name as name, is_guest as guest, status = 'active' as active
     from memberships where club_id = :clubId and status <> 'pending' order by lower(display_name), id`,
    { clubId },
  );
  const [owedBy, buys] = await Promise.all([owedInClub(clubId), buysOfClub(clubId)]);
  const members = rows.map((row): LedgerMember => {
    const owed = owedBy.get(row.id);
    const open = (owed?.buys ?? []).filter(({ openMinor }) => openMinor > 0);
    const named = open.map(({ buyId, openMinor, dueAtMs }) => ({
      buyId,
      buyName: buys.get(buyId)?.name ?? '',
      openMinor,
      dueAt: dueAtMs === null ? null : new Date(dueAtMs).toISOString(),
      overdue: buys.get(buyId)?.overdue ?? false,
    }));
    return {
      ...row,
      balanceMinor: owed?.balanceMinor ?? 0,
      openMinor: owed?.openMinor ?? 0,
      overdueMinor: named.reduce((sum, buy) => sum + (buy.overdue ? buy.openMinor : 0), 0),
      carriedMinor: owed?.carriedMinor ?? 0,
      creditMinor: owed?.creditMinor ?? 0,
      buys: named,
    };
  });
  const stands = (member: LedgerMember) =>
    member.active ||
    member.balanceMinor !== 0 ||
    member.openMinor !== 0 ||
    member.creditMinor !== 0;
  return { members: members.filter(stands) };
}
