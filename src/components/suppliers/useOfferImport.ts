import type { ImportDone, ImportPreview, ImportRules } from '#shared/schemas/offerImport.ts';
import { computed, ref, shallowRef, watch } from 'vue';
import { asProblem, isProblem, type ApiProblem } from 'src/api/problem.ts';
import { useSuppliersStore } from 'src/stores/suppliers.ts';

const PAUSE_MS = 250;

const freshRules = (): ImportRules => ({
  columns: null,
  decimalMark: null,
  packUnit: null,
  priceIncludesTax: true,
  taxRatePpm: 0,
});

/**
 * One import, from the file that was chosen to what was saved. Each change of the rules asks for the preview anew; only
 * the newest answer counts.
 */
export function useOfferImport(club: () => string, supplier: () => string) {
  const store = useSuppliersStore();
  const file = shallowRef<File | null>(null);
  const rules = ref<ImportRules>(freshRules());
  const preview = shallowRef<ImportPreview | null>(null);
  const leaveOutBad = ref(false);
  const reading = ref(false);
  const saving = ref(false);
  const problem = shallowRef<ApiProblem | null>(null);
  let newest = 0;
  let timer: ReturnType<typeof setTimeout> | undefined;

  async function read() {
    const chosen = file.value;
    if (!chosen) return;
    const mine = ++newest;
    reading.value = true;
    problem.value = null;
    try {
      const answer = await store.previewImport(club(), supplier(), chosen, rules.value);
      if (mine === newest) preview.value = answer;
    } catch (error) {
      if (mine !== newest) return;
      problem.value = asProblem(error);
      if (problem.value.errors.file) preview.value = null;
    } finally {
      if (mine === newest) reading.value = false;
    }
  }

  function choose(files: File[]) {
    file.value = files[0] ?? null;
    preview.value = null;
    leaveOutBad.value = false;
    rules.value = {
      ...freshRules(),
      priceIncludesTax: rules.value.priceIncludesTax,
      taxRatePpm: rules.value.taxRatePpm,
    };
    clearTimeout(timer);
    void read();
  }

  watch(rules, () => {
    if (!preview.value) return;
    clearTimeout(timer);
    timer = setTimeout(() => void read(), PAUSE_MS);
  });

  const changes = computed(() => {
    const counts = preview.value?.counts;
    return counts ? counts.new + counts.change : 0;
  });
  const ready = computed(
    () =>
      !reading.value &&
      changes.value > 0 &&
      preview.value?.missing.length === 0 &&
      (preview.value.counts.bad === 0 || leaveOutBad.value),
  );

  /** Saves what the preview shows; null when it was refused, and then the preview is the newest. */
  async function save(): Promise<ImportDone | null> {
    if (!file.value || !preview.value || saving.value) return null;
    saving.value = true;
    problem.value = null;
    try {
      return await store.importOffers(club(), supplier(), file.value, {
        rules: { ...rules.value, columns: preview.value.rules.columns },
        seen: preview.value.seen,
        leaveOutBad: leaveOutBad.value,
      });
    } catch (error) {
      problem.value = asProblem(error);
      if (isProblem(error, 'stale')) preview.value = error.current as ImportPreview;
      return null;
    } finally {
      saving.value = false;
    }
  }

  return {
    file,
    rules,
    preview,
    leaveOutBad,
    reading,
    saving,
    problem,
    changes,
    ready,
    choose,
    save,
  };
}
