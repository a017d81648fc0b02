import type { SheetLine } from '#shared/domain/buys/sheetTerms.ts';
import { mostOf, plainWish } from '#shared/domain/buys/pledgeRules.ts';
import { confirmWith } from 'src/composables/useConfirm.ts';
import { notifyDone } from 'src/composables/useNotify.ts';
import { useSheetStore } from 'src/stores/sheet.ts';
import { cellKey, type Wish } from 'src/stores/sheetRows.ts';

/** Asks once for a classified salt whether its cautions are read; true when they are. */
async function confirmCautions(line: SheetLine): Promise<boolean> {
  const { default: HazardDialog } = await import('src/components/sheet/HazardDialog.vue');
  return confirmWith(HazardDialog, { line });
}

/** Changing pledges from cells, steppers and dialogs: cautions first, then save, with a way back. */
export function usePledging() {
  const store = useSheetStore();

  /** Saves a wish; true when it stands. Refusals are kept beside the cell by the store. */
  async function save(membershipId: string, line: SheetLine, typed: Wish): Promise<boolean> {
    const wish = plainWish(typed);
    const before = store.cellOf(membershipId, line.id);
    const pending = store.wishes[cellKey(membershipId, line.id)];
    const now = pending ?? before;
    if (wish.wantedMg === now.wantedMg && wish.upToMg === now.upToMg) return true;
    const own = membershipId === store.me;
    const raises = mostOf(wish) > mostOf(before) || wish.wantedMg > before.wantedMg;
    const unread = line.salt.classified && !store.mine?.confirmed.includes(line.saltId);
    if (own && raises && unread) {
      if (!(await confirmCautions(line))) return false;
    }
    try {
      const reply = await store.changePledge(membershipId, line.id, wish);
      if (reply?.proposed) {
        notifyDone(`${reply.pledge.name} is asked. It changes once they say yes.`);
      }
      return reply !== null;
    } catch {
      return false;
    }
  }

  return { save };
}
