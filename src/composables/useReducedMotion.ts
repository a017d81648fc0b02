import { onScopeDispose, ref } from 'vue';

/** Whether the person asked for less motion. */
export function useReducedMotion() {
  const query = window.matchMedia('(prefers-reduced-motion: reduce)');
  const reduced = ref(query.matches);
  const read = () => {
    reduced.value = query.matches;
  };
  query.addEventListener('change', read);
  onScopeDispose(() => query.removeEventListener('change', read));
  return { reduced };
}
