import { nextAgreement } from '#shared/domain/orders/priceLimit.ts';
import type { Buy } from '../../models/Buy.ts';
import { execute, type Tx } from '../../config/database.ts';
import type { ActorClub } from '../actors.ts';
import { clubMoney } from '../ledger/paymentWords.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import type { OrderBook } from './orderBook.ts';

/**
 * Brings every member's price limit up to date with the shares of now, under the buy's lock; whoever is newly past it is
 * asked to agree or leave.
 */
export async function applyPriceLimit(
  buy: Buy,
  club: ActorClub,
  book: OrderBook,
  shares: ReadonlyMap<string, number>,
  tx: Tx,
): Promise<void> {
  const asked = new Map<string, { from: number; to: number }>();
  for (const member of book.members.values()) {
    if (member.dropped) continue;
    const newMinor = shares.get(member.id) ?? 0;
    const next = nextAgreement(member, newMinor, member.lockedMinor, buy.priceLimitPermille);
    if (next.overLimitMinor === member.overLimitMinor && next.agreed === member.agreed) continue;
    await execute(
      `update buy_members set over_limit_minor = :overLimitMinor,
         agreed_at = case when :agreed then agreed_at end, version = version + 1, updated_at = now()
       where buy_id = :buyId and membership_id = :memberId`,
      { ...next, buyId: buy.id, memberId: member.id },
      tx,
    );
    if (next.overLimitMinor !== null && !next.agreed) {
      asked.set(member.id, { from: member.lockedMinor, to: next.overLimitMinor });
    }
  }
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'locked',
    eventKey: `buy:${buy.id}:price-limit:${buy.termsVersion}`,
    to: [...asked.keys()],
    content: (memberId) => {
      const { from, to } = asked.get(memberId) ?? { from: 0, to: 0 };
      return {
        subject: `${buy.name}: your share rose past the price limit`,
        paragraphs: [
          `The price rose before the order went out. Your share was ${clubMoney(club, from)} when the buy was locked; it would now be ${clubMoney(club, to)}.`,
          `That is more than ${buy.priceLimitPermille / 10} % above it, so the order waits until you agree, or leave free of charge.`,
        ],
        action: { label: 'Agree or leave', path: `/c/${club.slug}/buys/${buy.id}/locked` },
      };
    },
  });
}
