import { ref, watch, type Ref } from 'vue';

/** Turns true with the first opening and stays so: a dialog rendered behind it is loaded only by who opens it. */
export function useOnceOpen(open: Ref<unknown>): Readonly<Ref<boolean>> {
  const opened = ref(false);
  watch(
    open,
    (now) => {
      if (now) opened.value = true;
    },
    { immediate: true },
  );
  return opened;
}
