import { defineBoot } from '#q-app/wrappers';
import { watch } from 'vue';
import { connectSocket, disconnectSocket, onLive } from 'src/api/socket.ts';
import { useBuysStore } from 'src/stores/buys.ts';
import { useSessionStore } from 'src/stores/session.ts';

export default defineBoot(() => {
  const session = useSessionStore();
  const buys = useBuysStore();

  onLive('buy:changed', (change) => buys.hear(change));

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
