import { defineBoot } from '#q-app/wrappers';
import { watch } from 'vue';
import { connectSocket, disconnectSocket, onConnection, onLive } from 'src/api/socket.ts';
import { useBuysStore } from 'src/stores/buys.ts';
import { usePickupStore } from 'src/stores/pickup.ts';
import { useSessionStore } from 'src/stores/session.ts';
import { useSplitsStore } from 'src/stores/splits.ts';

export default defineBoot(({ router }) => {
  const session = useSessionStore();
  const buys = useBuysStore();
  const splits = useSplitsStore();
  const pickup = usePickupStore();

  onLive('buy:changed', (change) => buys.hear(change));
  onLive('buy:changed', (change) => splits.hear(change));
  onLive('split:changed', (change) => splits.receive(change));
  onLive('buy:changed', (change) => pickup.hear(change));
  onLive('split:changed', (change) => pickup.hear(change));

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
      if (id) connectSocket();
    },
    { immediate: true },
  );
});
