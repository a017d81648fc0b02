import type { Supplier as SupplierReply, SupplierBody } from '#shared/schemas/suppliers.ts';
import { isUniqueViolation, transact, type Tx } from '../../config/database.ts';
import { Supplier } from '../../models/Supplier.ts';
import { supplierFields } from '../../presenters/suppliers.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { offersChanged } from '../buys/offersChanged.ts';
import { byActor } from '../buys/withBuy.ts';
import { forbidden, invalid, notFound, stale, wrongState } from '../problem.ts';
import { describeSupplierChange } from './offerWords.ts';
import { getSupplier } from './readSuppliers.ts';

async function orTaken<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (isUniqueViolation(error, 'suppliers_name')) {
      throw invalid({ name: 'Your club already has a supplier of this name.' });
    }
    throw error;
  }
}

/**
 * A supplier that people edit, under its lock.
 * @throws DomainProblem 404; 403 for the club's shelf
 */
export async function lockSupplier(actor: ClubActor, id: string, tx: Tx): Promise<Supplier> {
  const supplier = await Supplier.lock(actor.club.id, id, tx);
  if (!supplier) throw notFound('This supplier');
  if (supplier.isShelf)
    throw forbidden('The shelf follows the club’s stock and is not edited here.');
  return supplier;
}

/** The same for changes of its offers: an archived supplier takes none. */
export async function lockSellingSupplier(actor: ClubActor, id: string, tx: Tx): Promise<Supplier> {
  const supplier = await lockSupplier(actor, id, tx);
  if (supplier.archivedAt) throw wrongState('This supplier is archived. Bring it back first.');
  return supplier;
}

/**
 * Adds a supplier.
 * @throws DomainProblem 422 by field
 */
export async function addSupplier(actor: ClubActor, body: SupplierBody): Promise<SupplierReply> {
  return orTaken(() =>
    transact(async (tx) => {
      const supplier = await Supplier.create(
        { clubId: actor.club.id, ...body },
        { transaction: tx.transaction },
      );
      await writeAudit(tx, {
        clubId: actor.club.id,
        by: byActor(actor),
        action: 'suppliers.add',
        subject: { type: 'supplier', id: supplier.id },
        after: body,
      });
      return getSupplier(actor.club.id, supplier.id, tx);
    }),
  );
}

/**
 * Changes a supplier. What changes in its shipping, minimum or free shipping is told to open buys that draw on it.
 * @throws DomainProblem 404; 403 for the shelf; 409 `stale`; 422 by field
 */
export async function changeSupplier(
  actor: ClubActor,
  id: string,
  version: number,
  body: SupplierBody,
): Promise<SupplierReply> {
  return orTaken(() =>
    transact(async (tx) => {
      const supplier = await lockSupplier(actor, id, tx);
      await refuseStale(supplier, version, tx);
      const before = supplierFields(supplier);
      const keys = (Object.keys(body) as (keyof SupplierBody)[]).filter(
        (key) => JSON.stringify(before[key]) !== JSON.stringify(body[key]),
      );
      if (keys.length > 0) {
        supplier.set({ ...body, version: supplier.version + 1 });
        await supplier.save({ transaction: tx.transaction });
        await writeAudit(tx, {
          clubId: actor.club.id,
          by: byActor(actor),
          action: 'suppliers.change',
          subject: { type: 'supplier', id },
          before: Object.fromEntries(keys.map((key) => [key, before[key]])),
          after: Object.fromEntries(keys.map((key) => [key, body[key]])),
        });
        const said = describeSupplierChange(before, body, actor.club);
        await offersChanged(
          tx,
          said.map((summary) => ({ supplierId: id, offerId: null, summary })),
          byActor(actor),
        );
      }
      return getSupplier(actor.club.id, id, tx);
    }),
  );
}

async function refuseStale(supplier: Supplier, version: number, tx: Tx): Promise<void> {
  if (supplier.version === version) return;
  throw stale(
    'Someone changed this supplier since you opened it.',
    await getSupplier(supplier.clubId, supplier.id, tx),
  );
}

/**
 * Archives a supplier with all its offers, or brings it back; open buys that draw on it are told.
 * @throws DomainProblem 404; 403 for the shelf; 409 `stale`; 422 when its name is taken meanwhile
 */
export async function archiveSupplier(
  actor: ClubActor,
  id: string,
  version: number,
  archived: boolean,
): Promise<SupplierReply> {
  return orTaken(() =>
    transact(async (tx) => {
      const supplier = await lockSupplier(actor, id, tx);
      await refuseStale(supplier, version, tx);
      if ((supplier.archivedAt !== null) !== archived) {
        supplier.archivedAt = archived ? new Date() : null;
        supplier.version += 1;
        await supplier.save({ transaction: tx.transaction });
        await writeAudit(tx, {
          clubId: actor.club.id,
          by: byActor(actor),
          action: archived ? 'suppliers.archive' : 'suppliers.restore',
          subject: { type: 'supplier', id },
          after: { name: supplier.name },
        });
        const summary = archived
          ? `Nothing is bought from ${supplier.name} any more.`
          : `${supplier.name} can be bought from again.`;
        await offersChanged(tx, [{ supplierId: id, offerId: null, summary }], byActor(actor));
      }
      return getSupplier(actor.club.id, id, tx);
    }),
  );
}
