import { describe, expect, it } from 'vitest';
import { nextStep, type NextFacts } from '#shared/domain/buys/nextStep.ts';
import { buyStates } from '#shared/domain/buys/states.ts';

type Given = Partial<Omit<NextFacts, 'viewer'>> & { viewer?: Partial<NextFacts['viewer']> };

const facts = ({ viewer, ...given }: Given): NextFacts => ({
  state: 'open',
  frozen: false,
  lines: 2,
  unpaid: 0,
  overLimit: 0,
  unconfirmedBills: 0,
  targetsMade: false,
  portions: 0,
  portionsDone: 0,
  sharesWaiting: 0,
  refundsWaiting: 0,
  ...given,
  viewer: {
    organises: false,
    helps: false,
    treasurer: false,
    pledged: false,
    owes: false,
    mustAgree: false,
    collected: false,
    ...viewer,
  },
});

const organiser = { organises: true };
const treasurer = { treasurer: true };
const pledged = { pledged: true };

describe('what is next, and who does it', () => {
  it.each<[string, Given, string, string]>([
    ['a draft without lines', { state: 'draft', lines: 0, viewer: organiser }, 'add_lines', 'you'],
    ['a draft with lines', { state: 'draft', viewer: organiser }, 'open', 'you'],
    ['open, not in yet', {}, 'pledge', 'you'],
    ['open, in', { viewer: pledged }, 'wait_closing', 'members'],
    ['open, organiser', { viewer: organiser }, 'pledge', 'members'],
    ['frozen, organiser', { frozen: true, viewer: organiser }, 'unfreeze', 'you'],
    ['frozen, member', { frozen: true, viewer: pledged }, 'unfreeze', 'organiser'],
    ['locked, owing', { state: 'locked', viewer: { owes: true } }, 'pay', 'you'],
    [
      'locked, price rose past the limit',
      { state: 'locked', viewer: { owes: true, mustAgree: true } },
      'agree',
      'you',
    ],
    ['locked, all paid', { state: 'locked', viewer: organiser }, 'order', 'you'],
    [
      'locked, unpaid',
      { state: 'locked', unpaid: 2, viewer: organiser },
      'collect_payments',
      'members',
    ],
    [
      'locked, waiting for a yes',
      { state: 'locked', overLimit: 1, viewer: organiser },
      'agree',
      'members',
    ],
    ['locked, paid member', { state: 'locked', viewer: pledged }, 'order', 'organiser'],
    ['ordered, organiser', { state: 'ordered', viewer: organiser }, 'await_packs', 'you'],
    [
      'ordered, bill waits',
      { state: 'ordered', unconfirmedBills: 1, viewer: treasurer },
      'confirm_bills',
      'you',
    ],
    ['ordered, member', { state: 'ordered', viewer: pledged }, 'await_packs', 'organiser'],
    ['arrived', { state: 'arrived', viewer: organiser }, 'count_bags', 'you'],
    [
      'arrived, targets made',
      { state: 'arrived', targetsMade: true, viewer: organiser },
      'start_split',
      'you',
    ],
    [
      'splitting, helper',
      { state: 'splitting', portions: 9, portionsDone: 4, viewer: { helps: true } },
      'weigh',
      'you',
    ],
    [
      'splitting, all weighed',
      { state: 'splitting', portions: 9, portionsDone: 9, viewer: organiser },
      'finish_split',
      'you',
    ],
    [
      'splitting, member',
      { state: 'splitting', portions: 9, viewer: pledged },
      'weigh',
      'organiser',
    ],
    [
      'pickup, not collected',
      { state: 'pickup', sharesWaiting: 3, viewer: pledged },
      'collect',
      'you',
    ],
    ['pickup, owing', { state: 'pickup', viewer: { ...pledged, owes: true } }, 'pay', 'you'],
    [
      'pickup, helper',
      { state: 'pickup', sharesWaiting: 3, viewer: { helps: true } },
      'hand_over',
      'you',
    ],
    ['pickup, all collected', { state: 'pickup', viewer: treasurer }, 'settle', 'you'],
    [
      'pickup, all collected, member',
      { state: 'pickup', viewer: { ...pledged, collected: true } },
      'settle',
      'treasurer',
    ],
    ['settled', { state: 'settled' }, 'none', 'nobody'],
    ['cancelled', { state: 'cancelled', refundsWaiting: 2 }, 'none', 'nobody'],
    [
      'cancelled, deposits wait',
      { state: 'cancelled', refundsWaiting: 2, viewer: treasurer },
      'refund',
      'you',
    ],
  ])('%s', (_name, given, code, who) => {
    expect(nextStep(facts(given))).toMatchObject({ code, who });
  });

  it('tells a plain member no counts of who has paid', () => {
    for (const state of buyStates) {
      const { text } = nextStep(facts({ state, unpaid: 7, overLimit: 7, refundsWaiting: 7 }));
      expect(text).not.toContain('7');
    }
  });

  it('counts one in the singular', () => {
    const one = nextStep(facts({ state: 'locked', unpaid: 1, viewer: organiser }));
    expect(one.text).toMatch(/^1 member has yet to pay/);
  });
});
