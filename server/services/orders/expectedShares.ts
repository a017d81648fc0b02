import {
  boughtByLine,
  estimatedCharges,
  supplierOfShipping,
} from '#shared/domain/buys/boughtPacks.ts';
import type { ChosenPacks } from '#shared/domain/buys/boughtPacks.ts';
import { shareRequestOf } from '#shared/domain/buys/requests.ts';
import type { SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import { exceedsLimit } from '#shared/domain/orders/priceLimit.ts';
import { costsOf, type CostFacts } from '#shared/domain/orders/costs.ts';
import type { OrderFacts } from '#shared/domain/orders/orderTypes.ts';
import { shareOut } from '#shared/domain/shares/shareOut.ts';
import type { ShareChange } from '#shared/schemas/orders.ts';
import type { BookOrder, OrderBook } from './orderBook.ts';

/** Bills, refunds and losses of a buy, as far as they are known. */
export type KnownCosts = Pick<CostFacts, 'bills' | 'refunds' | 'losses'>;

/** Before any bill is there. */
export const nothingBilled: KnownCosts = { bills: [], refunds: [], losses: [] };

/** The terms with the prices that the orders were quoted. */
export function quotedTerms(terms: SheetTerms, orders: readonly BookOrder[]): SheetTerms {
  const prices = new Map(
    orders.flatMap(({ packs }) => packs.map(({ offerId, priceMinor }) => [offerId, priceMinor])),
  );
  return {
    ...terms,
    offers: terms.offers.map((offer) => {
      const priceMinor = prices.get(offer.id);
      return priceMinor === undefined ? offer : { ...offer, priceMinor, priceIncludesTax: true };
    }),
  };
}

/** The packs of all orders that didn't fail, and their shipping. */
export function chosenPacks(orders: readonly BookOrder[]): ChosenPacks {
  const packs: Record<string, number> = {};
  const shippingBySupplier: Record<string, number> = {};
  for (const order of orders) {
    if (order.state === 'failed') continue;
    for (const pack of order.packs) packs[pack.offerId] = pack.packs;
    shippingBySupplier[order.supplierId] = order.shippingMinor;
  }
  return { packs, shippingBySupplier };
}

/** An order as the sums of costs take it. */
export function orderFacts(terms: SheetTerms, order: BookOrder): OrderFacts {
  const supplier = terms.suppliers.find(({ id }) => id === order.supplierId);
  return {
    supplierId: order.supplierId,
    isShelf: supplier?.isShelf ?? false,
    state: order.state,
    packs: order.packs,
    shippingMinor: order.shippingMinor,
    shippingBasis: supplier?.shipping.kind === 'byValue' ? 'value' : 'mass',
  };
}

/**
 * What each member's share comes to by what is known now: bills where they are there, the orders' prices elsewhere,
 * planned charges until a bill makes them real. In minor units by membership id.
 */
export function expectedShares(book: OrderBook, known: KnownCosts): Map<string, number> {
  const { terms, pledges, orders, sheet } = book;
  const costs = costsOf({
    ...known,
    orders: orders.map((order) => {
      const facts = orderFacts(terms, order);
      return facts.state === 'draft' ? { ...facts, state: 'placed' as const } : facts;
    }),
    arrivedMg: null,
    locked: sheet,
  });
  const chosen = chosenPacks(orders);
  const quoted = quotedTerms(terms, orders);
  const billed = new Set(
    known.bills.flatMap(({ charges }) => charges.map(({ chargeId }) => chargeId)),
  );
  const planned = estimatedCharges(quoted, chosen, boughtByLine(quoted, chosen.packs)).filter(
    ({ id }) => supplierOfShipping(id) === null && !billed.has(id),
  );
  const { members } = shareOut(
    shareRequestOf(terms, pledges, {
      lines: costs.received.lines,
      charges: [...costs.received.charges, ...planned],
    }),
  );
  const shares = new Map(members.map(({ memberId, totalMinor }) => [memberId, totalMinor]));
  for (const { memberId, minor } of costs.lost) {
    shares.set(memberId, (shares.get(memberId) ?? 0) + minor);
  }
  return shares;
}

/** Each living member's share: locked, before, after, and whether it passes the price limit. */
export function shareChanges(
  book: OrderBook,
  before: ReadonlyMap<string, number>,
  after: ReadonlyMap<string, number>,
  limitPermille: number,
): ShareChange[] {
  return [...book.members.values()]
    .filter(({ dropped, id }) => !dropped && (before.has(id) || after.has(id)))
    .map((member): ShareChange => {
      const newMinor = after.get(member.id) ?? 0;
      return {
        memberId: member.id,
        name: member.name,
        lockedMinor: member.lockedMinor,
        oldMinor: before.get(member.id) ?? 0,
        newMinor,
        overLimit: exceedsLimit(newMinor, member.lockedMinor, limitPermille),
        agreed: member.agreed && newMinor <= (member.overLimitMinor ?? 0),
      };
    });
}
