export type Band = { targetMg: number; bandMg: number };

// The window is a thousandth of the way on a true scale, so it gets a fixed part of the track.
const WINDOW_FROM = 56;
const WINDOW_TO = 76;

/** Where a reading stands on the track, in per cent of its length. */
export function bandPosition(readingMg: number, { targetMg, bandMg }: Band): number {
  const low = targetMg - bandMg;
  const high = targetMg + bandMg;
  if (readingMg <= low) return low > 0 ? Math.max(0, (readingMg / low) * WINDOW_FROM) : 0;
  if (readingMg <= high && high > low) {
    return WINDOW_FROM + ((readingMg - low) / (high - low)) * (WINDOW_TO - WINDOW_FROM);
  }
  // Twice the band above the window is the track's end.
  const beyond = (readingMg - high) / Math.max(1, 4 * bandMg);
  return Math.min(100, WINDOW_TO + beyond * (100 - WINDOW_TO));
}

export type BandVerdict = 'below' | 'within' | 'above';

export function judgeBand(readingMg: number, { targetMg, bandMg }: Band): BandVerdict {
  if (readingMg < targetMg - bandMg) return 'below';
  return readingMg > targetMg + bandMg ? 'above' : 'within';
}

export const bandWindow = { from: WINDOW_FROM, to: WINDOW_TO };
