import { defineBoot } from '#q-app/wrappers';
import { onSignedOut } from 'src/api/http.ts';
import { onSocketRefused } from 'src/api/socket.ts';
import { useSessionStore } from 'src/stores/session.ts';

export default defineBoot(({ router }) => {
  const session = useSessionStore();

  const toSignIn = () => {
    if (!session.signedIn) return;
    session.clear();
    const { fullPath } = router.currentRoute.value;
    void router.push({ path: '/sign-in', query: { next: fullPath } });
  };
  onSignedOut(toSignIn);
  onSocketRefused(toSignIn);
});
