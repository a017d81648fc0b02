import { databaseNow, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { ActorClub, BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, changeTerms, withBuy } from '../buys/withBuy.ts';
import { owedOfBuy } from '../ledger/owed.ts';
import { clubMoney } from '../ledger/paymentWords.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { DomainProblem } from '../problem.ts';
import { openPoints } from './openPoints.ts';
import { tellBuyChanged } from './tellBuy.ts';

async function tellSettled(buy: Buy, club: ActorClub, tx: Tx): Promise<void> {
  const rows = await select<{ id: string; final: number }>(
    `select membership_id as id, final_minor as final from buy_members
     where buy_id = :buyId and final_minor is not null`,
    { buyId: buy.id },
    tx,
  );
  const finals = new Map(rows.map(({ id, final }) => [id, final]));
  const owed = await owedOfBuy(buy.id, tx);
  const money = (minor: number) => clubMoney(club, minor);
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'statement',
    eventKey: `buy:${buy.id}:settled`,
    to: [...finals.keys()],
    content: (memberId) => {
      const standing = owed.get(memberId);
      const open = standing?.openMinor ?? 0;
      const credit = standing?.creditMinor ?? 0;
      const carried = standing?.carriedMinor ?? 0;
      return {
        subject: `${buy.name} is settled`,
        paragraphs: [
          'The books of this buy are closed. Your receipt is on its page.',
          ...(open > 0 ? [`${money(open)} is still open on your account.`] : []),
          ...(carried > 0
            ? [`${money(carried)} is too little to ask for and is carried on your account.`]
            : []),
          ...(credit > 0 ? [`${money(credit)} is credit on your account.`] : []),
        ],
        rows: [
          ['Your share', money(finals.get(memberId) ?? 0)],
          ['You paid', money(standing?.paidMinor ?? 0)],
        ],
        action: { label: 'See your receipt', path: `/c/${club.slug}/buys/${buy.id}/settled` },
      };
    },
  });
}

/**
 * A treasurer closes the buy: its account is exactly zero, every bill is confirmed, every final share posted. Nothing
 * reopens afterwards.
 * @throws DomainProblem 409 `bill_unconfirmed` or `sums_open` naming what stands open
 */
export async function settleBuy(actor: BuyActor, termsVersion: number): Promise<void> {
  await withBuy(actor.buy.id, { states: ['pickup'], termsVersion }, async (buy, tx) => {
    const points = await openPoints(buy.id, actor.club, tx);
    if (points.blocks.length > 0) {
      throw new DomainProblem(
        409,
        points.unconfirmedBills > 0 ? 'bill_unconfirmed' : 'sums_open',
        points.blocks.join(' '),
        { current: { blocks: points.blocks, balanceMinor: points.balanceMinor } },
      );
    }
    buy.state = 'settled';
    buy.settledAt = await databaseNow(tx);
    await changeTerms(buy, 'The buy is settled.', byActor(actor), tx);
    await tellSettled(buy, actor.club, tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'orders.settle',
      subject: { type: 'buy', id: buy.id },
      before: { state: 'pickup' },
      after: { state: 'settled', notes: points.notes },
    });
    tellBuyChanged(buy, 'state', tx);
  });
}
