import { roleNames, type RoleName } from '#shared/domain/clubs/roles.ts';
import type { Member } from '#shared/schemas/members.ts';

/** What the members table can be narrowed to. */
export type MemberFilter = 'all' | RoleName | 'guests' | 'former';

export const memberFilters: { value: MemberFilter; label: string }[] = [
  { value: 'all', label: 'Everyone' },
  { value: 'organiser', label: 'Organisers' },
  { value: 'treasurer', label: 'Treasurers' },
  { value: 'steward', label: 'Stewards' },
  { value: 'guests', label: 'Guests' },
  { value: 'former', label: 'Former' },
];

const fits: Record<MemberFilter, (member: Member) => boolean> = {
  all: () => true,
  organiser: ({ roles }) => roles.organiser,
  treasurer: ({ roles }) => roles.treasurer,
  steward: ({ roles }) => roles.steward,
  guests: ({ isGuest }) => isGuest,
  former: () => true,
};

/** Members that a filter lets through; former ones only when they are asked for, those who ask to join never. */
export function filterMembers(members: readonly Member[], filter: MemberFilter): Member[] {
  return members.filter((member) =>
    filter === 'former'
      ? member.status === 'left' || member.status === 'removed'
      : member.status === 'active' && fits[filter](member),
  );
}

/** 'organiser, steward', 'guest' or 'member'; what a former member was is not kept. */
export function sayRoles(member: Pick<Member, 'roles' | 'isGuest' | 'status'>): string {
  if (member.status === 'left') return 'left';
  if (member.status === 'removed') return 'removed';
  if (member.isGuest) return 'guest';
  const held = roleNames.filter((role) => member.roles[role]);
  return held.length > 0 ? held.join(', ') : 'member';
}

/** A member's row with what the table searches and sorts by. */
export type MemberRow = {
  id: string;
  name: string;
  roles: string;
  contact: string;
  joinedAt: string;
  balance: number | null;
  member: Member;
};

export function toRow(member: Member): MemberRow {
  return {
    id: member.id,
    name: member.displayName,
    roles: sayRoles(member),
    contact: member.email ?? member.contact ?? '',
    joinedAt: member.joinedAt,
    balance: member.balanceMinor,
    member,
  };
}
