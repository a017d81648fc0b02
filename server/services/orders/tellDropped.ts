import type { Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { ActorClub } from '../actors.ts';
import { memberBalancesOfBuy } from '../ledger/balances.ts';
import { clubMoney, ledgerPath } from '../ledger/paymentWords.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import type { OrderBook } from './orderBook.ts';

/** Tells who is out that they owe nothing, and everybody else what it does to their share. */
export async function tellDropped(
  buy: Buy,
  club: ActorClub,
  drop: {
    memberIds: ReadonlySet<string>;
    reason: string;
    summary: string;
    before: OrderBook;
    oldShares: ReadonlyMap<string, number>;
    newShares: ReadonlyMap<string, number>;
  },
  tx: Tx,
): Promise<void> {
  const money = (minor: number) => clubMoney(club, minor);
  const paid = await memberBalancesOfBuy(buy.id, tx);
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'locked',
    eventKey: `buy:${buy.id}:dropped:${buy.termsVersion}`,
    to: [...drop.memberIds],
    content: (memberId) => {
      const deposit = Math.max(0, 0 - (paid.get(memberId) ?? 0));
      return {
        subject: `You are no longer in ${buy.name}`,
        paragraphs: [
          `Your pledges were taken out of the buy before the order: ${drop.reason}`,
          deposit > 0
            ? `You owe nothing for it. The ${money(deposit)} you paid stays on your account as credit until the treasurer gives it back.`
            : 'You owe nothing for it.',
        ],
        action: { label: 'See your statement', path: ledgerPath(club) },
      };
    },
  });
  const staying = [...drop.before.members.values()].filter(
    ({ id, dropped }) => !dropped && !drop.memberIds.has(id),
  );
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'terms_changed',
    eventKey: `buy:${buy.id}:replanned:${buy.termsVersion}`,
    to: staying.map(({ id }) => id),
    content: (memberId) => {
      const before = drop.oldShares.get(memberId) ?? 0;
      const after = drop.newShares.get(memberId) ?? 0;
      return {
        subject: `${buy.name}: the order was planned anew`,
        paragraphs: [
          drop.summary,
          before === after
            ? `Your share stays ${money(after)}.`
            : `Your share was ${money(before)} and is now ${money(after)}.`,
          after > before
            ? 'You need not pay the difference now: it comes with your final share.'
            : 'What fell is asked of you no more.',
        ],
        action: { label: 'See your share', path: `/c/${club.slug}/buys/${buy.id}/locked` },
      };
    },
  });
}
