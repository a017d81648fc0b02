import { select, type Tx } from '../../config/database.ts';
import type { SupplierContact } from '../../presenters/orders/presentOrder.ts';

/** Mail address and contact of suppliers, by id. */
export async function supplierContacts(
  ids: readonly string[],
  tx?: Tx,
): Promise<Map<string, SupplierContact>> {
  if (ids.length === 0) return new Map();
  const rows = await select<SupplierContact & { id: string }>(
    'select id, email, contact from suppliers where id in (:ids)',
    { ids },
    tx,
  );
  return new Map(rows.map(({ id, ...contact }) => [id, contact]));
}
