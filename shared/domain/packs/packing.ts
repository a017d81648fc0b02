import { termsCost, type Item, type LineModel, type SupplierModel } from './packModel.ts';

/** One way to cover a line: how often each of its items is bought. */
export type Packing = {
  line: LineModel;
  counts: number[];
  /** Goods, and the shipping of suppliers that serve this line alone. */
  cost: number;
  mass: number;
  packs: number;
  /** Value and mass of the goods by supplier. */
  values: number[];
  masses: number[];
};

/** Value and mass that a packing buys from one supplier. */
export function basketOf(
  items: readonly Item[],
  counts: ArrayLike<number>,
  supplier: number,
): { value: number; mass: number } {
  let value = 0;
  let mass = 0;
  for (let i = 0; i < items.length; i++) {
    const item = items[i] as Item;
    const count = counts[i] as number;
    if (count === 0 || item.supplier !== supplier) continue;
    value += item.price * count;
    mass += item.mass * count;
  }
  return { value, mass };
}

/** Shipping of the suppliers that serve this line alone; Infinity when their terms aren't met. */
export function privateShipping(
  line: LineModel,
  counts: ArrayLike<number>,
  suppliers: readonly SupplierModel[],
): number {
  let sum = 0;
  for (const supplier of line.privates) {
    const { value, mass } = basketOf(line.items, counts, supplier);
    sum += termsCost(suppliers[supplier] as SupplierModel, value, mass);
  }
  return sum;
}

/** The packing with its sums. */
export function makePacking(
  line: LineModel,
  counts: ArrayLike<number>,
  suppliers: readonly SupplierModel[],
): Packing {
  const values = suppliers.map(() => 0);
  const masses = suppliers.map(() => 0);
  let cost = 0;
  let mass = 0;
  let packs = 0;
  for (let i = 0; i < line.items.length; i++) {
    const count = counts[i] as number;
    if (count === 0) continue;
    const item = line.items[i] as Item;
    const price = item.price * count;
    const weight = item.mass * count;
    cost += price;
    mass += weight;
    packs += item.packs * count;
    values[item.supplier] = (values[item.supplier] as number) + price;
    masses[item.supplier] = (masses[item.supplier] as number) + weight;
  }
  for (const s of line.privates) {
    cost += termsCost(suppliers[s] as SupplierModel, values[s] as number, masses[s] as number);
  }
  return {
    line,
    counts: Array.from(line.items, (_, i) => counts[i] as number),
    cost,
    mass,
    packs,
    values,
    masses,
  };
}

/**
 * The better of two packings of one line comes first: lower cost, then less mass, then fewer packs,
 * then more packs of the lowest offer id. Items are in the order of their offers' ids.
 */
export function comparePackings(a: Packing, b: Packing): number {
  return (
    a.cost - b.cost || a.mass - b.mass || a.packs - b.packs || compareCounts(a.counts, b.counts)
  );
}

/** More of the earliest offer in which they differ comes first. */
export function compareCounts(a: ArrayLike<number>, b: ArrayLike<number>): number {
  for (let i = 0; i < a.length; i++) {
    const difference = (b[i] as number) - (a[i] as number);
    if (difference !== 0) return difference;
  }
  return 0;
}
