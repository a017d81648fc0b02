import type { SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import { offerPriceMinor } from '#shared/domain/buys/boughtPacks.ts';
import type { OrderPack, OrderState } from '#shared/domain/orders/orderTypes.ts';
import type { PackPlan } from '#shared/domain/packs/packTypes.ts';
import { compareIds } from '#shared/domain/shares/pledgeOrder.ts';
import type { ShareSheet } from '#shared/domain/shares/shareTypes.ts';
import { select, type Tx } from '../../config/database.ts';
import type { BookMember, BookOrder, OrderBook } from '../../presenters/orders/book.ts';
import { loadPledges } from '../buys/loadSheetTerms.ts';
import { wrongState } from '../problem.ts';

export type { BookMember, BookOrder, OrderBook };

interface SnapshotRow {
  terms: SheetTerms;
  plan: PackPlan;
  sheet: ShareSheet;
}

interface OrderRow {
  id: string;
  supplier_id: string;
  state: OrderState;
  version: number;
  packs: OrderPack[];
  shipping_minor: number;
  quoted_at: Date | null;
  quote_stands: boolean;
  reference: string;
  note: string;
  placed_on: string | null;
  placed_by: string | null;
}

/** The packs that a plan buys from each supplier, at the terms' prices, by supplier id. */
export function packsBySupplier(terms: SheetTerms, plan: PackPlan): Map<string, OrderPack[]> {
  const found = new Map<string, OrderPack[]>();
  const offers = [...terms.offers].sort((a, b) => compareIds(a.id, b.id));
  for (const offer of offers) {
    const packs = plan.packs[offer.id] ?? 0;
    if (packs === 0) continue;
    const own = found.get(offer.supplierId) ?? [];
    own.push({
      offerId: offer.id,
      lineId: offer.lineId,
      packs,
      packMg: offer.packMg,
      priceMinor: offerPriceMinor(offer),
    });
    found.set(offer.supplierId, own);
  }
  return found;
}

async function loadMembers(buyId: string, tx?: Tx): Promise<Map<string, BookMember>> {
  const rows = await select<BookMember>(
    `select m.membership_id as id, p.display_name as name, p.is_guest as guest,
        coalesce(m.locked_minor, 0) as "lockedMinor", coalesce(m.due_minor, 0) as "dueMinor",
        m.final_minor as "finalMinor", m.dropped_at is not null as dropped,
        case when m.vouched_at is not null then v.display_name end as "vouchedBy",
        case when m.vouched_at is not null then m.vouched_reason end as "vouchedReason",
        m.over_limit_minor as "overLimitMinor", m.agreed_at is not null as agreed,
        m.due_reminded_at as "remindedAt"
     from buy_members m join memberships p on p.id = m.membership_id
     left join memberships v on v.id = m.vouched_by_id
     where m.buy_id = :buyId order by lower(p.display_name), p.id`,
    { buyId },
    tx,
  );
  return new Map(rows.map((row) => [row.id, row]));
}

/** A draft follows the plan; prices quoted since the lock stay with their packs, and a quoted shipping with the very order. */
function draftOf(
  row: OrderRow,
  planned: readonly OrderPack[],
  plannedShippingMinor: number,
): Pick<BookOrder, 'packs' | 'shippingMinor'> {
  if (!row.quote_stands) return { packs: planned, shippingMinor: plannedShippingMinor };
  const quoted = new Map(row.packs.map((pack) => [pack.offerId, pack]));
  const same =
    planned.length === row.packs.length &&
    planned.every((pack) => quoted.get(pack.offerId)?.packs === pack.packs);
  return {
    packs: planned.map((pack) => ({
      ...pack,
      priceMinor: quoted.get(pack.offerId)?.priceMinor ?? pack.priceMinor,
    })),
    shippingMinor: same ? row.shipping_minor : plannedShippingMinor,
  };
}

async function loadOrders(
  buyId: string,
  terms: SheetTerms,
  plan: PackPlan,
  tx?: Tx,
): Promise<BookOrder[]> {
  const rows = await select<OrderRow>(
    `select o.id, o.supplier_id, o.state, o.version, o.packs, o.shipping_minor, o.quoted_at,
        coalesce(o.quoted_at >= b.locked_at, false) as quote_stands, o.reference, o.note,
        o.placed_on, m.display_name as placed_by
     from supplier_orders o join buys b on b.id = o.buy_id left join memberships m on m.id = o.placed_by_id where o.buy_id = :buyId`,
    { buyId },
    tx,
  );
  const planned = packsBySupplier(terms, plan);
  const saved = new Map(rows.map((row) => [row.supplier_id, row]));
  const names = new Map(terms.suppliers.map(({ id, name }) => [id, name]));
  // A draft that the plan no longer needs is not an order any more.
  const ids = [...new Set([...planned.keys(), ...saved.keys()])].filter(
    (id) => planned.has(id) || saved.get(id)?.state !== 'draft',
  );
  return ids
    .sort(
      (a, b) => (names.get(a) ?? '').localeCompare(names.get(b) ?? '', 'en') || compareIds(a, b),
    )
    .map((supplierId): BookOrder => {
      const row = saved.get(supplierId);
      if (!row) {
        return {
          id: null,
          supplierId,
          state: 'draft',
          version: 0,
          packs: planned.get(supplierId) ?? [],
          shippingMinor: plan.shippingBySupplier[supplierId] ?? 0,
          quotedAt: null,
          reference: '',
          note: '',
          placedOn: null,
          placedBy: null,
        };
      }
      const { packs, shippingMinor } =
        row.state === 'draft'
          ? draftOf(row, planned.get(supplierId) ?? [], plan.shippingBySupplier[supplierId] ?? 0)
          : { packs: row.packs, shippingMinor: row.shipping_minor };
      return {
        id: row.id,
        supplierId,
        state: row.state,
        version: row.version,
        packs,
        shippingMinor,
        quotedAt: row.quote_stands ? row.quoted_at : null,
        reference: row.reference,
        note: row.note,
        placedOn: row.placed_on,
        placedBy: row.placed_by,
      };
    });
}

/**
 * The newest estimate of a buy that was locked, with its orders and members.
 * @throws DomainProblem 409 `wrong_state` when it was never locked
 */
export async function loadOrderBook(buyId: string, tx?: Tx): Promise<OrderBook> {
  const [snapshot] = await select<SnapshotRow>(
    `select terms, plan, sheet from snapshots where buy_id = :buyId and kind = 'estimate' and terms is not null
     order by created_at desc limit 1`,
    { buyId },
    tx,
  );
  if (!snapshot) throw wrongState('This buy is not locked yet.');
  const { terms, plan, sheet } = snapshot;
  const [pledges, orders, members] = [
    await loadPledges(buyId, tx),
    await loadOrders(buyId, terms, plan, tx),
    await loadMembers(buyId, tx),
  ];
  return { terms, pledges, plan, sheet, orders, members };
}

/**
 * The order with a supplier.
 * @throws DomainProblem 409 when the plan buys nothing there
 */
export function orderWith(book: OrderBook, supplierId: string): BookOrder {
  const order = book.orders.find((each) => each.supplierId === supplierId);
  if (!order) throw wrongState('Nothing is ordered from this supplier.');
  return order;
}
