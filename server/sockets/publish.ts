import type { ServerEvents } from '#shared/schemas/live.ts';
import { logger } from '../config/logger.ts';
import type { LiveServer } from './index.ts';

let io: LiveServer | undefined;

/** Called once when sockets are attached; without it (jobs, seeds, tests of services) publishing does nothing. */
export function useServer(server: LiveServer): void {
  io = server;
}

/**
 * To the sockets of this process at once, then to the other processes, whose sockets hear it by `relay`: a plain emit
 * would wait for the database to take the message before it told anyone here.
 */
function emitTo<E extends keyof ServerEvents>(
  room: string,
  event: E,
  args: Parameters<ServerEvents[E]>,
): void {
  const server = io;
  if (!server) return;
  server.local.to(room).emit(event, ...args);
  // Nobody is told while this process is alone.
  Promise.resolve(server.of('/').adapter.serverCount())
    .then((processes) => processes > 1 && server.serverSideEmit('relay', { room, event, args }))
    .catch((error: unknown) => logger.error({ err: error, event }, 'relay failed'));
}

/** Sends an event to everyone in a buy's room, in all processes. Never throws: what is committed stays committed. */
export function publishToBuy<E extends keyof ServerEvents>(
  buyId: string,
  event: E,
  ...args: Parameters<ServerEvents[E]>
): void {
  try {
    emitTo(`buy:${buyId}`, event, args);
  } catch (error) {
    logger.error({ err: error, event }, 'publish failed');
  }
}

/** Sends an event to every open page of one account. Never throws. */
export function publishToAccount<E extends keyof ServerEvents>(
  accountId: string,
  event: E,
  ...args: Parameters<ServerEvents[E]>
): void {
  try {
    emitTo(`account:${accountId}`, event, args);
  } catch (error) {
    logger.error({ err: error, event }, 'publish failed');
  }
}

/**
 * Ends every socket of an account, in all processes: after sign-out everywhere, removal or loss of a role.
 * @param exceptSessionId the session that stays, after a change of password
 */
export function disconnectAccount(accountId: string, exceptSessionId?: string): void {
  try {
    const all = io?.in(`account:${accountId}`);
    (exceptSessionId ? all?.except(`session:${exceptSessionId}`) : all)?.disconnectSockets(true);
  } catch (error) {
    logger.error({ err: error }, 'disconnect failed');
  }
}

/** Ends every socket of one session. */
export function disconnectSession(sessionId: string): void {
  try {
    io?.in(`session:${sessionId}`).disconnectSockets(true);
  } catch (error) {
    logger.error({ err: error }, 'disconnect failed');
  }
}
