import { select, type Tx } from '../../config/database.ts';

/** Whether any order of the buy was ever placed: from then on it can't reopen and nobody is dropped. */
export async function ordersPlaced(buyId: string, tx?: Tx): Promise<boolean> {
  const [row] = await select<{ placed: boolean }>(
    'select exists (select 1 from supplier_orders where buy_id = :buyId and placed_at is not null) as placed',
    { buyId },
    tx,
  );
  return row?.placed ?? false;
}
