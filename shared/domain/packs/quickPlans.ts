import type { LineCovers } from './lineCovers.ts';
import { termsCost, type PackModel, type SupplierModel } from './packModel.ts';
import { makePacking, type Packing } from './packing.ts';

function basket(packings: readonly Packing[], supplier: number): { value: number; mass: number } {
  let value = 0;
  let mass = 0;
  for (const { values, masses } of packings) {
    value += values[supplier] as number;
    mass += masses[supplier] as number;
  }
  return { value, mass };
}

function unmet(model: PackModel, packings: readonly Packing[]): number[] {
  return model.suppliers.flatMap((supplier, s) => {
    if (!supplier.shared) return [];
    const { value, mass } = basket(packings, s);
    return termsCost(supplier, value, mass) === Infinity ? [s] : [];
  });
}

/** The packings with more of whichever item lifts a supplier's value to its minimum most cheaply. */
function lifted(
  model: PackModel,
  packings: readonly Packing[],
  supplier: number,
): Packing[] | null {
  const { minimum, free } = model.suppliers[supplier] as SupplierModel;
  const { value } = basket(packings, supplier);
  const missing = (value < minimum ? minimum : free) - value;
  let best: { line: number; item: number; more: number; cost: number } | null = null;
  for (const [line, packing] of packings.entries()) {
    for (const [i, item] of packing.line.items.entries()) {
      if (item.supplier !== supplier || item.price === 0) continue;
      const more = Math.ceil(missing / item.price);
      const cost = more * item.price;
      if ((packing.counts[i] as number) + more > item.max) continue;
      if (!best || cost < best.cost) best = { line, item: i, more, cost };
    }
  }
  if (!best || !Number.isFinite(best.more)) return null;
  const old = packings[best.line] as Packing;
  const { item, more } = best;
  const counts = old.counts.map((count, i) => (i === item ? count + more : count));
  return packings.with(best.line, makePacking(old.line, counts, model.suppliers));
}

/**
 * Offers plans found without searching, so that there is something to beat: best covers from sets of
 * suppliers, those with unmet terms filled up or left out one by one.
 *
 * @param offer takes a plan's packings; whether its terms are met is the taker's to check
 */
export function quickPlans(
  model: PackModel,
  covers: LineCovers,
  offer: (packings: Packing[]) => void,
): void {
  const shared = model.suppliers.flatMap((supplier, s) => (supplier.shared ? [s] : []));
  const all = model.suppliers.map(() => true);

  const cover = (allowed: boolean[]): Packing[] | null => {
    const packings: Packing[] = [];
    for (const line of model.lines) {
      const packing = covers.best(line, allowed);
      if (!packing) return null;
      packings.push(packing);
    }
    return packings;
  };

  const descend = (start: boolean[]): void => {
    let allowed = start;
    for (let packings = cover(allowed); packings;) {
      offer(packings);
      let full: Packing[] | null = packings;
      const bad = unmet(model, packings);
      for (const s of bad) full &&= lifted(model, full, s);
      if (full) offer(full);
      const at: readonly Packing[] = packings;
      bad.sort((a, b) => basket(at, a).value - basket(at, b).value);
      packings = null;
      for (const s of bad) {
        const fewer = allowed.with(s, false);
        packings = cover(fewer);
        if (!packings) continue;
        allowed = fewer;
        break;
      }
    }
  };

  descend(all);
  for (const s of shared) descend(all.with(s, false));
  const pairs = shared.length <= 8 ? shared : [];
  const none = all.map((_, s) => !shared.includes(s));
  for (const s of shared) {
    descend(none.with(s, true));
    for (const t of pairs) if (t > s) descend(none.with(s, true).with(t, true));
  }
}
