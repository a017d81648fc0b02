import { computed } from 'vue';
import type { SheetLine } from '#shared/domain/buys/sheetTerms.ts';
import { loweringFrozen } from '#shared/domain/buys/pledgeRules.ts';
import { useCountdown } from 'src/composables/useCountdown.ts';
import { useSheetStore } from 'src/stores/sheet.ts';
import { emptyCell, type Row } from 'src/stores/sheetRows.ts';

/** What the parts of the sheet page share: lines, own row, and what may be done right now. */
export function useSheet() {
  const store = useSheetStore();
  const terms = computed(() => store.sheet?.terms ?? null);
  const lines = computed<SheetLine[]>(() => terms.value?.lines ?? []);

  const ownRow = computed<Row>(
    () =>
      store.rows.get(store.me) ?? { membershipId: store.me, name: 'You', guest: false, cells: {} },
  );
  const shown = (row: Row) =>
    row.membershipId === store.me ||
    Object.values(row.cells).some((cell) => cell.wantedMg > 0 || cell.upToMg);
  const others = computed(() =>
    [...store.rows.values()]
      .filter((row) => row.membershipId !== store.me && shown(row))
      .sort((a, b) => a.name.localeCompare(b.name)),
  );

  // The device's clock only shows; the server's decides.
  const aheadMs = computed(() => (store.mine ? Date.parse(store.mine.now) - Date.now() : 0));
  const until = computed(() => {
    const at = terms.value?.closesAt;
    return at ? new Date(Date.parse(at) - aheadMs.value).toISOString() : null;
  });
  const { over, remainingMs } = useCountdown(until);
  const open = computed(
    () => terms.value?.state === 'open' && !terms.value.frozenUntil && !over.value,
  );
  const mayPledge = computed(() => open.value && (store.mine?.may.pledge ?? false));
  const mayPledgeForOthers = computed(
    () => open.value && (store.mine?.may.pledgeForOthers ?? false),
  );
  const noLowering = computed(() => {
    const now = terms.value;
    if (!now?.closesAt || remainingMs.value === null) return false;
    const closesAtMs = Date.parse(now.closesAt);
    const { loweringFreezeHours } = now;
    return loweringFrozen({
      closesAtMs,
      loweringFreezeHours,
      nowMs: closesAtMs - remainingMs.value,
    });
  });

  const ownCell = (lineId: string) => ownRow.value.cells[lineId] ?? emptyCell;
  return {
    store,
    terms,
    lines,
    ownRow,
    others,
    open,
    over,
    mayPledge,
    mayPledgeForOthers,
    noLowering,
    ownCell,
  };
}
