import type { LineSums } from '#shared/domain/buys/sheetSums.ts';
import type { SackPack } from 'src/components/common/sackPlan.ts';

/** The packs of a line as sacks, filled with what is spoken for, the biggest first. */
export function sacksOf(line: LineSums, label: (mg: number) => string): SackPack[] {
  let rest = line.boughtMg - line.leftOverMg;
  return line.packs.map(({ packMg, count }) => {
    const whole = packMg * count;
    const filled = Math.max(0, Math.min(rest, whole));
    rest -= filled;
    const filledPermille = whole === 0 ? 0 : Math.round((filled / whole) * 1000);
    return { label: label(packMg), sizeMg: packMg, count, filledPermille };
  });
}

/** "2 × 5 kg" for each size. */
export const sayChosen = (line: LineSums, label: (mg: number) => string) =>
  line.packs.map(({ packMg, count }) => `${count} × ${label(packMg)}`);
