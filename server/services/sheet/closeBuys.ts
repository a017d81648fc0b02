import { databaseNow, select, transact, type Tx } from '../../config/database.ts';
import { logger } from '../../config/logger.ts';
import { Buy } from '../../models/Buy.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import { systemActor } from '../actorName.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { cancelUnderLock } from '../buys/cancelBuy.ts';
import { changeTerms, pledgersOf } from '../buys/withBuy.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { clubOfBuy } from './clubOfBuy.ts';
import { withPreparedLock } from './lockBuy.ts';
import type { PreparedLock } from './prepareLock.ts';
import { writeLock } from './writeLock.ts';

const frozenHours = 72;
const closing = systemActor('Closing time');

async function organisersOf(buy: Buy, tx: Tx): Promise<string[]> {
  const rows = await select<{ id: string }>(
    'select membership_id as id from buy_organisers where buy_id = :buyId',
    { buyId: buy.id },
    tx,
  );
  return [buy.responsibleId, ...rows.map(({ id }) => id)];
}

async function freeze(buy: Buy, { blocks }: PreparedLock, now: Date, tx: Tx): Promise<void> {
  const why = blocks.map(({ text }) => text).join(' ');
  const until = new Date(now.getTime() + frozenHours * 3_600_000);
  buy.frozenAt = now;
  buy.frozenUntil = until;
  await changeTerms(buy, `It closed but could not lock. ${why} Pledges rest.`, closing, tx);
  await writeAudit(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    by: closing,
    action: 'buys.freeze',
    subject: { type: 'buy', id: buy.id },
    after: { why, frozenUntil: until },
  });
  const { slug, say } = await clubOfBuy(buy.clubId, tx);
  const organisers = new Set(await organisersOf(buy, tx));
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'terms_changed',
    eventKey: `buy:${buy.id}:frozen:${buy.termsVersion}`,
    to: [...new Set([...organisers, ...(await pledgersOf(buy.id, tx))])],
    content: (membershipId) => ({
      subject: `${buy.name} closed but could not lock`,
      paragraphs: [
        `${buy.name} reached its closing time. ${why}`,
        organisers.has(membershipId)
          ? `Extend it, lower its minimum or cancel it by ${say.at(until)}. After that it cancels itself.`
          : `Pledges rest. The organiser has until ${say.at(until)} to extend it, lower its minimum or cancel it.`,
      ],
      action: { label: 'See the buy', path: `/c/${slug}/buys/${buy.id}` },
    }),
  });
  const { id: buyId, sheetVersion } = buy;
  tx.afterCommit(() =>
    publishToBuy(buyId, 'buy:changed', {
      kind: 'state',
      buyId,
      sheetVersion,
      state: 'open',
      frozen: true,
    }),
  );
}

/** Closes one buy whose time has come: it locks, or its pledges rest. Does nothing when another process was quicker. */
export async function closeBuy(buyId: string): Promise<void> {
  let now = new Date(0);
  await withPreparedLock(
    buyId,
    async (buy, tx) => {
      now = await databaseNow(tx);
      return buy.state === 'open' && !buy.frozenAt && buy.closesAt !== null && buy.closesAt <= now;
    },
    async (buy, prepared, tx) => {
      const { sheet, blocks } = prepared;
      if (sheet && blocks.length === 0) await writeLock(buy, { ...prepared, sheet }, closing, tx);
      else await freeze(buy, prepared, now, tx);
    },
  );
}

/** Cancels one frozen buy whose 72 hours are over. */
async function giveUp(buyId: string): Promise<void> {
  await transact(async (tx) => {
    const buy = await Buy.lock(buyId, tx);
    const now = await databaseNow(tx);
    if (buy.state !== 'open' || !buy.frozenUntil || buy.frozenUntil > now) return;
    const reason = `It could not lock, and ${frozenHours} hours went by without a decision.`;
    await cancelUnderLock(buy, reason, closing, tx);
  });
}

/** Closes what is due and gives up what was frozen too long; each process may run it, the row locks keep order. */
export async function closeDueBuys(): Promise<void> {
  const due = await select<{ id: string; over: boolean }>(
    `select id, frozen_at is not null as over from buys where state = 'open' and (
       (frozen_at is null and closes_at <= clock_timestamp()) or frozen_until <= clock_timestamp())`,
  );
  for (const { id, over } of due) {
    try {
      await (over ? giveUp(id) : closeBuy(id));
    } catch (error) {
      logger.error({ err: error, buyId: id }, 'closing failed');
    }
  }
}
