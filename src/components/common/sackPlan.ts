export type SackPack = {
  /** The pack in words, such as '25 kg'. */
  label: string;
  sizeMg: number;
  count: number;
  /** How much of all these packs together is spoken for, in thousandths. */
  filledPermille: number;
};

export type Sack = { key: string; mark: string; height: number; filled: number; times: number };

const MOST_DRAWN = 4;
const fractions: Record<number, string> = { 0.25: '¼', 0.5: '½', 0.75: '¾' };

/** What stands on a sack: its kilograms. */
export function sackMark(sizeMg: number): string {
  const kilograms = Math.round(sizeMg / 1e4) / 100;
  return fractions[kilograms] ?? String(kilograms);
}

/** A sack's height in px: the fifth root keeps 250 g visible beside 25 kg. */
export const sackHeight = (sizeMg: number) =>
  Math.round(Math.min(76, Math.max(26, 35 * (sizeMg / 1e6) ** 0.2)));

/** The sacks to draw: equal ones are filled one after the other; more than four become one. */
export function planSacks(packs: SackPack[]): Sack[] {
  return packs.flatMap(({ sizeMg, count, filledPermille }, group) => {
    const mark = sackMark(sizeMg);
    const height = sackHeight(sizeMg);
    if (count > MOST_DRAWN) {
      return [{ key: `${group}`, mark, height, filled: filledPermille, times: count }];
    }
    return Array.from({ length: count }, (_, index) => ({
      key: `${group}-${index}`,
      mark,
      height,
      filled: Math.round(Math.min(1000, Math.max(0, filledPermille * count - index * 1000))),
      times: 1,
    }));
  });
}

/** The row in words, for whoever doesn't see it. */
export function sayPacks(packs: SackPack[]): string {
  const said = packs
    .filter(({ count }) => count > 0)
    .map(({ count, label, filledPermille }) => {
      const filled = Math.round(filledPermille / 10);
      return `${count} × ${label}, ${filled} % spoken for`;
    });
  return said.length > 0 ? said.join('; ') : 'no packs yet';
}
