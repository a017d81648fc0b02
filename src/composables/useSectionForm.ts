import { computed, reactive, ref, shallowRef, watch } from 'vue';
import { asProblem, type ApiProblem } from 'src/api/problem.ts';

export type SectionEffect = {
  summary: string;
  told: number;
  beforeMinor: number | null;
  afterMinor: number | null;
};

type Sent = { effect: SectionEffect | null };

type Choices<Fields extends object> = {
  /** What is saved now; fields that nobody is changing here follow it. */
  read: () => Fields;
  /** Sends the changed fields; with `preview` it asks only what they would do. */
  send: (changed: Partial<Fields>, fields: Fields, preview: boolean) => Promise<Sent>;
  /** Whether changes are saved as one leaves a field, or wait for a yes because others are told. */
  auto: () => boolean;
};

const same = (a: unknown, b: unknown) => JSON.stringify(a) === JSON.stringify(b);

/**
 * The fields of one section of a form that has no one button for all. In `auto` each change is saved as one leaves its
 * field and can be taken back; otherwise changes gather until `ask` has shown what they do and `save` is called. A
 * refused change stays in its field.
 */
export function useSectionForm<Fields extends object>(choices: Choices<Fields>) {
  type Key = keyof Fields & string;
  const form = reactive({ ...choices.read() }) as Fields;
  const base = shallowRef<Fields>(choices.read());
  const pending = ref(false);
  const saved = ref(false);
  const problem = shallowRef<ApiProblem | null>(null);
  const effect = shallowRef<SectionEffect | null>(null);
  const undoable = shallowRef<Partial<Fields> | null>(null);

  const keys = () => Object.keys(base.value) as Key[];
  const changedKeys = computed(() => keys().filter((key) => !same(form[key], base.value[key])));
  const dirty = computed(() => changedKeys.value.length > 0);
  const errors = computed<Record<string, string | undefined>>(() => problem.value?.errors ?? {});

  const pick = (from: Fields, names: Key[]) =>
    Object.fromEntries(names.map((name) => [name, from[name]])) as Partial<Fields>;

  watch(choices.read, (now) => {
    for (const key of keys()) {
      if (same(form[key], base.value[key])) form[key] = now[key];
    }
    base.value = now;
  });

  /** Sends what differs; a change made meanwhile is sent after it. */
  async function save(): Promise<boolean> {
    if (pending.value || !dirty.value) return !dirty.value;
    const names = changedKeys.value;
    const before = pick(base.value, names);
    const sent = pick({ ...form }, names);
    pending.value = true;
    problem.value = null;
    try {
      await choices.send(sent, { ...form }, false);
      // What was sent is what is saved, also where the server had nothing to change.
      base.value = { ...base.value, ...sent };
      effect.value = null;
      saved.value = true;
      undoable.value = before;
      return true;
    } catch (error) {
      problem.value = asProblem(error);
      effect.value = null;
      return false;
    } finally {
      pending.value = false;
      if (choices.auto() && problem.value === null && dirty.value) void save();
    }
  }

  /** Asks what the changes would do, for others to be told of; the answer stands in `effect`. */
  async function ask() {
    if (pending.value || !dirty.value) return;
    pending.value = true;
    problem.value = null;
    try {
      const reply = await choices.send(pick({ ...form }, changedKeys.value), { ...form }, true);
      effect.value = reply.effect;
    } catch (error) {
      problem.value = asProblem(error);
    } finally {
      pending.value = false;
    }
  }

  /** One left a field. Its value arrives with the same event, so look a moment later. */
  function commit() {
    setTimeout(() => {
      if (choices.auto()) void save();
    });
  }

  function undo() {
    if (!undoable.value) return;
    Object.assign(form, undoable.value);
    undoable.value = null;
    if (choices.auto()) void save().then(() => (undoable.value = null));
  }

  /** Goes back to the fields without saving what was asked about. */
  const forget = () => {
    effect.value = null;
  };

  /** Drops what isn't saved. */
  function reset() {
    Object.assign(form, base.value);
    problem.value = null;
    effect.value = null;
  }

  watch(dirty, (isDirty) => {
    if (isDirty) saved.value = false;
  });

  return {
    form,
    dirty,
    pending,
    saved,
    problem,
    errors,
    effect,
    undoable,
    auto: computed(() => choices.auto()),
    save,
    ask,
    forget,
    commit,
    undo,
    reset,
  };
}

/** What a section's frame needs of its form, whatever its fields. */
export type SectionState = Omit<ReturnType<typeof useSectionForm<object>>, 'form'>;
