import { select, type Tx } from '../../config/database.ts';
import { notFound, stale } from '../problem.ts';

/** A bag under the buy's lock. */
export interface LockedBag {
  readonly id: string;
  readonly lineId: string;
  readonly number: number;
  readonly supplierOrderId: string;
  readonly closed: boolean;
  /** A portion or a spill came out of it. */
  readonly used: boolean;
  readonly version: number;
  /** What a count says, for the audit log. */
  readonly facts: {
    grossMg: number | null;
    tareMg: number | null;
    netMg: number | null;
    lot: string;
    missing: boolean;
    damage: string;
  };
}

interface Row {
  id: string;
  line_id: string;
  number: number;
  supplier_order_id: string;
  gross_mg: number | null;
  tare_mg: number | null;
  net_mg: number | null;
  lot: string;
  missing: boolean;
  damage: string;
  closed: boolean;
  used: boolean;
  version: number;
}

/**
 * A bag of a buy that is locked.
 * @param version what the actor saw; absent where the act doesn't depend on it
 * @throws DomainProblem 404, or 409 `stale`
 */
export async function lockedBag(
  buyId: string,
  bagId: string,
  version: number | undefined,
  tx: Tx,
): Promise<LockedBag> {
  const [row] = await select<Row>(
    `select b.id, b.line_id, b.number, b.supplier_order_id, b.gross_mg, b.tare_mg, b.net_mg, b.lot, b.missing, b.damage,
        b.closed_at is not null as closed, b.version,
        exists (select 1 from portions p where p.bag_id = b.id and p.state = 'done')
          or exists (select 1 from spills s where s.bag_id = b.id and s.undone_at is null) as used
     from bags b where b.id = :bagId and b.buy_id = :buyId`,
    { bagId, buyId },
    tx,
  );
  if (!row) throw notFound('This bag');
  const bag: LockedBag = {
    id: row.id,
    lineId: row.line_id,
    number: row.number,
    supplierOrderId: row.supplier_order_id,
    closed: row.closed,
    used: row.used,
    version: row.version,
    facts: {
      grossMg: row.gross_mg,
      tareMg: row.tare_mg,
      netMg: row.net_mg,
      lot: row.lot,
      missing: row.missing,
      damage: row.damage,
    },
  };
  if (version !== undefined && version !== row.version) {
    throw stale('Somebody changed this bag meanwhile. Look at it again.', {
      version: row.version,
      ...bag.facts,
      closed: row.closed,
    });
  }
  return bag;
}
