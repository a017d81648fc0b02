import { watch, type Ref } from 'vue';

/** Runs each time a dialog opens, also when it is mounted open: the place to fill its form anew. */
export function useOpened(open: Ref<boolean>, act: () => unknown) {
  watch(
    open,
    (now) => {
      if (now) void act();
    },
    { immediate: true },
  );
}
