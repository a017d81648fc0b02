import { defineBoot } from '#q-app/wrappers';
import { watch } from 'vue';
import { connectSocket, disconnectSocket, onConnection, onLive } from 'src/api/socket.ts';
import { useBuysStore } from 'src/stores/buys.ts';
import { useSessionStore } from 'src/stores/session.ts';

export default defineBoot(({ router }) => {
  const session = useSessionStore();
  const buys = useBuysStore();

  // The stores of one step's pages listen by themselves once such a page has loaded them.
  onLive('buy:changed', (change) => buys.hear(change));

  /** A role or a membership may be another one since the connection was lost. */
  async function lookAgain() {
    await session.load();
    const { club } = router.currentRoute.value.params;
    if (typeof club === 'string' && !session.findMembership(club)) await router.replace('/');
  }

  let lost = false;
  onConnection((connected) => {
    if (connected && lost) lookAgain().catch(() => undefined);
    lost = !connected;
  });

  watch(
    () => session.account?.id,
    (id) => {
      // The handshake carries the session, so another account needs another connection.
      disconnectSocket();
      if (id) void connectSocket();
    },
    { immediate: true },
  );
});
