import { createServer } from 'node:net';

/** @returns whether a port can be listened on now */
export function isFree(port, host = '127.0.0.1') {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => resolve(false));
    probe.listen({ port, host, exclusive: true }, () => probe.close(() => resolve(true)));
  });
}

/** @returns a port that the system says is free */
export function findFreePort(host = '127.0.0.1') {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen({ port: 0, host }, () => {
      const { port } = probe.address();
      probe.close(() => resolve(port));
    });
  });
}

/** @returns the first free port from the wanted one up, or null when the next 100 are all taken */
export async function findFreePortFrom(wanted, host) {
  for (let port = wanted; port < wanted + 100; port++) if (await isFree(port, host)) return port;
  return null;
}
