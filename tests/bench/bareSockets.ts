/** What the fan-out is measured against: Socket.IO in memory, one room, one payload. */
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { Server } from 'socket.io';

const payload = JSON.parse(process.env.BENCH_PAYLOAD ?? '{}') as Record<string, unknown>;
const now = () => performance.timeOrigin + performance.now();
const server = createServer((req, res) => {
  if (req.method === 'POST') io.to('room').emit('buy:changed', { ...payload, emittedAt: now() });
  res.end('ok');
});
const io = new Server(server, { transports: ['websocket'], serveClient: false });
io.on('connection', (socket) => void socket.join('room'));
server.listen(0, '127.0.0.1', () => {
  const { port } = server.address() as AddressInfo;
  process.stdout.write(`http://127.0.0.1:${port}\n`);
});
process.on('SIGTERM', () => process.exit(0));
