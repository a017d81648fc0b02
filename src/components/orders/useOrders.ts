import type { BuyHeader } from '#shared/schemas/buys.ts';
import { computed, watch } from 'vue';
import { useLoad } from 'src/composables/useLoad.ts';
import { useBuysStore } from 'src/stores/buys.ts';
import { orderActs } from 'src/stores/orderActs.ts';
import { useOrdersStore } from 'src/stores/orders.ts';

type Part = 'loadLocked' | 'loadOrders' | 'loadBills' | 'loadSettling';

/** A locked buy's page: loads its parts, and again whenever the buy's head changed, and gives what can be done. */
export function useOrders(
  place: { club: string; buy: string },
  parts: (head: BuyHeader | null) => Part[],
) {
  const store = useOrdersStore();
  const buys = useBuysStore();
  const head = computed(() => buys.headOf(place.buy));
  const load = () => Promise.all(parts(head.value).map((part) => store[part](place)));
  const { problem, reload } = useLoad(load);
  // What others do arrives as a newer head; until it can be read what is shown stays.
  watch(
    () => head.value?.now,
    (now, before) => {
      if (before !== undefined && now !== before) load().catch(() => undefined);
    },
  );
  return {
    head,
    problem,
    reload,
    acts: orderActs(place),
    store,
    locked: computed(() => store.locked[place.buy] ?? null),
    book: computed(() => store.books[place.buy] ?? null),
    bills: computed(() => store.bills[place.buy] ?? null),
    settling: computed(() => store.settling[place.buy] ?? null),
  };
}
