import { onScopeDispose, ref } from 'vue';

/** True while the page is being printed, by a button or by the browser's own command. */
export function usePrinting() {
  const printing = ref(false);
  const begin = () => {
    printing.value = true;
  };
  const end = () => {
    printing.value = false;
  };
  window.addEventListener('beforeprint', begin);
  window.addEventListener('afterprint', end);
  onScopeDispose(() => {
    window.removeEventListener('beforeprint', begin);
    window.removeEventListener('afterprint', end);
  });
  return { printing };
}
