import type { LineResult } from './shareResults.ts';
import type { ChargeBasis } from './shareTypes.ts';

/** A line divided, with the place of each pledge's member in the buy's order. */
export type PlacedLine = LineResult & { places: number[] };

/**
 * What a charge is measured by, for each member in order and the shelf last.
 *
 * @param lines only those the charge belongs to
 */
export function chargeWeights(basis: ChargeBasis, lines: PlacedLine[], members: number): number[] {
  const weights = new Array<number>(members + 1).fill(0);
  const add = (place: number, weight: number) => {
    weights[place] = (weights[place] ?? 0) + weight;
  };
  for (const { line, grams, money, places } of lines) {
    places.forEach((place, index) => {
      const mg = grams.mg[index] ?? 0;
      if (basis === 'mass') add(place, mg);
      else if (basis === 'value') add(place, money.parts[index] ?? 0);
      else if (basis === 'portion') add(place, mg > 0 ? 1 : 0);
      else if (mg > 0) weights[place] = 1;
    });
    if (basis === 'value') add(members, money.parts.at(-1) ?? 0);
    if (basis === 'mass' && line.shelfPays !== false) add(members, grams.shelfMg);
  }
  return weights;
}
