import { stateWords, type BuyState } from '#shared/domain/buys/states.ts';
import { computed, toValue, type MaybeRefOrGetter } from 'vue';
import { useCountdown } from 'src/composables/useCountdown.ts';

export type BuyStateFacts = {
  state: BuyState;
  frozen: boolean;
  opened: boolean;
  closesAt: string | null;
  frozenUntil: string | null;
  /** How far the server's clock is ahead of this device's, in ms. */
  aheadMs?: number | undefined;
};

const tones = {
  draft: 'neutral',
  open: 'moss',
  locked: 'plum',
  ordered: 'slate',
  arrived: 'slate',
  splitting: 'amber',
  pickup: 'moss',
  settled: 'neutral',
  cancelled: 'danger',
} as const;

/** A buy's state in words, with what is left until it closes, and the tone of its chip. */
export function useBuyState(facts: MaybeRefOrGetter<BuyStateFacts | null>) {
  const until = computed(() => {
    const now = toValue(facts);
    if (now?.state !== 'open') return null;
    const at = now.frozen ? now.frozenUntil : now.closesAt;
    return at ? new Date(Date.parse(at) - (now.aheadMs ?? 0)).toISOString() : null;
  });
  const { text, over } = useCountdown(until);
  const label = computed(() => {
    const now = toValue(facts);
    if (!now) return '';
    if (now.state === 'cancelled' && !now.opened) return 'Discarded';
    if (now.state !== 'open' || !until.value) return stateWords[now.state];
    if (now.frozen) return `Pledges rest · ${text.value} to decide`;
    return over.value ? 'Closing' : `Open · closes in ${text.value}`;
  });
  const tone = computed(() => {
    const now = toValue(facts);
    if (!now) return 'neutral' as const;
    return now.state === 'open' && now.frozen ? ('amber' as const) : tones[now.state];
  });
  return { label, tone };
}
