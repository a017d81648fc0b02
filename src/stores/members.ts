import type {
  ChangeRolesBody,
  GuestBody,
  Member,
  MembersReply,
  UpdateGuestBody,
} from '#shared/schemas/members.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import * as members from 'src/api/members.ts';
import { useSessionStore } from 'src/stores/session.ts';

/** Who is in each club that was opened. */
export const useMembersStore = defineStore('members', () => {
  const session = useSessionStore();
  const lists = ref<Record<string, MembersReply>>({});

  const listOf = (club: string): MembersReply | null => lists.value[club] ?? null;
  const membersOf = (club: string): Member[] => lists.value[club]?.members ?? [];
  /** Those who can take part now, guests among them. */
  const activeOf = (club: string): Member[] =>
    membersOf(club).filter(({ status }) => status === 'active');

  async function load(club: string) {
    lists.value[club] = await members.getMembers(club);
  }

  async function receive(club: string, reply: Promise<MembersReply>) {
    lists.value[club] = await reply;
  }

  async function changeRoles(club: string, member: Member, roles: ChangeRolesBody['roles']) {
    await receive(club, members.putRoles(club, member.id, { roles, version: member.version }));
    // Who gives up a role of their own loses it in the frame too.
    if (member.you) await session.load();
  }

  return {
    listOf,
    membersOf,
    activeOf,
    load,
    changeRoles,
    remove: (club: string, id: string) => receive(club, members.deleteMember(club, id)),
    approve: (club: string, id: string) => receive(club, members.postApproval(club, id)),
    refuse: (club: string, id: string) => receive(club, members.postRefusal(club, id)),
    addGuest: (club: string, body: GuestBody) => receive(club, members.postGuest(club, body)),
    updateGuest: (club: string, id: string, body: UpdateGuestBody) =>
      receive(club, members.putGuest(club, id, body)),
  };
});
