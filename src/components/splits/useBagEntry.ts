import { netOfBag } from '#shared/domain/splits/netOfBag.ts';
import type { Bag } from '#shared/schemas/splits.ts';
import { computed, reactive, watch } from 'vue';
import { useApiForm } from 'src/composables/useApiForm.ts';
import type { SplitActs } from 'src/stores/splitActs.ts';

type Entry = Pick<Bag, 'grossMg' | 'tareMg' | 'lot' | 'missing' | 'damage' | 'note'>;

const entryOf = ({ grossMg, tareMg, lot, missing, damage, note }: Bag): Entry => ({
  grossMg,
  tareMg,
  lot,
  missing,
  damage,
  note,
});

/** What is typed about one bag: kept here until it is saved; what another saves meanwhile shows where nothing is typed. */
export function useBagEntry(bag: () => Bag, acts: SplitActs) {
  const entry = reactive<Entry>(entryOf(bag()));
  const seen = reactive({ version: bag().version, ...entryOf(bag()) });

  const changed = computed(() =>
    (Object.keys(entry) as (keyof Entry)[]).some((key) => entry[key] !== seen[key]),
  );
  const net = computed(() =>
    entry.grossMg === null ? null : netOfBag(entry.grossMg, entry.tareMg),
  );

  function show(from: Bag) {
    Object.assign(entry, entryOf(from));
    Object.assign(seen, entryOf(from), { version: from.version });
  }

  const { run, pending, problem, errors, clear } = useApiForm(() =>
    acts.countBag(bag().id, { version: seen.version, ...entry }),
  );

  async function save(): Promise<boolean> {
    if (!changed.value) return true;
    const done = await run();
    if (done) show(bag());
    return done;
  }

  /** Drops what was typed, for what stands now. */
  function reset() {
    clear();
    show(bag());
  }

  watch(bag, (now) => {
    if (now.version !== seen.version && !changed.value) show(now);
  });

  return { entry, net, changed, save, reset, pending, problem, errors };
}
