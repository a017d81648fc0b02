import { apportion } from '#shared/domain/shares/apportion.ts';
import { exactSum } from '#shared/domain/money/minor.ts';
import { execute, type Tx } from '../../config/database.ts';
import type { ComputedFinal } from './computeFinal.ts';

/**
 * Puts what is left of each bag on the club's shelf, by bag and lot, at what the shelf's part of the final share is.
 * @returns the cost that lies on the shelf; the rest of the shelf's part has no salt to it and is the club's loss
 */
export async function keepShelf(
  buy: { id: string; clubId: string },
  computed: ComputedFinal,
  tx: Tx,
): Promise<{ shelfMinor: number; lossMinor: number }> {
  const { shelf } = computed.share.sheet;
  const kept = computed.bags.filter(({ shelf_mg }) => (shelf_mg ?? 0) > 0);
  const costs = new Map<string, number>();
  let onShelf = 0;
  for (const { lineId, costMinor } of shelf.lines) {
    const own = kept.filter(({ line_id }) => line_id === lineId);
    if (own.length === 0 || costMinor === 0) continue;
    const parts = apportion(
      costMinor,
      own.map(({ shelf_mg }) => shelf_mg ?? 0),
    );
    own.forEach(({ id }, index) => costs.set(id, parts[index] ?? 0));
    onShelf += costMinor;
  }
  const charges = exactSum(
    shelf.charges.map(({ minor }) => minor),
    'charges',
  );
  if (kept.length > 0 && charges > 0) {
    const parts = apportion(
      charges,
      kept.map(({ shelf_mg }) => shelf_mg ?? 0),
    );
    kept.forEach(({ id }, index) => costs.set(id, (costs.get(id) ?? 0) + (parts[index] ?? 0)));
    onShelf += charges;
  }
  const salts = new Map(computed.terms.lines.map(({ id, saltId }) => [id, saltId]));
  for (const bag of kept) {
    await execute(
      `insert into shelf_stock (club_id, salt_id, buy_id, bag_id, lot, mg, cost_minor, origin)
       values (:clubId, :saltId, :buyId, :bagId, :lot, :mg, :costMinor, 'left_over')`,
      {
        clubId: buy.clubId,
        saltId: salts.get(bag.line_id) ?? '',
        buyId: buy.id,
        bagId: bag.id,
        lot: bag.lot,
        mg: bag.shelf_mg,
        costMinor: costs.get(bag.id) ?? 0,
      },
      tx,
    );
  }
  return { shelfMinor: onShelf, lossMinor: shelf.totalMinor - onShelf };
}
