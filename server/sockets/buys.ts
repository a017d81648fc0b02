import { JoinBuy } from '#shared/schemas/live.ts';
import { select } from '../config/database.ts';
import { logger } from '../config/logger.ts';
import { findBuyActor, findClubActor } from '../services/actors.ts';
import type { LiveServer, LiveSocket } from './index.ts';

async function lookersOf(io: LiveServer, buyId: string) {
  const sockets = await io.in(`buy:${buyId}`).fetchSockets();
  const byMember = new Map<string, string>();
  for (const { data } of sockets) {
    for (const look of data.looking) {
      if (look.buyId === buyId) byMember.set(look.membershipId, look.name);
    }
  }
  return [...byMember].map(([membershipId, name]) => ({ membershipId, name }));
}

async function tellLookers(io: LiveServer, buyId: string): Promise<void> {
  io.to(`buy:${buyId}`).emit('buy:lookers', { buyId, lookers: await lookersOf(io, buyId) });
}

/** Joining a buy's room asks the same policy as reading the buy; leaving and disconnecting tell the others. */
export function handleBuyEvents(io: LiveServer, socket: LiveSocket): void {
  socket.on('buy:join', (body, answer) => {
    if (typeof answer !== 'function') return;
    void (async () => {
      const parsed = JoinBuy.safeParse(body);
      if (!parsed.success) return answer({ ok: false, code: 'invalid' });
      const actor = await findClubActor(socket.data.accountId, parsed.data.club, socket.id);
      const buyActor = actor && (await findBuyActor(actor, parsed.data.buy));
      if (!buyActor) return answer({ ok: false, code: 'not_found' });
      const buyId = buyActor.buy.id;
      socket.data.looking = [
        ...socket.data.looking.filter((look) => look.buyId !== buyId),
        {
          buyId,
          clubId: buyActor.club.id,
          membershipId: buyActor.membershipId,
          name: buyActor.name,
        },
      ];
      await socket.join(`buy:${buyId}`);
      const [row] = await select<{ sheet_version: number }>(
        'select sheet_version from buys where id = :buyId',
        { buyId },
      );
      answer({
        ok: true,
        sheetVersion: row?.sheet_version ?? 0,
        lookers: await lookersOf(io, buyId),
      });
      await tellLookers(io, buyId);
    })().catch((error: unknown) => logger.error({ err: error }, 'buy:join'));
  });

  const leave = (buyId: string) => {
    socket.data.looking = socket.data.looking.filter((look) => look.buyId !== buyId);
    void Promise.resolve(socket.leave(`buy:${buyId}`))
      .then(() => tellLookers(io, buyId))
      .catch((error: unknown) => logger.error({ err: error }, 'buy:leave'));
  };
  socket.on('buy:leave', (body) => {
    if (typeof body?.buy === 'string') leave(body.buy);
  });
  socket.on('disconnecting', () => {
    for (const { buyId } of socket.data.looking) leave(buyId);
  });
}
