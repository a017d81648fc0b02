import type { ClubSalt } from '#shared/schemas/salts.ts';
import { notifyDone, notifyProblem } from 'src/composables/useNotify.ts';
import { useSaltsStore } from 'src/stores/salts.ts';

/** What a steward does with a salt besides changing it; each says so and can be taken back. */
export function useSaltActs(club: () => string) {
  const store = useSaltsStore();

  async function quietly(act: () => Promise<unknown>) {
    try {
      await act();
      return true;
    } catch (error) {
      notifyProblem(error);
      return false;
    }
  }

  async function hide(salt: ClubSalt, hidden: boolean) {
    if (!(await quietly(() => store.hide(club(), salt.id, hidden)))) return;
    notifyDone(hidden ? `${salt.name} is hidden.` : `${salt.name} is in the list again.`, {
      undo: () => hide(salt, !hidden),
    });
  }

  async function archive(salt: ClubSalt, archived: boolean) {
    if (!(await quietly(() => store.archive(club(), salt, archived)))) return;
    const now = store.saltOf(club(), salt.id);
    notifyDone(archived ? `${salt.name} is archived.` : `${salt.name} is back.`, {
      undo: () => now && archive(now, !archived),
    });
  }

  return { hide, archive };
}
