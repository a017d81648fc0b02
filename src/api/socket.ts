import type { ClientEvents, JoinAnswer, JoinBuy, ServerEvents } from '#shared/schemas/live.ts';
import type { Socket } from 'socket.io-client';

type LiveSocket = Socket<ServerEvents, ClientEvents>;
type Joined = (answer: JoinAnswer, again: boolean) => void;
type Room = JoinBuy & { holders: Set<Joined> };

const ANSWER_MS = 5_000;
const AGAIN_MS = 500;
const RELOAD_MS = 5_000;

let socket: LiveSocket | null = null;
/** Counts who asked to connect or to close, so that a client that was late to load doesn't open what was closed. */
let turn = 0;
let whenRefused: () => void = () => {};
const rooms = new Map<string, Room>();
const attachers = new Set<(to: LiveSocket) => void>();
const watchers = new Set<(connected: boolean) => void>();

const tell = (connected: boolean) => watchers.forEach((watcher) => watcher(connected));

async function ask({ club, buy, holders }: Room, again: boolean) {
  if (!socket?.connected) return;
  const asked = [...holders];
  const answer = await socket
    .timeout(ANSWER_MS)
    .emitWithAck('buy:join', { club, buy })
    .catch(() => null);
  // No answer means a lost connection: the next connect asks again.
  if (answer) asked.forEach((joined) => joined(answer, again));
}

/** The socket's client comes after the page itself, and again after a while when it couldn't be had. */
async function loadClient(asked: number) {
  for (;;) {
    const client = await import('./socketClient.ts').catch(() => null);
    if (asked !== turn) return null;
    if (client) return client;
    tell(false);
    await new Promise((resolve) => setTimeout(resolve, RELOAD_MS));
  }
}

/** Opens the one socket of this page; called when somebody is signed in. */
export async function connectSocket() {
  if (socket) return;
  turn += 1;
  const client = await loadClient(turn);
  if (!client) return;
  let before = false;
  const opened: LiveSocket = client.io({ transports: ['websocket'], withCredentials: true });
  socket = opened;
  opened.on('connect', () => {
    tell(true);
    // The server forgets rooms with the connection, so each is asked for again.
    for (const room of rooms.values()) void ask(room, before);
    before = true;
  });
  opened.on('disconnect', (reason) => {
    tell(false);
    // The server hangs up when a role or a session was taken away: who is still let in connects again.
    if (reason === 'io server disconnect' && socket === opened) {
      setTimeout(() => socket === opened && opened.connect(), AGAIN_MS);
    }
  });
  opened.on('connect_error', ({ message }) => {
    if (message === 'signed_out') whenRefused();
  });
  attachers.forEach((attach) => attach(opened));
}

/** Named once, by the session: called when the server lets this page listen no more, since its session has ended. */
export const onSocketRefused = (handler: () => void) => {
  whenRefused = handler;
};

/** Closes it; called at sign-out. */
export function disconnectSocket() {
  turn += 1;
  socket?.disconnect();
  socket = null;
}

/** Listens for a live event for as long as the page is open. */
export function onLive<Event extends keyof ServerEvents>(
  event: Event,
  handler: ServerEvents[Event],
) {
  const attach = (to: LiveSocket) => {
    to.on(event, handler as Parameters<typeof to.on<Event>>[1]);
  };
  attachers.add(attach);
  if (socket) attach(socket);
}

/** Tells of each change of the connection; gives the function that stops it. */
export function onConnection(watcher: (connected: boolean) => void): () => void {
  watchers.add(watcher);
  return () => watchers.delete(watcher);
}

/**
 * Asks to hear a buy, and asks again after each lost connection. `joined` gets each answer, with
 * `again` true when something may have been missed meanwhile. Gives the function that leaves.
 */
export function joinRoom(body: JoinBuy, joined: Joined): () => void {
  const room = rooms.get(body.buy) ?? { ...body, holders: new Set<Joined>() };
  rooms.set(body.buy, room);
  room.holders.add(joined);
  void ask(room, false);
  return () => {
    room.holders.delete(joined);
    if (room.holders.size > 0) return;
    rooms.delete(body.buy);
    socket?.emit('buy:leave', { buy: body.buy });
  };
}
