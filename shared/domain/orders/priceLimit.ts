/**
 * Whether a share has risen past the price limit since the lock.
 *
 * @param limitPermille 100 is 10 %
 * @example exceedsLimit(1101, 1000, 100) // true; 1100 is not
 */
export function exceedsLimit(
  newMinor: number,
  lockedMinor: number,
  limitPermille: number,
): boolean {
  return BigInt(newMinor) * 1000n > BigInt(lockedMinor) * BigInt(1000 + limitPermille);
}

/** What a member was asked to agree to, and whether they did. */
export interface Agreement {
  readonly overLimitMinor: number | null;
  readonly agreed: boolean;
}

/**
 * What becomes of an agreement when the share is `newMinor`: an agreed sum stands for every share up to it, a higher one
 * is asked for anew, and below the limit nothing is asked.
 */
export function nextAgreement(
  current: Agreement,
  newMinor: number,
  lockedMinor: number,
  limitPermille: number,
): Agreement {
  if (!exceedsLimit(newMinor, lockedMinor, limitPermille)) {
    return { overLimitMinor: null, agreed: false };
  }
  if (current.agreed && newMinor <= (current.overLimitMinor ?? 0)) return current;
  return { overLimitMinor: newMinor, agreed: false };
}
