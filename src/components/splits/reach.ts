import { bagHoldsMg } from '#shared/domain/splits/bagSums.ts';
import type { Bag, Portion } from '#shared/schemas/splits.ts';

export type Reach = {
  /** What this bag should still hold. */
  inBagMg: number;
  /** What all open bags of the line should still hold. */
  inLineMg: number;
  /** What is still to be weighed of the line. */
  toWeighMg: number;
  /** What is left over then; negative: so much is short. */
  spareMg: number;
};

/** Whether what is left in a line's bags will do for its portions that still wait. */
export function reachOf(bag: Bag, bags: readonly Bag[], portions: readonly Portion[]): Reach {
  const own = bags.filter(({ lineId }) => lineId === bag.lineId);
  const inLineMg = own.reduce((sum, each) => sum + bagHoldsMg(each), 0);
  const toWeighMg = portions
    .filter(
      ({ lineId, state }) => lineId === bag.lineId && (state === 'waiting' || state === 'claimed'),
    )
    .reduce((sum, { targetMg }) => sum + targetMg, 0);
  return { inBagMg: bagHoldsMg(bag), inLineMg, toWeighMg, spareMg: inLineMg - toWeighMg };
}
