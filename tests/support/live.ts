import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { io as connect, type Socket } from 'socket.io-client';
import type { ClientEvents, ServerEvents } from '#shared/schemas/live.ts';
import { attachSockets } from '#server/sockets/index.ts';
import { testApp, testPassword } from './client.ts';

export type LiveClient = Socket<ServerEvents, ClientEvents>;

/** The app listening on a free port, with its sockets; browsers made by `open` are signed in over real HTTP. */
export async function listen() {
  const http = createServer(testApp());
  const io = attachSockets(http);
  await new Promise<void>((resolve) => http.listen(0, '127.0.0.1', resolve));
  const origin = `http://127.0.0.1:${(http.address() as AddressInfo).port}`;
  const clients: LiveClient[] = [];

  async function signIn(email: string) {
    const reply = await fetch(`${origin}/api/v1/session`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json', 'Sec-Fetch-Site': 'same-origin' },
      body: JSON.stringify({ email, password: testPassword }),
    });
    const cookie = reply.headers.get('set-cookie')?.split(';')[0] ?? '';
    const call = (method: string, path: string, body?: unknown) =>
      fetch(`${origin}/api/v1${path}`, {
        method,
        headers: {
          'Content-Type': 'application/json',
          'Sec-Fetch-Site': 'same-origin',
          Cookie: cookie,
        },
        ...(body === undefined ? {} : { body: JSON.stringify(body) }),
      });
    return { cookie, call };
  }

  async function open(cookie: string): Promise<LiveClient> {
    const client: LiveClient = connect(origin, {
      transports: ['websocket'],
      reconnection: false,
      forceNew: true,
      extraHeaders: { Cookie: cookie, Origin: origin },
    });
    clients.push(client);
    await new Promise<void>((resolve, reject) => {
      client.once('connect', resolve);
      client.once('connect_error', reject);
    });
    return client;
  }

  async function close() {
    clients.forEach((client) => client.disconnect());
    await new Promise<void>((resolve) => void io.close(() => resolve()));
  }

  return { origin, signIn, open, close };
}

/** Resolves once the server has closed a client's connection. */
export function closed(client: LiveClient): Promise<string> {
  return new Promise((resolve) => {
    if (client.disconnected) resolve('before');
    else client.once('disconnect', resolve);
  });
}
