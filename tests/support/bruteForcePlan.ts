import { shippingCost, type PackRequest } from '#shared/index.ts';

/** A plan as an outsider would compute it: by trying everything. */
export type BrutePlan = {
  packs: Record<string, number>;
  cost: number;
  leftOver: number;
  count: number;
};

/** Most packs of each offer that a sensible plan can hold; generous on purpose. */
function mostPacks(request: PackRequest, index: number, cap: number): number {
  const offer = request.offers[index];
  if (!offer) return 0;
  return Math.min(offer.maxPacks ?? cap, cap);
}

function price(request: PackRequest, counts: number[]): BrutePlan | null {
  let cost = 0;
  let mass = 0;
  let count = 0;
  const byLine = new Map<string, number>();
  const bySupplier = new Map<string, { value: number; mass: number }>();
  request.offers.forEach((offer, i) => {
    const n = counts[i] ?? 0;
    if (n === 0) return;
    cost += n * offer.priceMinor;
    mass += n * offer.packMg;
    count += n;
    byLine.set(offer.lineId, (byLine.get(offer.lineId) ?? 0) + n * offer.packMg);
    const basket = bySupplier.get(offer.supplierId) ?? { value: 0, mass: 0 };
    basket.value += n * offer.priceMinor;
    basket.mass += n * offer.packMg;
    bySupplier.set(offer.supplierId, basket);
  });
  let needed = 0;
  for (const line of request.lines) {
    needed += line.neededMg;
    if ((byLine.get(line.id) ?? 0) < line.neededMg) return null;
  }
  for (const supplier of request.suppliers) {
    const basket = bySupplier.get(supplier.id);
    if (!basket) continue;
    if (basket.value < (supplier.minimumOrderMinor ?? 0)) return null;
    const shipping = shippingCost(supplier, basket.value, basket.mass);
    if (shipping === null) return null;
    cost += shipping;
  }
  const packs = Object.fromEntries(
    request.offers.flatMap(({ id }, i) => (counts[i] ? [[id, counts[i]]] : [])),
  );
  return { packs, cost, leftOver: mass - needed, count };
}

function better(a: BrutePlan, b: BrutePlan, ids: string[]): boolean {
  if (a.cost !== b.cost) return a.cost < b.cost;
  if (a.leftOver !== b.leftOver) return a.leftOver < b.leftOver;
  if (a.count !== b.count) return a.count < b.count;
  for (const id of ids) {
    const difference = (a.packs[id] ?? 0) - (b.packs[id] ?? 0);
    if (difference !== 0) return difference > 0;
  }
  return false;
}

/** The best plan among all with at most `cap` packs of each offer, or null. */
export function bruteForcePlan(request: PackRequest, cap: number): BrutePlan | null {
  const ids = request.offers.map((offer) => offer.id).sort((a, b) => (a < b ? -1 : 1));
  const counts = request.offers.map(() => 0);
  let best: BrutePlan | null = null;
  const walk = (i: number): void => {
    if (i === counts.length) {
      const plan = price(request, counts);
      if (plan && (!best || better(plan, best, ids))) best = plan;
      return;
    }
    const step = request.offers[i]?.multipleOf ?? 1;
    for (let n = 0; n <= mostPacks(request, i, cap); n += step) {
      counts[i] = n;
      walk(i + 1);
    }
    counts[i] = 0;
  };
  walk(0);
  return best;
}
