import { formatMass } from '../mass/formatMass.ts';
import type { BuyState } from './states.ts';

/** The grams of a pledge: `upToMg` null or above `wantedMg`. */
export type PledgeWish = { wantedMg: number; upToMg: number | null };

/** What decides whether a pledge may change as wished; read under the buy's lock. */
export type PledgeFacts = {
  state: BuyState;
  frozen: boolean;
  /** The database's clock and the closing time, in ms. */
  nowMs: number;
  closesAtMs: number | null;
  loweringFreezeHours: number;
  stepMg: number;
  /** The pledge as it stands; null: none yet. */
  before: PledgeWish | null;
  /** Who asks: the member, an organiser for a member, or an organiser for a guest without sign-in. */
  who: 'member' | 'organiser' | 'organiserForGuest';
  /** A classified salt whose cautions the member has not confirmed. */
  unconfirmed: boolean;
  /** Name of the buy in which the member is overdue. */
  overdueIn: string | null;
};

/** What becomes of a wish. `keepsTurn`: the pledge's time stays. */
export type PledgeVerdict =
  | { ok: true; act: 'keep' }
  | { ok: true; act: 'propose' }
  | { ok: true; act: 'save'; keepsTurn: boolean }
  | { ok: false; code: PledgeRefusal; detail: string; errors?: Record<string, string> };

export type PledgeRefusal =
  | 'buy_locked'
  | 'buy_frozen'
  | 'wrong_state'
  | 'closing_soon'
  | 'overdue_elsewhere'
  | 'hazard_unconfirmed'
  | 'invalid';

const hourMs = 3_600_000;

const no = (code: PledgeRefusal, detail: string, errors?: Record<string, string>) =>
  ({ ok: false, code, detail, ...(errors ? { errors } : {}) }) as const;

/** The wish without an `upTo` that leaves no room. */
export function plainWish({ wantedMg, upToMg }: PledgeWish): PledgeWish {
  return { wantedMg, upToMg: upToMg !== null && upToMg > wantedMg ? upToMg : null };
}

/** The most that a pledge may bring its member. */
export function mostOf({ wantedMg, upToMg }: PledgeWish): number {
  return Math.max(wantedMg, upToMg ?? 0);
}

function closed({ state, frozen, nowMs, closesAtMs }: PledgeFacts) {
  if (state === 'draft' || state === 'cancelled') {
    return no('wrong_state', `This buy is ${state}: nothing can be pledged.`);
  }
  if (state !== 'open') {
    return no(
      'buy_locked',
      'This buy locked a moment ago. Your change came after it and was not kept.',
    );
  }
  if (frozen) {
    return no('buy_frozen', 'Pledges rest until the organiser decides how this buy goes on.');
  }
  if (closesAtMs !== null && nowMs >= closesAtMs) {
    return no(
      'buy_locked',
      'The closing time has passed. Your change came after it and was not kept.',
    );
  }
  return null;
}

function wrongSteps(wish: PledgeWish, stepMg: number) {
  const errors: Record<string, string> = {};
  for (const [field, mg] of Object.entries(wish)) {
    if (mg === null || mg % stepMg === 0) continue;
    const below = mg - (mg % stepMg);
    const [low, high] = [below, below + stepMg].map((value) => formatMass(value));
    errors[field] = `This line goes in steps of ${formatMass(stepMg)}: ${low} or ${high}.`;
  }
  return Object.keys(errors).length > 0 ? errors : null;
}

type ClosingFacts = { closesAtMs: number | null; loweringFreezeHours: number };

/** Until when members lower their own pledges, in ms; null: without end. */
export function loweringEnds({ closesAtMs, loweringFreezeHours }: ClosingFacts): number | null {
  return closesAtMs === null ? null : closesAtMs - loweringFreezeHours * hourMs;
}

/** Whether lowering needs the organiser now: the last hours before closing. */
export function loweringFrozen(facts: ClosingFacts & { nowMs: number }): boolean {
  const end = loweringEnds(facts);
  return end !== null && facts.nowMs >= end;
}

/**
 * Decides whether a pledge may become `wish`, by product rules alone: open, in time, whole steps, lowering late only
 * by an organiser, raising someone's pledge only with their yes, nothing new for who is overdue or has not confirmed
 * the cautions. Versions are compared by the caller.
 */
export function decidePledge(facts: PledgeFacts, wish: PledgeWish): PledgeVerdict {
  const shut = closed(facts);
  if (shut) return shut;
  const errors = wrongSteps(wish, facts.stepMg);
  if (errors) return no('invalid', Object.values(errors)[0] ?? '', errors);

  const before = facts.before ?? { wantedMg: 0, upToMg: null };
  const same = wish.wantedMg === before.wantedMg && wish.upToMg === before.upToMg;
  if (same) return { ok: true, act: 'keep' };

  const raises = wish.wantedMg > before.wantedMg || mostOf(wish) > mostOf(before);
  if (wish.wantedMg < before.wantedMg && facts.who === 'member' && loweringFrozen(facts)) {
    return no(
      'closing_soon',
      `In the last ${facts.loweringFreezeHours} hours before closing only the organiser lowers a pledge. Ask them.`,
    );
  }
  if (raises && facts.overdueIn !== null) {
    const whose = facts.who === 'member' ? 'You still owe' : 'They still owe';
    return no(
      'overdue_elsewhere',
      `${whose} for “${facts.overdueIn}”. Until that is paid, nothing more can be pledged.`,
    );
  }
  if (facts.who === 'member' && raises && facts.unconfirmed) {
    return no('hazard_unconfirmed', 'Read the cautions of this salt and confirm them first.');
  }
  if (facts.who === 'organiser' && raises && mostOf(before) > 0)
    return { ok: true, act: 'propose' };
  return { ok: true, act: 'save', keepsTurn: wish.wantedMg <= before.wantedMg };
}
