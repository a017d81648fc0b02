import { onScopeDispose } from 'vue';

/** Runs `act` every so often while the page is shown and `wanted` says so; a failure waits for the next time. */
export function useEvery(ms: number, wanted: () => boolean, act: () => Promise<unknown>): void {
  const timer = setInterval(() => {
    if (document.visibilityState === 'visible' && wanted()) act().catch(() => undefined);
  }, ms);
  onScopeDispose(() => clearInterval(timer));
}
