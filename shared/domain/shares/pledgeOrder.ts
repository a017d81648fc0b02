import type { SharePledge } from './shareTypes.ts';

const zoned = /^\d{4}-\d\d-\d\d(T.*(Z|[+-]\d\d:?\d\d))?$/i;

/**
 * The instant as milliseconds since 1970.
 *
 * @throws RangeError naming `field` when it isn't an ISO 8601 instant with its zone
 */
export function instantMs(at: string, field: string): number {
  const ms = typeof at === 'string' && zoned.test(at) ? Date.parse(at) : NaN;
  if (Number.isNaN(ms)) throw new RangeError(`${field} must be an instant with zone, not ${at}`);
  return ms;
}

/** Order of two ids by code unit, the same on every machine and in every locale. */
export function compareIds(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

/** The order in which odd units fall and the queue is served: earlier instant, then lower id. */
export function compareTurns(
  a: { atMs: number; memberId: string },
  b: { atMs: number; memberId: string },
): number {
  return a.atMs - b.atMs || compareIds(a.memberId, b.memberId);
}

/** Pledges in the order in which they are served: earlier instant, then lower member id. */
export function sortPledges<T extends Pick<SharePledge, 'at' | 'memberId'>>(
  pledges: readonly T[],
): T[] {
  return pledges
    .map((pledge) => ({
      pledge,
      atMs: instantMs(pledge.at, 'pledge.at'),
      memberId: pledge.memberId,
    }))
    .sort(compareTurns)
    .map(({ pledge }) => pledge);
}
