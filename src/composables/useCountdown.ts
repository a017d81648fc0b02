import { computed, onScopeDispose, ref, toValue, type MaybeRefOrGetter } from 'vue';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
const DAY = 24 * HOUR;

/** '3 d 4 h', '4 h 12 min', '12 min', '48 s': two units at most, rounded down. */
export function formatRemaining(ms: number): string {
  if (ms >= DAY) return `${Math.floor(ms / DAY)} d ${Math.floor((ms % DAY) / HOUR)} h`;
  if (ms >= HOUR) return `${Math.floor(ms / HOUR)} h ${Math.floor((ms % HOUR) / MINUTE)} min`;
  if (ms >= MINUTE) return `${Math.floor(ms / MINUTE)} min`;
  return `${Math.max(0, Math.floor(ms / 1000))} s`;
}

/** What remains until an instant; it ticks each second, which the last minute needs. */
export function useCountdown(until: MaybeRefOrGetter<string | null | undefined>) {
  const now = ref(Date.now());
  const timer = setInterval(() => {
    now.value = Date.now();
  }, 1000);
  onScopeDispose(() => clearInterval(timer));

  const remainingMs = computed(() => {
    const at = toValue(until);
    return at ? Math.max(0, Date.parse(at) - now.value) : null;
  });
  const text = computed(() =>
    remainingMs.value === null ? '' : formatRemaining(remainingMs.value),
  );
  return { remainingMs, text, over: computed(() => remainingMs.value === 0) };
}
