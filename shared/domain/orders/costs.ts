import { shippingChargeId } from '../buys/boughtPacks.ts';
import type { Received } from '../buys/requests.ts';
import { exactSum } from '../money/minor.ts';
import { apportion } from '../shares/apportion.ts';
import type { ChargeBasis, ShareCharge, ShareSheet } from '../shares/shareTypes.ts';
import { billTaxes, effectiveRate } from './billTaxes.ts';
import {
  goodsOf,
  isPlaced,
  type BillFacts,
  type BuyLossFacts,
  type OrderFacts,
  type SupplierRefundFacts,
} from './orderTypes.ts';

/** Everything that a buy's real costs follow from. */
export interface CostFacts {
  readonly orders: readonly OrderFacts[];
  readonly bills: readonly BillFacts[];
  readonly refunds: readonly SupplierRefundFacts[];
  readonly losses: readonly BuyLossFacts[];
  /** Net milligrams that came, by line; null before the bags are counted. */
  readonly arrivedMg: Readonly<Record<string, number>> | null;
  /** The shares as they were locked: what stays lost is borne in proportion to them. */
  readonly locked: Pick<ShareSheet, 'members'>;
}

/** What a buy really costs, ready to be shared out. */
export interface BuyCosts {
  /** For `shareRequestOf`; `availableMg` is what was ordered and did not fail. */
  readonly received: Received;
  /** What stays lost with a supplier, for each member; added to their share. */
  readonly lost: { memberId: string; minor: number }[];
  /** Names of the charges by id, for slips. */
  readonly names: Record<string, string>;
  /** All of it: lines, charges and what stays lost. */
  readonly totalMinor: number;
  /** Suppliers whose bill is missing, so that the order's prices stand in. */
  readonly unbilled: string[];
}

type LineCost = { availableMg: number; costMinor: number; taxMinor: number };

class Tally {
  readonly lines = new Map<string, LineCost>();
  readonly charges: ShareCharge[] = [];
  readonly names: Record<string, string> = {};

  line(lineId: string): LineCost {
    const known = this.lines.get(lineId) ?? { availableMg: 0, costMinor: 0, taxMinor: 0 };
    this.lines.set(lineId, known);
    return known;
  }

  charge(
    id: string,
    name: string,
    amountMinor: number,
    rest: { basis: ChargeBasis; lineIds: readonly string[] | null; taxMinor?: number },
  ): void {
    if (amountMinor === 0) return;
    const taxRate = effectiveRate(amountMinor, rest.taxMinor ?? 0);
    this.names[id] = name;
    this.charges.push({
      id,
      amountMinor,
      basis: rest.basis,
      taxRate,
      ...(rest.lineIds ? { lineIds: [...rest.lineIds] } : {}),
    });
  }
}

function bear(
  lostMinor: number,
  lineIds: ReadonlySet<string>,
  locked: CostFacts['locked'],
  lost: Map<string, number>,
): void {
  if (lostMinor === 0) return;
  const own = locked.members.map(({ lines }) =>
    lines.reduce((sum, line) => sum + (lineIds.has(line.lineId) ? line.costMinor : 0), 0),
  );
  const totals = locked.members.map(({ totalMinor }) => Math.max(0, totalMinor));
  const weights =
    [own, totals].find((list) => list.some((weight) => weight > 0)) ?? totals.map(() => 1);
  apportion(lostMinor, weights).forEach((part, index) => {
    const memberId = locked.members[index]?.memberId ?? '';
    lost.set(memberId, (lost.get(memberId) ?? 0) + part);
  });
}

const sumOf = (rows: readonly { amountMinor: number }[]) =>
  rows.reduce((sum, { amountMinor }) => sum + amountMinor, 0);

/** One supplier's part: its bills, or its order's prices while no bill is there. */
function addSupplier(
  order: OrderFacts,
  facts: CostFacts,
  tally: Tally,
  lost: Map<string, number>,
): boolean {
  const { supplierId } = order;
  const bills = facts.bills.filter((bill) => bill.supplierId === supplierId);
  const failed = order.state === 'failed';
  const lineIds = [...new Set(order.packs.map(({ lineId }) => lineId))];
  const came = (lineId: string) =>
    !failed && (facts.arrivedMg === null || (facts.arrivedMg[lineId] ?? 0) > 0);
  const living = lineIds.filter(came);
  let lostMinor = 0;
  const gone = new Set(lineIds.filter((lineId) => !came(lineId)));

  const goods = (lineId: string, amountMinor: number, taxMinor: number) => {
    if (gone.has(lineId) || !came(lineId)) {
      lostMinor += amountMinor;
      return;
    }
    const line = tally.line(lineId);
    line.costMinor += amountMinor;
    line.taxMinor += taxMinor;
  };

  for (const pack of order.packs) {
    if (!failed) tally.line(pack.lineId).availableMg += pack.packs * pack.packMg;
  }
  // A bill of charges alone, such as customs duty, doesn't say what the goods cost.
  const billed = order.isShelf || failed || bills.some((bill) => bill.goods.length > 0);
  if (!billed || order.isShelf) {
    for (const pack of order.packs) goods(pack.lineId, pack.packs * pack.priceMinor, 0);
    const id = shippingChargeId(supplierId);
    if (living.length === 0) lostMinor += order.shippingMinor;
    else
      tally.charge(id, 'Shipping', order.shippingMinor, {
        basis: order.shippingBasis,
        lineIds: living,
      });
  }
  for (const bill of bills) {
    const taxes = billTaxes(bill);
    bill.goods.forEach((row, index) => goods(row.lineId, row.amountMinor, taxes[index] ?? 0));
    bill.charges.forEach((row, index) => {
      if (living.length === 0) {
        lostMinor += row.amountMinor;
        return;
      }
      tally.charge(`bill:${bill.id}:${index}`, row.name, row.amountMinor, {
        basis: row.basis,
        lineIds: living,
        taxMinor: taxes[bill.goods.length + index] ?? 0,
      });
    });
  }

  // What came back, or is the club's loss, lowers first what is lost, then what the others pay.
  const back = [
    ...facts.refunds
      .filter((refund) => refund.supplierId === supplierId)
      .map((refund) => ({ ...refund, id: `refund:${refund.id}`, name: 'Refund of the supplier' })),
    ...facts.losses
      .filter((loss) => loss.supplierId === supplierId)
      .map((loss) => ({ ...loss, id: `loss:${loss.id}`, name: 'Borne by the club' })),
  ];
  for (const { id, name, amountMinor } of back) {
    const covers =
      living.length === 0 ? amountMinor : Math.min(amountMinor, Math.max(0, lostMinor));
    lostMinor -= covers;
    tally.charge(id, name, 0 - (amountMinor - covers), { basis: 'value', lineIds: living });
  }
  bear(lostMinor, gone.size > 0 ? gone : new Set(lineIds), facts.locked, lost);
  return billed;
}

/**
 * What a buy really costs: each supplier's bills (or its order's prices while none is there), other bills, less refunds
 * and what the club takes to its losses. What stays lost with a supplier of whom nothing came is borne by the members of
 * its lines in proportion to what they locked there.
 *
 * The sum of lines, charges and lost parts is that of the bills less refunds and losses, always.
 */
export function costsOf(facts: CostFacts): BuyCosts {
  const tally = new Tally();
  const lost = new Map<string, number>();
  const unbilled: string[] = [];
  for (const order of facts.orders) {
    if (!isPlaced(order.state) && order.state !== 'failed') continue;
    if (!addSupplier(order, facts, tally, lost)) unbilled.push(order.supplierId);
  }
  for (const bill of facts.bills.filter(({ supplierId }) => supplierId === null)) {
    const taxes = billTaxes(bill);
    bill.charges.forEach((row, index) => {
      tally.charge(`bill:${bill.id}:${index}`, row.name, row.amountMinor, {
        basis: row.basis,
        lineIds: row.lineIds,
        taxMinor: taxes[index] ?? 0,
      });
    });
  }
  for (const loss of facts.losses.filter(({ supplierId }) => supplierId === null)) {
    tally.charge(`loss:${loss.id}`, 'Borne by the club', 0 - loss.amountMinor, {
      basis: 'value',
      lineIds: null,
    });
  }
  const lines: Received['lines'] = {};
  for (const [lineId, { availableMg, costMinor, taxMinor }] of tally.lines) {
    lines[lineId] = { availableMg, costMinor, taxRate: effectiveRate(costMinor, taxMinor) };
  }
  const parts = [...lost].map(([memberId, minor]) => ({ memberId, minor }));
  return {
    received: { lines, charges: tally.charges },
    lost: parts.filter(({ minor }) => minor !== 0),
    names: tally.names,
    totalMinor: exactSum(
      [
        ...Object.values(lines).map(({ costMinor }) => costMinor),
        ...tally.charges.map(({ amountMinor }) => amountMinor),
        ...parts.map(({ minor }) => minor),
      ],
      'totalMinor',
    ),
    unbilled,
  };
}

/** Sum of what counts in the books for these facts: bills and shelf orders, less refunds and losses. */
export function bookedMinor(
  facts: Pick<CostFacts, 'orders' | 'bills' | 'refunds' | 'losses'>,
): number {
  const shelf = facts.orders
    .filter((order) => order.isShelf && isPlaced(order.state))
    .map((order) => ({ amountMinor: goodsOf(order.packs) + order.shippingMinor }));
  const bills = facts.bills.flatMap(({ goods, charges }) => [...goods, ...charges]);
  return sumOf([...bills, ...shelf]) - sumOf(facts.refunds) - sumOf(facts.losses);
}
