import { computed, ref, watch, type Ref } from 'vue';

export type Parsed = { ok: true; value: number } | { ok: false; code: string; readings?: number[] };

type Choices = {
  parse: (text: string) => Parsed;
  /** The value in words, for the echo and the offered readings. */
  say: (value: number) => string;
  /** The value as one would type it. */
  write: (value: number) => string;
  /** A further rule: what is wrong with a value that could be read, or ''. */
  check?: (value: number) => string;
  required?: () => boolean;
};

const reasons: Record<string, string> = {
  unreadable: 'That is not a number that can be read here.',
  negative: 'It can not be below zero.',
  too_precise: 'That is finer than can be kept.',
  too_large: 'That is too large.',
};

/**
 * A number as a person types it: what was typed stays, the value read is echoed, and where a mark
 * could mean two things both readings are offered. The model changes only to what could be read.
 */
export function useTypedValue(model: Ref<number | null>, choices: Choices) {
  const { parse, say, write, check, required } = choices;
  const written = () => (model.value !== null ? write(model.value) : '');
  const text = ref(written());

  const parsed = computed(() => parse(text.value));
  const readings = computed(() =>
    !parsed.value.ok && parsed.value.code === 'ambiguous' ? (parsed.value.readings ?? []) : [],
  );
  const reason = computed(() => {
    if (text.value.trim() === '') return required?.() ? 'Write a number.' : '';
    const { value } = parsed;
    if (value.ok) return check?.(value.value) ?? '';
    if (value.code === 'ambiguous') {
      return `Is that ${(value.readings ?? []).map(say).join(' or ')}?`;
    }
    return reasons[value.code] ?? 'That could not be read.';
  });
  const echo = computed(() =>
    parsed.value.ok && text.value.trim() !== write(parsed.value.value)
      ? `Read as ${say(parsed.value.value)}`
      : '',
  );

  watch(text, () => {
    if (text.value.trim() === '') model.value = null;
    else if (parsed.value.ok && !reason.value) model.value = parsed.value.value;
  });
  watch(model, (value) => {
    // Someone else changed it: show theirs. What is being typed means the same and stays.
    const gone = value === null;
    const same = parsed.value.ok ? parsed.value.value === value : gone;
    if (!same && (!gone || parsed.value.ok)) text.value = written();
  });

  const choose = (value: number) => {
    text.value = write(value);
  };

  return { text, parsed, reason, echo, readings, choose };
}
