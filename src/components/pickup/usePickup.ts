import { computed, onScopeDispose, watch } from 'vue';
import { useLoad } from 'src/composables/useLoad.ts';
import { useBuysStore } from 'src/stores/buys.ts';
import { usePickupStore } from 'src/stores/pickup.ts';
import { useSplitsStore } from 'src/stores/splits.ts';

/** A buy's pickup as its page uses it: what the reader may see of it, kept fresh while the page is open. */
export function usePickup(where: { club: string; buy: string }) {
  const store = usePickupStore();
  const buys = useBuysStore();
  const splits = useSplitsStore();
  const head = computed(() => buys.headOf(where.buy));
  const seesDesk = computed(
    () => !!head.value && (head.value.may.seeDesk || head.value.may.runPickup),
  );
  const desk = computed(() => (seesDesk.value ? store.deskOf(where.buy) : null));
  const mine = computed(() => store.mineOf(where.buy));

  const load = () =>
    Promise.all([
      store.loadMine(where),
      seesDesk.value ? store.loadDesk(where) : undefined,
      // Before the final share somebody may have none: the page stands without it.
      splits.loadShare(where).catch(() => undefined),
    ]);
  const { problem, reload } = useLoad(load);
  onScopeDispose(store.follow(where.buy, load));
  watch(seesDesk, (sees) => {
    if (sees && !desk.value) reload().catch(() => undefined);
  });

  return { head, seesDesk, desk, mine, problem, reload };
}
