import { computed, onScopeDispose, watch } from 'vue';
import { useLoad } from 'src/composables/useLoad.ts';
import { splitActs } from 'src/stores/splitActs.ts';
import { useBuysStore } from 'src/stores/buys.ts';
import { useSplitsStore } from 'src/stores/splits.ts';

/** A buy's split as its pages use it: loaded, live while the page is open, with progress and the reader's share. */
export function useSplit(where: { club: string; buy: string }) {
  const store = useSplitsStore();
  const buys = useBuysStore();
  const head = computed(() => buys.headOf(where.buy));
  const { problem, reload } = useLoad(() => store.load(where));
  onScopeDispose(store.enter(where));

  const sheet = computed(() => {
    const found = store.sheetOf(where.buy);
    if (!found) return null;
    const lines = found.lines.map((line) => {
      if (line.hidden) return line;
      const own = found.portions.filter(
        ({ lineId, state }) => lineId === line.id && state !== 'void',
      );
      const done = own.filter(({ state }) => state === 'done').length;
      return { ...line, progress: { portions: own.length, done } };
    });
    return { ...found, lines };
  });

  const share = computed(() => store.shares[where.buy] ?? null);
  const mine = computed(() => head.value?.mine);
  // The reader's own slip follows their own portions, not everybody's.
  const ownState = computed(() =>
    JSON.stringify([
      sheet.value?.targetVersion,
      sheet.value?.state,
      sheet.value?.portions
        .filter(({ member }) => member.membershipId === mine.value?.membershipId)
        .map(({ id, version }) => [id, version]),
    ]),
  );
  watch(
    [ownState, () => mine.value?.takesPart],
    () => {
      if (sheet.value && mine.value?.takesPart) {
        // Without it the page stands; the next change asks again.
        store.loadShare(where).catch(() => undefined);
      }
    },
    { immediate: true },
  );

  return { head, sheet, share, problem, reload, acts: splitActs(where), store };
}
