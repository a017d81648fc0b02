import type { BillCharge, BillFacts, BillGoods } from '#shared/domain/orders/orderTypes.ts';
import { select, type Tx } from '../../config/database.ts';
import type { KnownCosts } from './expectedShares.ts';

/** A bill's row, with the names of those who had to do with it. */
export interface BillRow {
  readonly id: string;
  readonly version: number;
  readonly supplierId: string | null;
  readonly payee: string;
  readonly number: string;
  readonly billedOn: string;
  readonly goods: BillGoods[];
  readonly charges: BillCharge[];
  readonly goodsMinor: number;
  readonly chargesMinor: number;
  readonly taxMinor: number;
  readonly totalMinor: number;
  readonly paidBy: 'club' | 'member';
  readonly advancedById: string | null;
  readonly advancedByName: string | null;
  readonly enteredById: string;
  readonly enteredByName: string;
  readonly confirmedById: string | null;
  readonly confirmedByName: string | null;
  readonly confirmedAt: Date | null;
  readonly voidedAt: Date | null;
  readonly voidedReason: string | null;
}

/** All bills of a buy, voided ones too, in the order in which they were entered. */
export async function findBills(buyId: string, tx?: Tx): Promise<BillRow[]> {
  return select<BillRow>(
    `select x.id, x.version, o.supplier_id as "supplierId", x.payee, x.number, x.billed_on as "billedOn",
        x.lines as goods, x.charges, x.goods_minor as "goodsMinor", x.charges_minor as "chargesMinor",
        x.tax_minor as "taxMinor", x.total_minor as "totalMinor", x.paid_by as "paidBy",
        x.advanced_by_id as "advancedById", a.display_name as "advancedByName", x.entered_by_id as "enteredById",
        e.display_name as "enteredByName", x.confirmed_by_id as "confirmedById", c.display_name as "confirmedByName",
        x.confirmed_at as "confirmedAt", x.voided_at as "voidedAt", x.voided_reason as "voidedReason"
     from bills x left join supplier_orders o on o.id = x.supplier_order_id
     left join memberships a on a.id = x.advanced_by_id join memberships e on e.id = x.entered_by_id
     left join memberships c on c.id = x.confirmed_by_id
     where x.buy_id = :buyId order by x.created_at, x.id`,
    { buyId },
    tx,
  );
}

/** Bills, supplier refunds and losses that count: neither voided nor reversed. */
export async function knownCosts(buyId: string, tx?: Tx): Promise<KnownCosts> {
  const rows = await findBills(buyId, tx);
  const bills = rows
    .filter(({ voidedAt }) => voidedAt === null)
    .map(({ id, supplierId, goods, charges, taxMinor }): BillFacts => ({
      id,
      supplierId,
      goods,
      charges,
      taxMinor,
    }));
  const refunds = await select<KnownCosts['refunds'][number]>(
    `select r.id, o.supplier_id as "supplierId", r.amount_minor as "amountMinor"
     from supplier_refunds r join supplier_orders o on o.id = r.supplier_order_id
     where r.buy_id = :buyId and r.reversed_at is null order by r.created_at, r.id`,
    { buyId },
    tx,
  );
  const losses = await select<KnownCosts['losses'][number]>(
    `select l.id, o.supplier_id as "supplierId", l.amount_minor as "amountMinor"
     from buy_losses l left join supplier_orders o on o.id = l.supplier_order_id
     where l.buy_id = :buyId and l.reversed_at is null order by l.created_at, l.id`,
    { buyId },
    tx,
  );
  return { bills, refunds, losses };
}
