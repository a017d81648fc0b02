import type { ChargeBasis, ShareLine } from './shareTypes.ts';

/** What everybody got and pays of a line, members by their place in the buy's order, shelf apart. */
export type LineResult = {
  line: ShareLine;
  parts: { place: number; mg: number; costMinor: number }[];
  shelf: { mg: number; costMinor: number };
};

/**
 * What a charge is measured by, for each member in order and the shelf last.
 *
 * @param lines only those the charge belongs to
 */
export function chargeWeights(basis: ChargeBasis, lines: LineResult[], members: number): number[] {
  const weights = new Array<number>(members + 1).fill(0);
  const add = (place: number, weight: number) => {
    weights[place] = (weights[place] ?? 0) + weight;
  };
  for (const { line, parts, shelf } of lines) {
    for (const { place, mg, costMinor } of parts) {
      if (basis === 'mass') add(place, mg);
      else if (basis === 'value') add(place, costMinor);
      else if (basis === 'portion') add(place, mg > 0 ? 1 : 0);
      else if (mg > 0) weights[place] = 1;
    }
    if (basis === 'value') add(members, shelf.costMinor);
    if (basis === 'mass' && line.shelfPays !== false) add(members, shelf.mg);
  }
  return weights;
}
