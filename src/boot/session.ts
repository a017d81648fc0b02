import { defineBoot } from '#q-app/wrappers';
import { onSignedOut } from 'src/api/http.ts';
import { useSessionStore } from 'src/stores/session.ts';

export default defineBoot(({ router }) => {
  const session = useSessionStore();

  onSignedOut(() => {
    if (!session.signedIn) return;
    session.clear();
    const { fullPath } = router.currentRoute.value;
    void router.push({ path: '/sign-in', query: { next: fullPath } });
  });
});
