import type { Received } from '#shared/domain/buys/requests.ts';
import { costsOf } from '#shared/domain/orders/costs.ts';
import { select, type Tx } from '../../config/database.ts';
import { orderFacts } from './expectedShares.ts';
import { knownCosts } from './findBills.ts';
import { loadOrderBook } from './orderBook.ts';

/** A buy's real costs for the final share. */
export interface CostsOfBuy {
  /** Whether every supplier's bill is there; `reason` says what is missing. */
  readonly ready: boolean;
  readonly reason: string | null;
  /** For `shareRequestOf(terms, pledges, received, 'final')`, once `availableMg` is what was weighed. */
  readonly received: Received;
  /** What stays lost with a supplier, by member: added to their final share. */
  readonly lost: readonly { memberId: string; minor: number }[];
  /** Names of the charges by id. */
  readonly names: Readonly<Record<string, string>>;
  /** All of it; the buy's account once every bill is confirmed. */
  readonly totalMinor: number;
  /** What the club took to its losses, already taken off. */
  readonly clubLossMinor: number;
}

async function arrivedMg(buyId: string, tx?: Tx): Promise<Record<string, number> | null> {
  const rows = await select<{ line_id: string; mg: number | null }>(
    `select line_id, sum(case when missing then 0 else coalesce(net_mg, nominal_mg) end)::bigint as mg
     from bags where buy_id = :buyId group by line_id`,
    { buyId },
    tx,
  );
  return rows.length === 0
    ? null
    : Object.fromEntries(rows.map(({ line_id, mg }) => [line_id, mg ?? 0]));
}

/**
 * What the buy really costs, by line and charge, from the bills that were entered and not voided; supplier refunds and
 * the club's losses are taken off.
 */
export async function costsOfBuy(buyId: string, tx?: Tx): Promise<CostsOfBuy> {
  const book = await loadOrderBook(buyId, tx);
  const known = await knownCosts(buyId, tx);
  const costs = costsOf({
    ...known,
    orders: book.orders.map((order) => orderFacts(book.terms, order)),
    arrivedMg: await arrivedMg(buyId, tx),
    locked: book.sheet,
  });
  const names = new Map(book.terms.suppliers.map(({ id, name }) => [id, name]));
  const missing = costs.unbilled.map((id) => names.get(id) ?? '');
  return {
    ready: missing.length === 0,
    reason:
      missing.length === 0
        ? null
        : `The bill of ${missing.join(' and ')} is missing. Enter it under Orders first.`,
    received: costs.received,
    lost: costs.lost,
    names: costs.names,
    totalMinor: costs.totalMinor,
    clubLossMinor: known.losses.reduce((sum, { amountMinor }) => sum + amountMinor, 0),
  };
}
