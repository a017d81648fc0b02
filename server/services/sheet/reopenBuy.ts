import type { BuyHeader } from '#shared/schemas/buys.ts';
import type { ReopenBody } from '#shared/schemas/sheet.ts';
import { databaseNow, execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { readBuyHeaderAgain } from '../buys/readBuys.ts';
import { sayFor } from '../buys/sayTerms.ts';
import { byActor, changeTerms, pledgersOf, withBuy } from '../buys/withBuy.ts';
import { owedOfBuy } from '../ledger/owed.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { invalid, wrongState } from '../problem.ts';
import { requestPlan } from './planning.ts';

async function refuseWhenOrdered(buyId: string, tx: Tx): Promise<void> {
  const [placed] = await select<{ id: string }>(
    'select id from supplier_orders where buy_id = :buyId and placed_at is not null limit 1',
    { buyId },
    tx,
  );
  if (placed) throw wrongState('An order is placed, so this buy can no longer be reopened.');
}

async function tellAll(actor: BuyActor, buy: Buy, reason: string, tx: Tx): Promise<void> {
  const say = sayFor(actor.club);
  const owed = await owedOfBuy(buy.id, tx);
  const to = [...new Set([...(await pledgersOf(buy.id, tx)), ...owed.keys()])];
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'reopened',
    eventKey: `buy:${buy.id}:reopened:${buy.termsVersion}`,
    to,
    content: (membershipId) => {
      const paid = owed.get(membershipId)?.paidMinor ?? 0;
      return {
        subject: `${buy.name} is open again`,
        paragraphs: [
          `${actor.name} reopened ${buy.name}: ${reason}`,
          `Your pledge and its turn stand. Until ${say.at(buy.closesAt)} you can change it or withdraw free of charge.`,
          paid > 0
            ? `The ${say.money(paid)} you paid count as a deposit. After the next lock only what rose is asked for; what fell is your credit.`
            : 'What was asked of you at the lock is not due any more.',
        ],
        action: {
          label: 'See the buy sheet',
          path: `/c/${actor.club.slug}/buys/${buy.id}/sheet`,
        },
      };
    },
  });
}

/**
 * Opens a locked buy again, before any order is placed: pledges, their turns and payments stay, everyone is told.
 * @throws DomainProblem 409 `stale` or `wrong_state`; 422 for a closing time that is not to come
 */
export async function reopenBuy(actor: BuyActor, body: ReopenBody): Promise<BuyHeader> {
  const by = byActor(actor);
  const { termsVersion, reason } = body;
  await withBuy(actor.buy.id, { states: ['locked'], termsVersion }, async (buy, tx) => {
    await refuseWhenOrdered(buy.id, tx);
    const closesAt = new Date(body.closesAt);
    if (closesAt <= (await databaseNow(tx))) {
      throw invalid({ closesAt: 'Choose a closing time that is still to come.' });
    }
    buy.state = 'open';
    buy.closesAt = closesAt;
    buy.reopenReason = reason;
    buy.lockedAt = null;
    buy.dueAt = null;
    await changeTerms(buy, `The buy opened again: ${reason}`, by, tx);
    await execute(
      `update hand_ons set state = 'withdrawn', answered_at = clock_timestamp()
       where buy_id = :buyId and state = 'offered'`,
      { buyId: buy.id },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by,
      action: 'buys.reopen',
      subject: { type: 'buy', id: buy.id },
      before: { state: 'locked' },
      after: { state: 'open', reason, closesAt },
    });
    await tellAll(actor, buy, reason, tx);
    const { id: buyId, sheetVersion } = buy;
    tx.afterCommit(() => {
      publishToBuy(buyId, 'buy:changed', {
        kind: 'state',
        buyId,
        sheetVersion,
        state: 'open',
        frozen: false,
      });
      requestPlan(buyId);
    });
  });
  return readBuyHeaderAgain(actor, actor.buy.id);
}
