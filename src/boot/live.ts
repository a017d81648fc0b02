import { defineBoot } from '#q-app/wrappers';
import { watch } from 'vue';
import { connectSocket, disconnectSocket } from 'src/api/socket.ts';
import { useSessionStore } from 'src/stores/session.ts';

export default defineBoot(() => {
  const session = useSessionStore();

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
