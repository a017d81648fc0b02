import { termsCost, type PackModel } from './packModel.ts';
import { compareCounts, type Packing } from './packing.ts';

/** A feasible plan under search, priced by the suppliers' true terms. */
export type CandidatePlan = {
  packings: Packing[];
  cost: number;
  mass: number;
  packs: number;
};

/** The plan of one packing a line, or null when a supplier's terms aren't met. */
export function candidatePlan(model: PackModel, packings: Packing[]): CandidatePlan | null {
  let cost = 0;
  let mass = 0;
  let packs = 0;
  for (const packing of packings) {
    cost += packing.cost;
    mass += packing.mass;
    packs += packing.packs;
  }
  for (let s = 0; s < model.suppliers.length; s++) {
    const supplier = model.suppliers[s];
    if (!supplier?.shared) continue;
    let value = 0;
    let bought = 0;
    for (const { values, masses } of packings) {
      value += values[s] as number;
      bought += masses[s] as number;
    }
    cost += termsCost(supplier, value, bought);
  }
  return cost < Infinity ? { packings, cost, mass, packs } : null;
}

/** Packs by place of the offer, in the order of the offers' ids. */
export function packsByOffer(model: PackModel, packings: readonly Packing[]): Float64Array {
  const packs = new Float64Array(model.offerIds.length);
  for (const { line, counts } of packings) {
    line.items.forEach((item, i) => {
      packs[item.offer] = (counts[i] as number) * item.packs;
    });
  }
  return packs;
}

/** The better plan first: cost, mass (so left over), packs, then more of the lowest offer id. */
export function comparePlans(model: PackModel, a: CandidatePlan, b: CandidatePlan): number {
  return (
    a.cost - b.cost ||
    a.mass - b.mass ||
    a.packs - b.packs ||
    compareCounts(packsByOffer(model, a.packings), packsByOffer(model, b.packings))
  );
}
