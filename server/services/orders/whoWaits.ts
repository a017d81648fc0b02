import type { Tx } from '../../config/database.ts';
import type { BuyOwed } from '#shared/domain/ledger/owed.ts';
import { owedOfBuy } from '../ledger/owed.ts';
import type { BookMember, OrderBook } from './orderBook.ts';

/** Who keeps the next order from going out: unpaid and not vouched for, or past the price limit and not agreed. */
export async function whoWaits(
  buyId: string,
  book: OrderBook,
  tx?: Tx,
  owed?: ReadonlyMap<string, BuyOwed>,
): Promise<{ unpaid: BookMember[]; overLimit: BookMember[] }> {
  const standing = owed ?? (await owedOfBuy(buyId, tx));
  const living = [...book.members.values()].filter(({ dropped }) => !dropped);
  return {
    unpaid: living.filter(
      ({ id, vouchedBy }) => (standing.get(id)?.openMinor ?? 0) > 0 && vouchedBy === null,
    ),
    overLimit: living.filter(({ overLimitMinor, agreed }) => overLimitMinor !== null && !agreed),
  };
}

/** 'Ana, Ben and 2 more' */
export function nameSome(members: readonly { name: string }[]): string {
  const names = members.slice(0, 3).map(({ name }) => name);
  const more = members.length - names.length;
  if (more > 0) return `${names.join(', ')} and ${more} more`;
  return names.length < 2
    ? (names[0] ?? '')
    : `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''}`;
}
