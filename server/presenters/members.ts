import { roleNames, type RoleCounts } from '#shared/domain/clubs/roles.ts';
import type { Member } from '#shared/schemas/members.ts';

/** A membership with what stands beside it in other tables. */
export interface MemberRow {
  id: string;
  display_name: string;
  status: Member['status'];
  is_organiser: boolean;
  is_treasurer: boolean;
  is_steward: boolean;
  is_guest: boolean;
  guest_contact: string;
  joined_at: Date;
  ended_at: Date | null;
  version: number;
  email: string | null;
  vouched_by_id: string | null;
  vouched_by_name: string | null;
  in_own_buy: boolean;
}

/** One member, with address, contact and balance only where the reader may see them. */
export function presentMember(
  row: MemberRow,
  sight: {
    you: boolean;
    holders: RoleCounts;
    seesContact: boolean;
    balanceMinor: number | null;
  },
): Member {
  const roles = {
    organiser: row.is_organiser,
    treasurer: row.is_treasurer,
    steward: row.is_steward,
  };
  return {
    id: row.id,
    displayName: row.display_name,
    status: row.status,
    roles,
    isGuest: row.is_guest,
    you: sight.you,
    joinedAt: row.joined_at.toISOString(),
    endedAt: row.ended_at?.toISOString() ?? null,
    email: sight.seesContact ? row.email : null,
    contact: sight.seesContact && row.is_guest ? row.guest_contact : null,
    vouchedBy:
      row.vouched_by_id && row.vouched_by_name
        ? { id: row.vouched_by_id, name: row.vouched_by_name }
        : null,
    balanceMinor: sight.balanceMinor,
    lastOf: roleNames.filter((role) => roles[role] && sight.holders[role] === 1),
    version: row.version,
  };
}
