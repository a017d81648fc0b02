import { buyStates, hasReached, type BuyState } from '#shared/domain/buys/states.ts';
import type { BuyHeader } from '#shared/schemas/buys.ts';

/** The page that belongs to each state, by its route's name. */
export const pageOfState: Readonly<Record<Exclude<BuyState, 'cancelled'>, string>> = {
  draft: 'buy-draft',
  open: 'buy-sheet',
  locked: 'buy-locked',
  ordered: 'buy-orders',
  arrived: 'buy-arrived',
  splitting: 'buy-split',
  pickup: 'buy-pickup',
  settled: 'buy-settled',
};

/** The page on which the next step is done, by its code. */
const pageOfNext: Readonly<Record<string, string>> = {
  add_lines: 'buy-draft',
  open: 'buy-draft',
  pledge: 'buy-sheet',
  wait_closing: 'buy-sheet',
  unfreeze: 'buy-sheet',
  agree: 'buy-locked',
  pay: 'buy-locked',
  collect_payments: 'buy-locked',
  order: 'buy-orders',
  confirm_bills: 'buy-orders',
  await_packs: 'buy-orders',
  count_bags: 'buy-arrived',
  start_split: 'buy-arrived',
  weigh: 'buy-split',
  finish_split: 'buy-split',
  collect: 'buy-pickup',
  hand_over: 'buy-pickup',
  settle: 'buy-settled',
  refund: 'buy-settled',
};

/** The route's name for a next step's page, or null when nothing is left to do. */
export const pageOfNextStep = (code: string): string | null => pageOfNext[code] ?? null;

/** Who prepares a step looks at its page one state early: orders are placed while locked, bags counted while ordered. */
const prepared: Partial<Record<BuyState, BuyState>> = {
  ordered: 'locked',
  arrived: 'ordered',
  pickup: 'splitting',
  settled: 'pickup',
};

/** Whether this reader has something to see on the page of a state. */
export function canLookAt(state: BuyState, head: BuyHeader, treasurer: boolean): boolean {
  const runs = head.mine.organises;
  if (state === 'draft') return runs;
  if (state === 'open') return head.openedAt !== null || runs;
  if (head.state === 'cancelled') return state === 'locked' && head.lockedAt !== null;
  if (hasReached(head.state, state)) return true;
  const early = prepared[state];
  return (runs || treasurer) && early !== undefined && head.state === early;
}

/** The page to land on: where the buy stands, or the last one that there is something to see on. */
export function landingPages(head: BuyHeader, treasurer: boolean): string[] {
  const states = buyStates.filter((state) => state !== 'cancelled');
  const from = head.state === 'cancelled' ? (head.lockedAt ? 'locked' : 'open') : head.state;
  const own = states.slice(0, states.indexOf(from) + 1).reverse();
  return own
    .filter((state) => canLookAt(state, head, treasurer))
    .map((state) => pageOfState[state]);
}
