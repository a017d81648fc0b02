import type { BuyState } from './states.ts';

/** Fields that may still change once the terms are frozen by the lock. */
const meetingFields = new Set(['splitsAt', 'splitEndsAt', 'place', 'pickupRules', 'note']);

/** States in which something of the terms may change. */
export const editableStates = [
  'draft',
  'open',
  'locked',
  'ordered',
  'arrived',
  'splitting',
  'pickup',
] as const satisfies readonly BuyState[];

/** Whether a field of a buy's own may change in this state: all until the lock, then only what is about meeting. */
export function mayChangeField(state: BuyState, field: string): boolean {
  if (state === 'draft' || state === 'open') return true;
  return state !== 'settled' && state !== 'cancelled' && meetingFields.has(field);
}

/**
 * Whether a portion step may become another. With pledges standing on it, only a divisor of itself, so that each
 * pledge stays a whole number of steps.
 */
export function mayChangeStep(beforeMg: number, afterMg: number, pledged: boolean): boolean {
  return !pledged || beforeMg % afterMg === 0;
}
