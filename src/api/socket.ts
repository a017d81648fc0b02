import { io, type Socket } from 'socket.io-client';

type JoinReply = { ok: true } | { ok: false; code: string };
type Listener = (payload: unknown) => void;
type Room = { holders: number; joined: Set<(again: boolean) => void> };

let socket: Socket | null = null;
const rooms = new Map<string, Room>();
const handlers = new Map<string, Set<Listener>>();
const watchers = new Set<(connected: boolean) => void>();

const tell = (connected: boolean) => watchers.forEach((watcher) => watcher(connected));

async function join(name: string, room: Room, again: boolean) {
  if (!socket?.connected) return;
  const reply = (await socket
    .timeout(5_000)
    .emitWithAck('room:join', { room: name })
    .catch(() => ({ ok: false, code: 'timeout' }))) as JoinReply;
  if (reply.ok) room.joined.forEach((joined) => joined(again));
}

/** Opens the one socket of this page; called when somebody is signed in. */
export function connectSocket() {
  if (socket) return;
  let before = false;
  socket = io({ transports: ['websocket'], withCredentials: true });
  socket.on('connect', () => {
    tell(true);
    // The server forgets rooms with the connection, so each is asked for again.
    for (const [name, room] of rooms) void join(name, room, before);
    before = true;
  });
  socket.on('disconnect', () => tell(false));
  for (const [event, set] of handlers) for (const handler of set) socket.on(event, handler);
}

/** Closes it; called at sign-out. */
export function disconnectSocket() {
  socket?.disconnect();
  socket = null;
}

/** Listens for a live event and gives the function that stops listening. */
export function onLive<Payload>(event: string, handler: (payload: Payload) => void): () => void {
  const listener = handler as Listener;
  const set = handlers.get(event) ?? new Set();
  handlers.set(event, set.add(listener));
  socket?.on(event, listener);
  return () => {
    set.delete(listener);
    socket?.off(event, listener);
  };
}

/** Tells whether the socket is connected, at each change. */
export function onConnection(watcher: (connected: boolean) => void): () => void {
  watchers.add(watcher);
  return () => watchers.delete(watcher);
}

/**
 * Asks to hear a room such as `buy:ID`, and asks again after each lost connection. `joined` is
 * called each time the server agrees, with `again` true when something may have been missed.
 */
export function joinRoom(name: string, joined: (again: boolean) => void = () => {}): () => void {
  const room = rooms.get(name) ?? { holders: 0, joined: new Set() };
  rooms.set(name, room);
  room.holders += 1;
  room.joined.add(joined);
  void join(name, room, false);
  return () => {
    room.joined.delete(joined);
    room.holders -= 1;
    if (room.holders > 0) return;
    rooms.delete(name);
    socket?.emit('room:leave', { room: name });
  };
}

/** Sends an event and waits at most five seconds for the answer. */
export const askLive = <Reply>(event: string, payload: unknown): Promise<Reply> =>
  socket?.connected
    ? (socket.timeout(5_000).emitWithAck(event, payload) as Promise<Reply>)
    : Promise.reject(new Error('not connected'));
