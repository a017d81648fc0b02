import type { SheetLine } from '#shared/domain/buys/sheetTerms.ts';
import { computed, onScopeDispose, ref, type Ref } from 'vue';
import type { Cell, Wish } from 'src/stores/sheetRows.ts';

const STEP_MG = 50_000;
const PAUSE_MS = 500;

/** A stepper's jump: 50 g, or the portion step where that is larger or doesn't divide it. */
export const stepperMg = (stepMg: number) =>
  stepMg >= STEP_MG ? stepMg : Math.ceil(STEP_MG / stepMg) * stepMg;

/** Plus and minus that show at once and save once the fingers rest. */
export function useStepper(
  line: Ref<SheetLine>,
  cell: Ref<Cell>,
  save: (wish: Wish) => Promise<boolean>,
) {
  const wantedMg = ref<number | null>(null);
  let timer: ReturnType<typeof setTimeout> | undefined;

  const shownMg = computed(() => wantedMg.value ?? cell.value.wantedMg);

  async function flush() {
    clearTimeout(timer);
    timer = undefined;
    const wanted = wantedMg.value;
    if (wanted === null) return;
    await save({ wantedMg: wanted, upToMg: cell.value.upToMg });
    if (wantedMg.value === wanted) wantedMg.value = null;
  }

  function move(steps: number) {
    const jump = stepperMg(line.value.stepMg);
    const at = shownMg.value;
    // From between two marks it goes to the next mark first.
    const next = steps > 0 ? Math.floor(at / jump) + 1 : Math.ceil(at / jump) - 1;
    wantedMg.value = Math.max(0, next * jump);
    clearTimeout(timer);
    timer = setTimeout(() => void flush(), PAUSE_MS);
  }

  onScopeDispose(() => void flush());
  return { shownMg, moving: computed(() => wantedMg.value !== null), move };
}
