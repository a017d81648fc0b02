import { select, type Tx } from '../../config/database.ts';

/** Whether the buy's final shares are posted: from then on what it cost is shared out. */
export async function finalPosted(buyId: string, tx?: Tx): Promise<boolean> {
  const [row] = await select<{ posted: boolean }>(
    'select exists (select 1 from buy_members where buy_id = :buyId and final_minor is not null) as posted',
    { buyId },
    tx,
  );
  return row?.posted ?? false;
}
