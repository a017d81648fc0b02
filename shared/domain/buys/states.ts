/** The life of a buy, in order; any state before `ordered` may also end as `cancelled`. */
export const buyStates = [
  'draft',
  'open',
  'locked',
  'ordered',
  'arrived',
  'splitting',
  'pickup',
  'settled',
  'cancelled',
] as const;
export type BuyState = (typeof buyStates)[number];

/** Whether a buy in `state` has come as far as `reached` (a cancelled one has not come anywhere). */
export function hasReached(state: BuyState, reached: BuyState): boolean {
  return state !== 'cancelled' && buyStates.indexOf(state) >= buyStates.indexOf(reached);
}

/** A state as people say it. */
export const stateWords: Readonly<Record<BuyState, string>> = {
  draft: 'Draft',
  open: 'Open',
  locked: 'Locked',
  ordered: 'Ordered',
  arrived: 'Arrived',
  splitting: 'Splitting',
  pickup: 'Pickup',
  settled: 'Settled',
  cancelled: 'Cancelled',
};
