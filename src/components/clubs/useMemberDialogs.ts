import type { Member } from '#shared/schemas/members.ts';
import { reactive, ref } from 'vue';
import { confirmAct } from 'src/composables/useConfirm.ts';
import { notifyDone, notifyProblem } from 'src/composables/useNotify.ts';
import { useMembersStore } from 'src/stores/members.ts';

/** Which dialog of the members page is open, and about whom. */
export function useMemberDialogs(club: () => string) {
  const store = useMembersStore();
  const shown = ref<Member | null>(null);
  const dialogs = reactive({
    member: false,
    guestMenu: false,
    guest: false,
    invite: false,
    /** The guest's form or the invitation is for somebody new. */
    fresh: true,
  });

  function closeAll() {
    dialogs.member = false;
    dialogs.guestMenu = false;
    dialogs.guest = false;
    dialogs.invite = false;
  }

  function manage(member: Member) {
    shown.value = member;
    dialogs.member = !member.isGuest;
    dialogs.guestMenu = member.isGuest;
  }

  function inviteGuest(guest: Member | null) {
    closeAll();
    dialogs.fresh = guest === null;
    if (guest) shown.value = guest;
    dialogs.invite = true;
  }

  function changeGuest(guest: Member | null) {
    closeAll();
    dialogs.fresh = guest === null;
    if (guest) shown.value = guest;
    dialogs.guest = true;
  }

  async function remove(member: Member) {
    const sure = await confirmAct({
      title: `Remove ${member.displayName}?`,
      text: `${member.displayName} loses access at once, and their pledges in open buys are withdrawn. What they have in locked buys stays theirs.`,
      act: `Remove ${member.displayName}`,
      danger: true,
    });
    if (!sure) return;
    try {
      await store.remove(club(), member.id);
      closeAll();
      notifyDone(`${member.displayName} is no longer in the club.`);
    } catch (error) {
      notifyProblem(error);
    }
  }

  return { shown, dialogs, manage, remove, inviteGuest, changeGuest };
}
