import { currencyExponent } from '../money/currencies.ts';
import { exactSum, type Minor } from '../money/minor.ts';

/** One member's standing in one buy, as the books and the buy's dues have it. */
export interface BuyAccount {
  readonly buyId: string;
  /** What is asked before the final share; 0 when nothing is, or when the final share is posted. */
  readonly dueMinor: Minor;
  /** Sum of the member's postings about this buy; what they paid is negative. */
  readonly balanceMinor: Minor;
  /** The final share that `balanceMinor` contains, or null while it isn't posted. */
  readonly finalMinor: Minor | null;
  /** The buy is open again and the member is still in it: what was paid waits, it is not credit. */
  readonly heldAsDeposit: boolean;
  /** When it is due, ms since the epoch; null when no day is set. */
  readonly dueAtMs: number | null;
}

/** What comes of one buy for its member. */
export interface BuyOwed {
  readonly buyId: string;
  readonly dueMinor: Minor;
  readonly paidMinor: Minor;
  readonly finalMinor: Minor | null;
  /** Still asked for, after free credit was used. */
  readonly openMinor: Minor;
  /** Paid too much in this buy. */
  readonly creditMinor: Minor;
  /** A difference too small to ask for, of either sign. */
  readonly carriedMinor: Minor;
  readonly dueAtMs: number | null;
}

/** What a member owes or may have back, over all buys. */
export interface MemberOwed {
  /** The account's sum; positive: the member owes the club. Dues that are not posted yet are not in it. */
  readonly balanceMinor: Minor;
  readonly buys: readonly BuyOwed[];
  /** Asked for outside any buy, after free credit was used. */
  readonly accountOpenMinor: Minor;
  /** All that is asked for. */
  readonly openMinor: Minor;
  /** Small differences owed, not asked for. */
  readonly carriedMinor: Minor;
  /** Free credit that is left: what a refund may give back at most. */
  readonly creditMinor: Minor;
}

/** Differences below one whole unit of the currency are carried without a request. */
export function carryLimitMinor(currency: string): Minor {
  return 10 ** currencyExponent(currency);
}

const byDue = (a: { dueAtMs: number | null }, b: { dueAtMs: number | null }) =>
  (a.dueAtMs ?? Infinity) - (b.dueAtMs ?? Infinity) || 0;

/**
 * What a member owes in each buy once their credit is used: the oldest due first, then what stands outside any buy,
 * then the small differences that are carried.
 *
 * `openMinor + carriedMinor - creditMinor` = balance + dues not posted yet + deposits held, always.
 * @param accountMinor sum of the member's postings that name no buy
 */
export function computeOwed(
  accountMinor: Minor,
  accounts: readonly BuyAccount[],
  currency: string,
): MemberOwed {
  const limit = carryLimitMinor(currency);
  const needs = accounts.map((account) => {
    const { dueMinor, balanceMinor, finalMinor, heldAsDeposit } = account;
    const paidMinor = (finalMinor ?? 0) - balanceMinor;
    const raw = dueMinor + balanceMinor;
    const need = heldAsDeposit && raw < 0 ? 0 : raw;
    const small = need > 0 && need < limit && (finalMinor !== null || paidMinor > 0);
    return { account, paidMinor, need, small };
  });

  let pool = exactSum(
    [...needs.map(({ need }) => Math.max(0, -need)), Math.max(0, -accountMinor)],
    'credit',
  );
  const take = (asked: Minor): Minor => {
    const used = Math.min(pool, asked);
    pool -= used;
    return asked - used;
  };

  const open = new Map<string, Minor>();
  const inTurn = needs
    .map((entry, index) => ({ ...entry, index, dueAtMs: entry.account.dueAtMs }))
    .sort((a, b) => byDue(a, b) || (a.account.buyId < b.account.buyId ? -1 : 1));
  for (const { account, need, small } of inTurn) {
    if (need > 0 && !small) open.set(account.buyId, take(need));
  }
  const accountOpenMinor = take(Math.max(0, accountMinor));
  const carried = new Map<string, Minor>();
  for (const { account, need, small } of inTurn) {
    if (small) carried.set(account.buyId, take(need));
  }

  const buys = needs.map(({ account, paidMinor, need, small }): BuyOwed => {
    const { buyId, dueMinor, finalMinor, dueAtMs } = account;
    const creditMinor = Math.max(0, -need);
    const carriedMinor = small ? (carried.get(buyId) ?? 0) : 0;
    const openMinor = open.get(buyId) ?? 0;
    return {
      buyId,
      dueMinor,
      paidMinor,
      finalMinor,
      openMinor,
      creditMinor,
      carriedMinor,
      dueAtMs,
    };
  });
  return {
    balanceMinor: exactSum(
      [accountMinor, ...accounts.map(({ balanceMinor }) => balanceMinor)],
      'balance',
    ),
    buys,
    accountOpenMinor,
    openMinor: exactSum([accountOpenMinor, ...open.values()], 'open'),
    carriedMinor: exactSum(carried.values(), 'carried'),
    creditMinor: pool,
  };
}
