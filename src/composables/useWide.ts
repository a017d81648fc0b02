import { onScopeDispose, ref } from 'vue';

/** Whether the window is at least so many CSS pixels wide. */
export function useWide(pixels: number) {
  const query = window.matchMedia(`(width >= ${pixels}px)`);
  const wide = ref(query.matches);
  const read = () => {
    wide.value = query.matches;
  };
  query.addEventListener('change', read);
  onScopeDispose(() => query.removeEventListener('change', read));
  return { wide };
}
