import type { InvitationList, InviteBody } from '#shared/schemas/invitations.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import * as invitations from 'src/api/invitations.ts';
import { useSessionStore } from 'src/stores/session.ts';

/** Invitations that nobody took yet, by club; and the one behind a link. */
export const useInvitationsStore = defineStore('invitations', () => {
  const session = useSessionStore();
  const lists = ref<Record<string, InvitationList>>({});

  const listOf = (club: string): InvitationList | null => lists.value[club] ?? null;

  async function load(club: string) {
    lists.value[club] = await invitations.getInvitations(club);
  }

  /** Invites; gives a join link's path, which is told only now. */
  async function invite(club: string, body: InviteBody): Promise<string | null> {
    const { path } = await invitations.postInvitation(club, body);
    await load(club);
    return path;
  }

  async function revoke(club: string, id: string) {
    lists.value[club] = await invitations.deleteInvitation(club, id);
  }

  async function resend(club: string, id: string) {
    lists.value[club] = await invitations.postResend(club, id);
  }

  async function accept(token: string, displayName: string) {
    const accepted = await invitations.postAcceptance(token, displayName);
    await session.load();
    return accepted;
  }

  return { listOf, load, invite, revoke, resend, read: invitations.getInvitation, accept };
});
