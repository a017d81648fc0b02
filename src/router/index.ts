import { defineRouter } from '#q-app/wrappers';
import { createRouter, createWebHistory } from 'vue-router';
import { makeTitle } from 'src/composables/useTitle.ts';
import { decide } from 'src/router/guard.ts';
import { routes } from 'src/router/routes.ts';
import { scrollBehavior } from 'src/router/scroll.ts';
import { useSessionStore } from 'src/stores/session.ts';

export default defineRouter(() => {
  const router = createRouter({ history: createWebHistory(), routes, scrollBehavior });

  router.beforeEach(async (to) => {
    const session = useSessionStore();
    if (!session.loaded) await session.load().catch(() => undefined);
    if (!session.loaded) {
      // Without the server nobody can be told apart: the start page says so and tries again.
      return to.name === 'home' || { name: 'home', query: { next: to.fullPath } };
    }
    const decision = decide(to, session);
    if (decision === true) {
      session.enterClub(typeof to.params.club === 'string' ? to.params.club : session.clubSlug);
    }
    return decision;
  });

  router.afterEach((to) => {
    const { currentClub } = useSessionStore();
    document.title = makeTitle(to.meta.title, to.params.club ? currentClub?.clubName : null);
  });

  return router;
});
