import { checkPackRequest } from './checkPackRequest.ts';
import { packModel } from './packModel.ts';
import type { PackRequest } from './packTypes.ts';

/** What stands in the way of any plan at all; `terms`: minimum orders and shipping tables. */
export type PackObstacle =
  | { code: 'no_offer'; lineId: string }
  | { code: 'too_little_stock'; lineId: string; neededMg: number; stockMg: number }
  | { code: 'terms' };

/**
 * Why a request that has no plan has none: the first line that nothing or too little is offered for,
 * else the suppliers' terms.
 *
 * @param request one for which `planPacks` found no plan
 */
export function packObstacle(request: PackRequest): PackObstacle {
  checkPackRequest(request);
  const { lines } = packModel(request);
  for (const { items, need: neededMg, index } of lines) {
    if (neededMg === 0) continue;
    const lineId = request.lines[index]?.id ?? '';
    if (items.length === 0) return { code: 'no_offer', lineId };
    const stockMg = items.reduce((sum, { mass, max }) => sum + mass * max, 0);
    if (stockMg < neededMg) return { code: 'too_little_stock', lineId, neededMg, stockMg };
  }
  return { code: 'terms' };
}

/** An obstacle in plain English. */
export function explainObstacle(obstacle: PackObstacle): string {
  switch (obstacle.code) {
    case 'no_offer':
      return `Line ${obstacle.lineId} has no offer that can be bought.`;
    case 'too_little_stock':
      return `Line ${obstacle.lineId} needs ${obstacle.neededMg / 1000} g, and all packs in stock hold ${obstacle.stockMg / 1000} g.`;
    case 'terms':
      return "No choice of packs covers every line within the suppliers' minimum orders and shipping tables.";
  }
}
