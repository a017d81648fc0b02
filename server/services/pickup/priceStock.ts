import type { PriceBody, Shelf } from '#shared/schemas/shelf.ts';
import { execute, transact } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { stale } from '../problem.ts';
import { readShelf } from './readShelf.ts';
import { lockedStock } from './shelfStock.ts';
import { syncShelfSupplier } from './syncShelfSupplier.ts';

/** Sets what a kilogram of a lot costs; null: not for sale. */
export async function priceStock(
  actor: ClubActor,
  stockId: string,
  body: PriceBody,
): Promise<Shelf> {
  return transact(async (tx) => {
    const stock = await lockedStock(actor.club.id, stockId, tx);
    if (stock.version !== body.version)
      throw stale('Somebody changed this lot meanwhile.', { version: stock.version });
    await execute(
      'update shelf_stock set price_minor_per_kg = :price, version = version + 1, updated_at = now() where id = :stockId',
      { price: body.priceMinorPerKg, stockId },
      tx,
    );
    await writeAudit(tx, {
      clubId: actor.club.id,
      by: byActor(actor),
      action: 'shelf.price',
      subject: { type: 'shelf_stock', id: stockId },
      before: { priceMinorPerKg: stock.price_minor_per_kg },
      after: { priceMinorPerKg: body.priceMinorPerKg },
    });
    await syncShelfSupplier(actor.club, byActor(actor), tx);
    return readShelf(actor, tx);
  });
}
