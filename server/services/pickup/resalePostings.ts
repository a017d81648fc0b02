import type { Posting } from '../ledger/postTransaction.ts';

/**
 * The shelf's side when some of a lot is sold: its cost leaves the shelf, the difference to the price is the club's gain
 * or loss. What somebody paid for and never collected isn't the shelf's: they get what it fetched, at most what it cost
 * them. The buyer's own side is the price.
 */
export function resalePostings(
  owedToId: string | null,
  priceMinor: number,
  costMinor: number,
): Posting[] {
  if (owedToId !== null) {
    const back = Math.min(priceMinor, costMinor);
    return [
      // Their money has nothing to do with the buy that takes the salt.
      { account: { kind: 'member', refId: owedToId }, amountMinor: 0 - back, buyId: null },
      { account: { kind: 'losses' }, amountMinor: back - priceMinor },
    ];
  }
  return [
    { account: { kind: 'shelf' }, amountMinor: 0 - costMinor },
    { account: { kind: 'losses' }, amountMinor: costMinor - priceMinor },
  ];
}
