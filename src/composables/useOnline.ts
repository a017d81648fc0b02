import { onScopeDispose, ref } from 'vue';

/** Whether the device says that it has a network. */
export function useOnline() {
  const online = ref(navigator.onLine);
  const read = () => {
    online.value = navigator.onLine;
  };
  window.addEventListener('online', read);
  window.addEventListener('offline', read);
  onScopeDispose(() => {
    window.removeEventListener('online', read);
    window.removeEventListener('offline', read);
  });
  return { online };
}
