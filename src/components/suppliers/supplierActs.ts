import type { Offer, Supplier } from '#shared/schemas/suppliers.ts';
import { notifyDone, notifyProblem } from 'src/composables/useNotify.ts';
import { useSuppliersStore } from 'src/stores/suppliers.ts';

/** Archiving suppliers and offers, and bringing them back; each says so and can be taken back. */
export function useSupplierActs(club: () => string) {
  const store = useSuppliersStore();

  async function archive(supplier: Supplier, archived: boolean) {
    try {
      const now = await store.archive(club(), supplier, archived);
      notifyDone(archived ? `${now.name} is archived.` : `${now.name} is back.`, {
        undo: () => archive(now, !archived),
      });
    } catch (error) {
      notifyProblem(error);
    }
  }

  async function archiveOffer(offer: Offer, archived: boolean) {
    try {
      const now = await store.archiveOffer(club(), offer, archived);
      notifyDone(archived ? 'The offer is archived.' : 'The offer is back.', {
        undo: () => archiveOffer(now, !archived),
      });
    } catch (error) {
      notifyProblem(error);
    }
  }

  return { archive, archiveOffer };
}
