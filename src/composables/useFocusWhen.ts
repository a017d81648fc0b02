import { nextTick, watch, type ShallowRef, type WatchSource } from 'vue';

type Focusable = { focus: () => void };

/** Puts the focus where a form begins, once the person has opened it. */
export function useFocusWhen(
  open: WatchSource<boolean>,
  target: Readonly<ShallowRef<Focusable | null>>,
) {
  watch(open, async (now) => {
    if (!now) return;
    await nextTick();
    target.value?.focus();
  });
}
