import type { Minor } from '../money/minor.ts';
import type { MemberOwed } from './owed.ts';

/** A part of a payment or refund; `buyId` null is the member's account outside any buy. */
export interface MoneyPart {
  readonly buyId: string | null;
  readonly amountMinor: Minor;
}

const add = (parts: MoneyPart[], buyId: string | null, amountMinor: Minor): void => {
  if (amountMinor > 0) parts.push({ buyId, amountMinor });
};

/**
 * Which dues a payment pays: all of it to the buy that the payer names; otherwise the oldest due first, then what is
 * open outside any buy, then small differences that were carried; what is left is credit.
 *
 * @example allocatePayment(1500, null, owed) // [{ buyId: 'older', amountMinor: 1000 }, { buyId: 'newer', amountMinor: 500 }]
 */
export function allocatePayment(
  amountMinor: Minor,
  buyId: string | null,
  owed: MemberOwed,
): MoneyPart[] {
  if (buyId !== null) return [{ buyId, amountMinor }];
  const parts: MoneyPart[] = [];
  let left = amountMinor;
  const pay = (to: string | null, asked: Minor) => {
    const part = Math.min(left, asked);
    add(parts, to, part);
    left -= part;
  };
  const inTurn = [...owed.buys].sort(
    (a, b) => (a.dueAtMs ?? Infinity) - (b.dueAtMs ?? Infinity) || (a.buyId < b.buyId ? -1 : 1),
  );
  for (const buy of inTurn) pay(buy.buyId, buy.openMinor);
  const account = owed.accountOpenMinor;
  for (const buy of inTurn) {
    const carried = Math.max(0, Math.min(left - account, buy.carriedMinor));
    add(parts, buy.buyId, carried);
    left -= carried;
  }
  add(parts, null, left);
  return parts;
}

/**
 * Which credit a refund gives back: what was paid too much in each buy, in the given order, then what stands outside
 * any buy.
 *
 * @throws RangeError when it is more than the member's free credit
 */
export function allocateRefund(amountMinor: Minor, owed: MemberOwed): MoneyPart[] {
  if (amountMinor > owed.creditMinor) {
    throw new RangeError(`refund of ${amountMinor} is more than the credit ${owed.creditMinor}`);
  }
  const parts: MoneyPart[] = [];
  let left = amountMinor;
  for (const buy of owed.buys) {
    const part = Math.min(left, buy.creditMinor);
    add(parts, buy.buyId, part);
    left -= part;
  }
  add(parts, null, left);
  return parts;
}
