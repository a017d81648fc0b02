import type { BuyHeader } from '#shared/schemas/buys.ts';
import { databaseNow, execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import type { By } from '../actorName.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { memberBalancesOfBuy } from '../ledger/balances.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { ordersPlaced } from '../orders/findOrders.ts';
import { wrongState } from '../problem.ts';
import { readBuyHeaderAgain } from './readBuys.ts';
import { sayFor } from './sayTerms.ts';
import { byActor, changeTerms, pledgersOf, withBuy } from './withBuy.ts';

interface ClubRow {
  slug: string;
  currency: string;
  locale: string;
  time_zone: string;
}

async function clubOf(clubId: string, tx: Tx) {
  const [row] = await select<ClubRow>(
    'select slug, currency, locale, time_zone from clubs where id = :clubId',
    { clubId },
    tx,
  );
  if (!row) throw new Error(`no club ${clubId}`);
  return { slug: row.slug, say: sayFor({ ...row, timeZone: row.time_zone }) };
}

/** What each payer has paid into a buy that is not to be, in minor units. */
async function deposits(buyId: string, tx: Tx): Promise<Map<string, number>> {
  const balances = await memberBalancesOfBuy(buyId, tx);
  return new Map(
    [...balances].filter(([, balance]) => balance < 0).map(([id, balance]) => [id, -balance]),
  );
}

async function tellPledgers(buy: Buy, reason: string, by: By, tx: Tx): Promise<void> {
  const { slug, say } = await clubOf(buy.clubId, tx);
  const paid = await deposits(buy.id, tx);
  const to = [...new Set([...(await pledgersOf(buy.id, tx)), ...paid.keys()])];
  const path = `/c/${slug}/buys/${buy.id}`;
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'cancelled',
    eventKey: `buy:${buy.id}:cancelled:${buy.termsVersion}`,
    to,
    content: (membershipId) => {
      const deposit = paid.get(membershipId);
      return {
        subject: `${buy.name} is cancelled`,
        paragraphs: [
          `${by.name} cancelled ${buy.name}: ${reason}`,
          deposit === undefined
            ? 'Nothing is ordered, and you owe nothing for it.'
            : `Nothing is ordered. The ${say.money(deposit)} you paid stays on your account as credit until the treasurer gives it back.`,
        ],
        action: { label: 'See the buy', path },
      };
    },
  });
  if (paid.size === 0) return;
  const names = await select<{ id: string; name: string }>(
    'select id, display_name as name from memberships where id in (:ids) order by display_name, id',
    { ids: [...paid.keys()] },
    tx,
  );
  const treasurers = await select<{ id: string }>(
    `select id from memberships where club_id = :clubId and status = 'active' and is_treasurer order by id`,
    { clubId: buy.clubId },
    tx,
  );
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'cancelled',
    eventKey: `buy:${buy.id}:refunds:${buy.termsVersion}`,
    to: treasurers.map(({ id }) => id),
    content: {
      subject: `${buy.name} is cancelled: deposits to give back`,
      paragraphs: [`${by.name} cancelled ${buy.name}: ${reason}`, 'These deposits wait for you:'],
      rows: names.map(({ id, name }) => [name, say.money(paid.get(id) ?? 0)] as const),
      action: { label: 'See the buy', path },
    },
  });
}

async function closeOffers(buyId: string, tx: Tx): Promise<void> {
  await execute(
    `update hand_ons set state = 'withdrawn', answered_at = clock_timestamp()
     where buy_id = :buyId and state = 'offered'`,
    { buyId },
    tx,
  );
  await execute(
    `update pledge_proposals set answered_at = clock_timestamp(), accepted = false
     where buy_id = :buyId and answered_at is null`,
    { buyId },
    tx,
  );
}

/**
 * Cancels a buy under its lock: pledges stand as history, what was paid stays as credit, everyone who pledged and the
 * treasurers are told. For organisers' acts and for jobs; the caller has checked the state.
 */
export async function cancelUnderLock(buy: Buy, reason: string, by: By, tx: Tx): Promise<void> {
  const before = buy.state;
  buy.state = 'cancelled';
  buy.cancelReason = reason;
  buy.cancelledAt = await databaseNow(tx);
  buy.frozenUntil = null;
  buy.offeredToId = null;
  await changeTerms(
    buy,
    reason ? `The buy was cancelled: ${reason}` : 'The draft was discarded.',
    by,
    tx,
  );
  await closeOffers(buy.id, tx);
  await writeAudit(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    by,
    action: before === 'draft' ? 'buys.discard' : 'buys.cancel',
    subject: { type: 'buy', id: buy.id },
    before: { state: before },
    after: { state: 'cancelled', reason },
  });
  if (before !== 'draft') await tellPledgers(buy, reason, by, tx);
  const { id: buyId, sheetVersion } = buy;
  tx.afterCommit(() =>
    publishToBuy(buyId, 'buy:changed', {
      kind: 'state',
      buyId,
      sheetVersion,
      state: 'cancelled',
      frozen: false,
    }),
  );
}

/**
 * Cancels a buy that is open or locked.
 * @throws DomainProblem 409 `stale` or `wrong_state`
 */
export async function cancelBuy(
  actor: BuyActor,
  body: { termsVersion: number; reason: string },
): Promise<BuyHeader> {
  const { termsVersion, reason } = body;
  await withBuy(actor.buy.id, { states: ['open', 'locked'], termsVersion }, async (buy, tx) => {
    if (await ordersPlaced(buy.id, tx)) {
      throw wrongState('An order is placed. Mark each as failed if no supplier can deliver.');
    }
    await cancelUnderLock(buy, reason, byActor(actor), tx);
  });
  return readBuyHeaderAgain(actor, actor.buy.id);
}

/** Puts a draft aside; only its organisers ever saw it, and they can take it up again. */
export async function discardDraft(actor: BuyActor, termsVersion: number): Promise<BuyHeader> {
  await withBuy(actor.buy.id, { states: ['draft'], termsVersion }, (buy, tx) =>
    cancelUnderLock(buy, '', byActor(actor), tx),
  );
  return readBuyHeaderAgain(actor, actor.buy.id);
}

/** Takes a discarded draft up again. */
export async function restoreDraft(actor: BuyActor): Promise<BuyHeader> {
  const by = byActor(actor);
  await withBuy(actor.buy.id, {}, async (buy, tx) => {
    if (buy.state === 'draft') return;
    if (buy.state !== 'cancelled' || buy.openedAt)
      throw wrongState('Only a discarded draft can be taken up again.');
    buy.state = 'draft';
    buy.cancelReason = null;
    buy.cancelledAt = null;
    await changeTerms(buy, 'The draft was taken up again.', by, tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by,
      action: 'buys.restore',
      subject: { type: 'buy', id: buy.id },
      before: { state: 'cancelled' },
      after: { state: 'draft' },
    });
  });
  return readBuyHeaderAgain(actor, actor.buy.id);
}
