import type { Server as HttpServer } from 'node:http';
import { createAdapter } from '@socket.io/postgres-adapter';
import type { Request, Response } from 'express';
import { Server, type Socket } from 'socket.io';
import type { ClientEvents, ServerEvents } from '#shared/schemas/live.ts';
import { pool } from '../config/database.ts';
import { logger } from '../config/logger.ts';
import { socketsOpen } from '../config/metrics.ts';
import { passport } from '../config/passport.ts';
import { isSameOrigin } from '../middlewares/sameOrigin.ts';
import { sessions } from '../middlewares/session.ts';
import { handleBuyEvents } from './buys.ts';
import { useServer } from './publish.ts';

export interface SocketData {
  accountId: string;
  sessionId: string;
  /** Buy rooms this socket is in, with what is shown of its person to the others. */
  looking: { buyId: string; clubId: string; membershipId: string; name: string }[];
}

/** What the processes tell each other: an event for the sockets of a room. */
export interface ProcessEvents {
  relay: (message: { room: string; event: keyof ServerEvents; args: unknown[] }) => void;
}

export type LiveServer = Server<ClientEvents, ServerEvents, ProcessEvents, SocketData>;
export type LiveSocket = Socket<ClientEvents, ServerEvents, ProcessEvents, SocketData>;

/** Socket.IO over the session cookie; websocket only, so that no sticky sessions are needed. */
export function attachSockets(http: HttpServer): LiveServer {
  const io: LiveServer = new Server(http, {
    transports: ['websocket'],
    serveClient: false,
    allowRequest: (req, decide) => {
      const fromBrowser =
        req.headers['sec-fetch-site'] !== undefined || req.headers.origin !== undefined;
      decide(null, fromBrowser && isSameOrigin(req));
    },
  });
  io.adapter(
    createAdapter(pool, { errorHandler: (error) => logger.warn({ err: error }, 'socket adapter') }),
  );
  io.on('relay', ({ room, event, args }) => {
    io.local.to(room).emit(event, ...(args as Parameters<ServerEvents[typeof event]>));
  });
  const onHandshake =
    (middleware: (req: Request, res: Response, next: () => void) => void) =>
    (req: Request & { _query: Record<string, string> }, res: Response, next: () => void) => {
      if (req._query.sid === undefined) middleware(req, res, next);
      else next();
    };
  io.engine.use(onHandshake(sessions));
  io.engine.use(onHandshake(passport.initialize()));
  io.engine.use(onHandshake(passport.session()));
  io.use((socket, next) => {
    const req = socket.request as Request;
    if (!req.user) {
      next(new Error('signed_out'));
      return;
    }
    socket.data = { accountId: req.user.id, sessionId: req.session.id, looking: [] };
    next();
  });
  io.on('connection', (socket) => {
    socketsOpen.inc();
    socket.once('disconnect', () => socketsOpen.dec());
    void socket.join([`account:${socket.data.accountId}`, `session:${socket.data.sessionId}`]);
    handleBuyEvents(io, socket);
  });
  useServer(io);
  return io;
}
