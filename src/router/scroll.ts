import type { RouterScrollBehavior } from 'vue-router';

const PATIENCE_MS = 600;

/** Waits until the page is tall enough to scroll back to where it was. */
const tallEnough = (top: number) =>
  new Promise<void>((resolve) => {
    const until = performance.now() + PATIENCE_MS;
    const look = () => {
      const reach = document.documentElement.scrollHeight - window.innerHeight;
      if (reach >= top || performance.now() > until) resolve();
      else requestAnimationFrame(look);
    };
    look();
  });

export const scrollBehavior: RouterScrollBehavior = async (to, from, saved) => {
  if (saved) {
    await tallEnough(saved.top);
    return saved;
  }
  if (to.hash) return { el: to.hash, top: 16 };
  return to.path === from.path ? false : { top: 0 };
};
