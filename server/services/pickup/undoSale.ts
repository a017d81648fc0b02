import type { Shelf } from '#shared/schemas/shelf.ts';
import { execute, select, transact } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { clubToday } from '../ledger/clubDay.ts';
import { reverseTransaction, transactionsOf } from '../ledger/reverseTransaction.ts';
import { DomainProblem, notFound } from '../problem.ts';
import { readShelf } from './readShelf.ts';
import { eraseSaleRecord } from './saleRecords.ts';
import { lockedStock, requireSeller } from './shelfStock.ts';
import { syncShelfSupplier } from './syncShelfSupplier.ts';

/** Takes a sale back: the grams lie on the shelf again, the books are reversed. */
export async function undoSale(actor: ClubActor, saleId: string): Promise<Shelf> {
  await requireSeller(actor);
  return transact(async (tx) => {
    const [sale] = await select<{
      stock_id: string;
      mg: number;
      cost_minor: number;
      undone_at: Date | null;
      sold_by_id: string;
    }>(
      'select stock_id, mg, cost_minor, undone_at, sold_by_id from shelf_sales where id = :saleId and club_id = :clubId for update',
      { saleId, clubId: actor.club.id },
      tx,
    );
    if (!sale) throw notFound('This sale');
    if (sale.undone_at) return readShelf(actor, tx);
    if (sale.sold_by_id !== actor.membershipId && !actor.roles.organiser) {
      throw new DomainProblem(
        403,
        'forbidden',
        'Only who sold it, or an organiser, takes a sale back.',
      );
    }
    await lockedStock(actor.club.id, sale.stock_id, tx);
    await execute(
      'update shelf_sales set undone_at = clock_timestamp() where id = :saleId',
      { saleId },
      tx,
    );
    await execute(
      `update shelf_stock set mg = mg + :mg, cost_minor = cost_minor + :costMinor, version = version + 1, updated_at = now()
       where id = :stockId`,
      { mg: sale.mg, costMinor: sale.cost_minor, stockId: sale.stock_id },
      tx,
    );
    const onDate = await clubToday(actor.club.id, tx);
    for (const transactionId of await transactionsOf(actor.club.id, [['shelf_sale', saleId]], tx)) {
      await reverseTransaction(tx, {
        transactionId,
        onDate,
        reason: 'Sale taken back',
        by: byActor(actor),
      });
    }
    await eraseSaleRecord(saleId, tx);
    await writeAudit(tx, {
      clubId: actor.club.id,
      by: byActor(actor),
      action: 'shelf.undoSale',
      subject: { type: 'shelf_sale', id: saleId },
      before: { mg: sale.mg },
    });
    await syncShelfSupplier(actor.club, byActor(actor), tx);
    return readShelf(actor, tx);
  });
}
