import type { SettlingReply } from '#shared/schemas/orders.ts';
import { Buy } from '../../models/Buy.ts';
import { canCloseBuy, canSeeMoneyOfBuy } from '../../policies/orders.ts';
import { presentSlip } from '../../presenters/orders/presentSlip.ts';
import type { BuyActor } from '../actors.ts';
import { owedOfBuy } from '../ledger/owed.ts';
import { finalOf } from '../splits/finalOf.ts';
import { openPoints } from './openPoints.ts';
import { loadOrderBook, type OrderBook } from './orderBook.ts';

async function receiptOf(actor: BuyActor, book: OrderBook): Promise<SettlingReply['receipt']> {
  const final = await finalOf(actor.buy.id);
  if (!final) return null;
  const me = { id: actor.membershipId, name: actor.name };
  const slip = presentSlip(book.terms, final.sheet, me, final.extra.names);
  if (!slip) return null;
  const standing = (await owedOfBuy(actor.buy.id)).get(me.id);
  const member = book.members.get(me.id);
  const lostMinor = final.extra.lost.find(({ memberId }) => memberId === me.id)?.minor ?? 0;
  return {
    slip,
    lockedMinor: member?.lockedMinor ?? null,
    lostMinor,
    laterMinor: (member?.finalMinor ?? slip.totalMinor) - slip.totalMinor - lostMinor,
    paidMinor: standing?.paidMinor ?? 0,
    openMinor: standing?.openMinor ?? 0,
    creditMinor: standing?.creditMinor ?? 0,
    carriedMinor: standing?.carriedMinor ?? 0,
  };
}

/** What stands open before the buy settles, for its organisers and treasurers; and the reader's own receipt. */
export async function readSettling(actor: BuyActor): Promise<SettlingReply> {
  const buy = await Buy.findByPk(actor.buy.id, { rejectOnEmpty: true });
  const book = await loadOrderBook(buy.id);
  const seeAll = canSeeMoneyOfBuy(actor);
  const closes = canCloseBuy(actor);
  const points = seeAll ? await openPoints(buy.id, actor.club) : null;
  const owed = seeAll ? await owedOfBuy(buy.id) : new Map<string, never>();
  const settled = buy.state === 'settled';
  return {
    state: buy.state,
    termsVersion: buy.termsVersion,
    settledAt: buy.settledAt?.toISOString() ?? null,
    blocks: settled || buy.state === 'cancelled' ? [] : (points?.blocks ?? []),
    notes: points?.notes ?? [],
    balanceMinor: points?.balanceMinor ?? null,
    unclaimedPortions: points?.unclaimedPortions ?? null,
    members: seeAll
      ? [...book.members.values()]
          .filter(({ id, dropped }) => !dropped || owed.has(id))
          .map(({ id, name, finalMinor }) => {
            const standing = owed.get(id);
            return {
              id,
              name,
              finalMinor,
              paidMinor: standing?.paidMinor ?? 0,
              openMinor: standing?.openMinor ?? 0,
              creditMinor: standing?.creditMinor ?? 0,
              carriedMinor: standing?.carriedMinor ?? 0,
            };
          })
      : [],
    receipt: await receiptOf(actor, book),
    may: {
      seeAll,
      settle: closes && buy.state === 'pickup',
      bookRest:
        closes &&
        (points?.balanceMinor ?? 0) !== 0 &&
        (buy.state === 'cancelled' || (buy.state === 'pickup' && (await finalOf(buy.id)) !== null)),
    },
  };
}
