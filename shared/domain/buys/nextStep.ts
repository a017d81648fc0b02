import type { BuyState } from './states.ts';

/** Who has to do what comes next, from the reader's side. */
export type NextWho = 'you' | 'organiser' | 'members' | 'treasurer' | 'nobody';

export type NextCode =
  | 'add_lines'
  | 'open'
  | 'pledge'
  | 'wait_closing'
  | 'unfreeze'
  | 'agree'
  | 'pay'
  | 'collect_payments'
  | 'order'
  | 'confirm_bills'
  | 'await_packs'
  | 'count_bags'
  | 'start_split'
  | 'weigh'
  | 'finish_split'
  | 'collect'
  | 'hand_over'
  | 'settle'
  | 'refund'
  | 'none';

export interface NextStep {
  readonly code: NextCode;
  readonly who: NextWho;
  readonly text: string;
}

/** What `nextStep` looks at. Counts that a reader may not see are simply not said to them. */
export interface NextFacts {
  readonly state: BuyState;
  readonly frozen: boolean;
  readonly lines: number;
  /** Members who neither paid nor are vouched for. */
  readonly unpaid: number;
  /** Members whose price rose past the limit and who have not answered. */
  readonly overLimit: number;
  readonly unconfirmedBills: number;
  readonly targetsMade: boolean;
  readonly portions: number;
  readonly portionsDone: number;
  readonly sharesWaiting: number;
  /** Payers of a cancelled buy whose deposit is still the club's to give back. */
  readonly refundsWaiting: number;
  readonly viewer: {
    readonly organises: boolean;
    readonly helps: boolean;
    readonly treasurer: boolean;
    readonly pledged: boolean;
    readonly owes: boolean;
    readonly mustAgree: boolean;
    readonly collected: boolean;
  };
}

const step = (code: NextCode, who: NextWho, text: string): NextStep => ({ code, who, text });
const people = (count: number, one: string, many: string) =>
  count === 1 ? `1 member ${one}` : `${count} members ${many}`;

function whileOpen({ frozen, viewer }: NextFacts): NextStep {
  if (frozen) {
    const text = 'Extend the buy, lower its minimum or cancel it. Otherwise it cancels itself.';
    return viewer.organises
      ? step('unfreeze', 'you', text)
      : step('unfreeze', 'organiser', 'Pledges rest while the organiser decides how to go on.');
  }
  if (viewer.pledged)
    return step(
      'wait_closing',
      'members',
      'You are in. You can change your pledge until it closes.',
    );
  return viewer.organises
    ? step('pledge', 'members', 'Members pledge until the buy closes.')
    : step('pledge', 'you', 'Say how many grams you want before it closes.');
}

function whileLocked({ viewer, unpaid, overLimit }: NextFacts): NextStep {
  if (viewer.mustAgree)
    return step(
      'agree',
      'you',
      'The price rose past the limit. Agree, or leave the buy free of charge.',
    );
  if (viewer.owes) return step('pay', 'you', 'Pay your share by the due date.');
  if (viewer.organises) {
    if (overLimit > 0)
      return step(
        'agree',
        'members',
        `${people(overLimit, 'has', 'have')} yet to agree to the new price.`,
      );
    if (unpaid > 0)
      return step(
        'collect_payments',
        'members',
        `${people(unpaid, 'has', 'have')} yet to pay. Vouch for them or drop them before you order.`,
      );
    return step('order', 'you', 'Place the order with each supplier.');
  }
  return step('order', 'organiser', 'The organiser places the orders once the shares are paid.');
}

function whileOrdered({ viewer, unconfirmedBills }: NextFacts): NextStep {
  if (viewer.owes) return step('pay', 'you', 'Pay what you still owe for this buy.');
  if (viewer.treasurer && unconfirmedBills > 0)
    return step('confirm_bills', 'you', 'Confirm the bill that the organiser entered.');
  return viewer.organises
    ? step('await_packs', 'you', 'Enter the bills, and mark each order when it arrives.')
    : step('await_packs', 'organiser', 'The packs are on their way.');
}

function onceArrived({ viewer, targetsMade }: NextFacts): NextStep {
  if (!viewer.organises)
    return step('count_bags', 'organiser', 'The bags are being counted and weighed.');
  return targetsMade
    ? step('start_split', 'you', 'The targets stand. Start the split when everyone is there.')
    : step('count_bags', 'you', 'Count and weigh the bags, then compute the targets.');
}

function whileSplitting({ viewer, portions, portionsDone }: NextFacts): NextStep {
  const left = portions - portionsDone;
  if (viewer.organises && portions > 0 && left === 0)
    return step('finish_split', 'you', 'Every portion is weighed. Go over the sums and finish.');
  const text = left === 1 ? '1 portion is still to weigh.' : `${left} portions are still to weigh.`;
  return step('weigh', viewer.organises || viewer.helps ? 'you' : 'organiser', text);
}

function atPickup(facts: NextFacts): NextStep {
  const { viewer, sharesWaiting, unconfirmedBills } = facts;
  if (viewer.owes) return step('pay', 'you', 'Pay what is still open, then collect your share.');
  if (viewer.pledged && !viewer.collected) return step('collect', 'you', 'Collect your share.');
  if (sharesWaiting > 0) {
    const text =
      sharesWaiting === 1 ? '1 share waits to be collected.' : `${sharesWaiting} shares wait.`;
    return viewer.organises || viewer.helps
      ? step('hand_over', 'you', text)
      : step('hand_over', 'members', 'Members are collecting their shares.');
  }
  if (viewer.treasurer && unconfirmedBills > 0)
    return step('confirm_bills', 'you', 'Confirm the bills that still wait.');
  return step(
    'settle',
    viewer.treasurer ? 'you' : 'treasurer',
    viewer.treasurer ? 'Close the buy once its sums do.' : 'The treasurer closes the buy.',
  );
}

/** What is next in a buy and who must do it, from one reader's side. Times are left to the screen. */
export function nextStep(facts: NextFacts): NextStep {
  const { viewer } = facts;
  switch (facts.state) {
    case 'draft':
      return facts.lines === 0
        ? step('add_lines', 'you', 'Add the first line.')
        : step('open', 'you', 'Look over the terms, then open the buy.');
    case 'open':
      return whileOpen(facts);
    case 'locked':
      return whileLocked(facts);
    case 'ordered':
      return whileOrdered(facts);
    case 'arrived':
      return onceArrived(facts);
    case 'splitting':
      return whileSplitting(facts);
    case 'pickup':
      return atPickup(facts);
    case 'settled':
      return step('none', 'nobody', 'This buy is settled. Nothing is left to do.');
    case 'cancelled':
      return viewer.treasurer && facts.refundsWaiting > 0
        ? step('refund', 'you', 'Give back the deposits of this buy.')
        : step('none', 'nobody', 'This buy was cancelled.');
  }
}
