import { apportion } from '#shared/domain/shares/apportion.ts';
import type { RestBody } from '#shared/schemas/orders.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { buyAccountBalance } from '../ledger/balances.ts';
import { clubToday } from '../ledger/clubDay.ts';
import { clubMoney, ledgerPath } from '../ledger/paymentWords.ts';
import { postTransaction, type Posting } from '../ledger/postTransaction.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { stale, wrongState } from '../problem.ts';
import { finalPosted } from './finalPosted.ts';
import { tellBuyChanged } from './tellBuy.ts';

/** The rest over the members, in proportion to their final shares, or to what they locked where nothing came of the buy. */
async function overMembers(
  buy: Buy,
  balanceMinor: number,
  tx: Tx,
): Promise<{ memberId: string; minor: number }[]> {
  const rows = await select<{ membership_id: string; weight: number }>(
    `select membership_id, greatest(coalesce(final_minor, locked_minor, 0), 0)::bigint as weight from buy_members
     where buy_id = :buyId and dropped_at is null order by membership_id`,
    { buyId: buy.id },
    tx,
  );
  const weights = rows.map(({ weight }) => weight);
  if (weights.every((weight) => weight === 0)) {
    throw wrongState('No member has a share to put it on. Book it to the losses.');
  }
  const parts = apportion(balanceMinor, weights);
  return rows.map(({ membership_id }, index) => ({
    memberId: membership_id,
    minor: parts[index] ?? 0,
  }));
}

/**
 * Clears what is left on a buy's account once its shares are final (a late bill, a refund), or what stays lost with a
 * cancelled one: to the members' accounts, or to the club's losses.
 * @throws DomainProblem 409 `stale` when the balance isn't the one that was seen
 */
export async function bookRest(actor: BuyActor, body: RestBody): Promise<void> {
  await withBuy(actor.buy.id, { states: ['pickup', 'cancelled'] }, async (buy, tx) => {
    if (buy.state === 'pickup' && !(await finalPosted(buy.id, tx))) {
      throw wrongState('The final shares are not posted yet.');
    }
    const balanceMinor = await buyAccountBalance(buy.id, tx);
    if (balanceMinor !== body.balanceMinor) {
      throw stale("The buy's account has changed since you opened the page. Look at it again.", {
        balanceMinor,
      });
    }
    if (balanceMinor === 0) throw wrongState("The buy's account is at zero already.");
    const parts = body.to === 'members' ? await overMembers(buy, balanceMinor, tx) : [];
    const takers: Posting[] =
      body.to === 'losses'
        ? [{ account: { kind: 'losses' }, amountMinor: balanceMinor }]
        : parts.map(({ memberId, minor }) => ({
            account: { kind: 'member', refId: memberId },
            amountMinor: minor,
          }));
    await postTransaction(tx, {
      clubId: buy.clubId,
      eventType: 'buy_rest',
      eventId: body.key,
      onDate: await clubToday(buy.clubId, tx),
      memo: body.reason,
      buyId: buy.id,
      by: byActor(actor),
      postings: [
        { account: { kind: 'buy', refId: buy.id }, amountMinor: 0 - balanceMinor },
        ...takers,
      ],
    });
    for (const { memberId, minor } of parts) {
      // Their final share is what they were charged in all, so that what they paid stays what it was.
      await execute(
        `update buy_members set final_minor = final_minor + :minor, version = version + 1, updated_at = now()
         where buy_id = :buyId and membership_id = :memberId and final_minor is not null`,
        { buyId: buy.id, memberId, minor },
        tx,
      );
    }
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'orders.rest',
      subject: { type: 'buy', id: buy.id },
      after: { balanceMinor, to: body.to, reason: body.reason },
    });
    const told = new Map(
      parts.filter(({ minor }) => minor !== 0).map((p) => [p.memberId, p.minor]),
    );
    await queueNotice(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      kind: 'final_share',
      eventKey: `buy:${buy.id}:rest:${body.key}`,
      to: [...told.keys()],
      content: (memberId) => {
        const minor = told.get(memberId) ?? 0;
        return {
          subject: `${buy.name}: ${clubMoney(actor.club, Math.abs(minor))} ${minor > 0 ? 'more to pay' : 'back to you'}`,
          paragraphs: [
            `${body.reason} Your part of it is ${clubMoney(actor.club, Math.abs(minor))}, ${minor > 0 ? 'added to' : 'taken off'} your account.`,
          ],
          action: { label: 'See your statement', path: ledgerPath(actor.club) },
        };
      },
    });
    tellBuyChanged(buy, 'terms', tx);
  });
}
