import { select, type Tx } from '../../config/database.ts';
import { canSellFromShelf } from '../../policies/pickup.ts';
import type { ClubActor } from '../actors.ts';
import { DomainProblem, notFound } from '../problem.ts';
import { helpsAtAnyBuy } from './helpsAtAnyBuy.ts';

/** One lot on the shelf, as it is stored. */
export interface StockRow {
  id: string;
  salt_id: string;
  lot: string;
  buy_id: string | null;
  buy_name: string | null;
  origin: 'left_over' | 'unclaimed';
  mg: number;
  cost_minor: number;
  price_minor_per_kg: number | null;
  owed_to_id: string | null;
  version: number;
}

/** Whether the actor may sell today. */
export async function maySell(actor: ClubActor): Promise<boolean> {
  return canSellFromShelf(actor, await helpsAtAnyBuy(actor));
}

/** @throws DomainProblem 403 for whoever neither organises nor helps today */
export async function requireSeller(actor: ClubActor): Promise<void> {
  if (!(await maySell(actor))) {
    throw new DomainProblem(403, 'forbidden', 'Organisers and helpers sell from the shelf.');
  }
}

/** A lot under its row lock. */
export async function lockedStock(clubId: string, stockId: string, tx: Tx): Promise<StockRow> {
  const [row] = await select<StockRow>(
    `select id, salt_id, lot, buy_id, null as buy_name, origin, mg, cost_minor, price_minor_per_kg, owed_to_id, version
     from shelf_stock where id = :stockId and club_id = :clubId for update`,
    { stockId, clubId },
    tx,
  );
  if (!row) throw notFound('This lot');
  return row;
}
