import type { LineCovers } from './lineCovers.ts';
import { termsCost, type LineModel, type PackModel, type SupplierModel } from './packModel.ts';
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

/** A cover of a line taken without looking for a better one: one item, else the cheapest first. */
function roughCover(line: LineModel, model: PackModel, allowed: readonly boolean[]) {
  const usable = line.items
    .map((item, place) => ({ ...item, place }))
    .filter((item) => allowed[item.supplier])
    .sort((a, b) => a.price / a.mass - b.price / b.mass);
  const take = (items: typeof usable): Packing | null => {
    const counts = line.items.map(() => 0);
    let rest = line.need;
    for (const { place, mass, max } of items) {
      const count = rest > 0 ? Math.min(max, Math.ceil(rest / mass)) : 0;
      counts[place] = count;
      rest -= count * mass;
    }
    return rest <= 0 ? makePacking(line, counts, model.suppliers) : null;
  };
  let best: Packing | null = null;
  for (const items of [usable, ...usable.map((item) => [item])]) {
    const packing = take(items);
    if (packing && packing.cost < (best?.cost ?? Infinity)) best = packing;
  }
  return best;
}

type Cover = (line: LineModel, allowed: readonly boolean[]) => Packing | null;

function coverAll(model: PackModel, cover: Cover, allowed: readonly boolean[]): Packing[] | null {
  const packings: Packing[] = [];
  for (const line of model.lines) {
    const packing = cover(line, allowed);
    if (!packing) return null;
    packings.push(packing);
  }
  return packings;
}

/** Covers all lines; fills up suppliers whose terms aren't met, then leaves them out one by one. */
function descend(
  model: PackModel,
  cover: Cover,
  start: boolean[],
  offer: (packings: Packing[]) => void,
): void {
  let allowed = start;
  for (let packings = coverAll(model, cover, allowed); packings;) {
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
      packings = coverAll(model, cover, fewer);
      if (!packings) continue;
      allowed = fewer;
      break;
    }
  }
}

/**
 * Offers plans found without searching, so that there is something to beat, and something to show
 * when time runs out: covers from sets of suppliers, first rough ones, then the best of each line.
 *
 * @param offer takes a plan's packings; whether its terms are met is the taker's to check
 * @throws OutOfTime after the rough ones
 */
export function quickPlans(
  model: PackModel,
  covers: LineCovers,
  offer: (packings: Packing[]) => void,
): void {
  const shared = model.suppliers.flatMap((supplier, s) => (supplier.shared ? [s] : []));
  const all = model.suppliers.map(() => true);
  const none = all.map((_, s) => !shared.includes(s));

  const rough: Cover = (line, allowed) => roughCover(line, model, allowed);
  descend(model, rough, all, offer);
  for (const s of shared) descend(model, rough, none.with(s, true), offer);

  const best: Cover = (line, allowed) => covers.best(line, allowed);
  descend(model, best, all, offer);
  for (const s of shared) descend(model, best, all.with(s, false), offer);
  const pairs = shared.length <= 8 ? shared : [];
  for (const s of shared) {
    descend(model, best, none.with(s, true), offer);
    for (const t of pairs) if (t > s) descend(model, best, none.with(s, true).with(t, true), offer);
  }
}
