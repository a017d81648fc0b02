import type { OrderPack } from '#shared/domain/orders/orderTypes.ts';
import { exactSum } from '#shared/domain/money/minor.ts';
import { apportion } from '#shared/domain/shares/apportion.ts';
import { shelfPriceMinor } from '#shared/domain/shelf/shelfPrice.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import type { Posting } from '../ledger/postTransaction.ts';
import { wrongState } from '../problem.ts';
import { saltsByIds } from '../salts/saltsOfClub.ts';
import { resalePostings } from './resalePostings.ts';

interface Lot {
  id: string;
  mg: number;
  cost_minor: number;
  price_minor_per_kg: number;
  owed_to_id: string | null;
}

/** Lots of an offer's salt that are for sale, under their locks: those at the offer's price first, then the oldest. */
async function lotsFor(clubId: string, pack: OrderPack, tx: Tx): Promise<Lot[]> {
  await select(
    `select id from shelf_stock where club_id = :clubId and salt_id = (select salt_id from offers where id = :offerId)
     order by id for update`,
    { clubId, offerId: pack.offerId },
    tx,
  );
  const lots = await select<Lot>(
    `select id, mg, cost_minor, price_minor_per_kg, owed_to_id from shelf_stock
     where club_id = :clubId and salt_id = (select salt_id from offers where id = :offerId)
       and price_minor_per_kg is not null and mg >= :packMg order by created_at, id`,
    { clubId, offerId: pack.offerId, packMg: pack.packMg },
    tx,
  );
  const atPrice = (lot: Lot) =>
    shelfPriceMinor(pack.packMg, lot.price_minor_per_kg) === pack.priceMinor;
  return [...lots.filter(atPrice), ...lots.filter((lot) => !atPrice(lot))];
}

async function refuseShort(clubId: string, pack: OrderPack, there: number, tx: Tx) {
  const [offer] = await select<{ salt_id: string }>(
    'select salt_id from offers where id = :offerId',
    { offerId: pack.offerId },
    tx,
  );
  const id = offer?.salt_id ?? '';
  const name = (await saltsByIds(clubId, [id], tx)).get(id)?.name ?? id;
  const packs = there === 1 ? '1 pack' : `${there} packs`;
  return wrongState(
    `The shelf has only ${packs} of ${name} left, and the plan takes ${pack.packs}. Choose other packs, or reopen the buy.`,
    { offerId: pack.offerId, packs: there },
  );
}

/**
 * Takes an order's packs from the lots on the shelf, whole packs of one lot each.
 * @returns what leaves the shelf in the books, and what is gained or lost on it; not the buy's own side
 * @throws DomainProblem 409 when less is left than the plan takes
 */
export async function drawFromShelf(
  buy: { id: string; clubId: string },
  order: { supplierId: string; packs: readonly OrderPack[] },
  tx: Tx,
): Promise<Posting[]> {
  const postings: Posting[] = [];
  for (const pack of order.packs) {
    const lots = await lotsFor(buy.clubId, pack, tx);
    let left = pack.packs;
    for (const lot of lots) {
      const packs = Math.min(left, Math.floor(lot.mg / pack.packMg));
      if (packs === 0) continue;
      left -= packs;
      const mg = packs * pack.packMg;
      const priceMinor = packs * pack.priceMinor;
      const [costMinor = 0] = apportion(lot.cost_minor, [mg, lot.mg - mg]);
      await execute(
        `insert into shelf_draws (buy_id, supplier_id, offer_id, stock_id, packs, mg, cost_minor, price_minor)
         values (:buyId, :supplierId, :offerId, :stockId, :packs, :mg, :costMinor, :priceMinor)`,
        {
          buyId: buy.id,
          supplierId: order.supplierId,
          offerId: pack.offerId,
          stockId: lot.id,
          packs,
          mg,
          costMinor,
          priceMinor,
        },
        tx,
      );
      await execute(
        `update shelf_stock set mg = mg - :mg, cost_minor = cost_minor - :costMinor, version = version + 1,
           updated_at = now() where id = :stockId`,
        { mg, costMinor, stockId: lot.id },
        tx,
      );
      postings.push(...resalePostings(lot.owed_to_id, priceMinor, costMinor));
    }
    if (left > 0) throw await refuseShort(buy.clubId, pack, pack.packs - left, tx);
  }
  return postings;
}

/** Puts back on the shelf what an order took from it. */
export async function returnToShelf(buyId: string, supplierId: string, tx: Tx): Promise<void> {
  const draws = await select<{ id: string; stock_id: string; mg: number; cost_minor: number }>(
    `select id, stock_id, mg, cost_minor from shelf_draws
     where buy_id = :buyId and supplier_id = :supplierId and returned_at is null order by stock_id, id for update`,
    { buyId, supplierId },
    tx,
  );
  for (const draw of draws) {
    await execute(
      `update shelf_stock set mg = mg + :mg, cost_minor = cost_minor + :costMinor, version = version + 1,
         updated_at = now() where id = :stockId`,
      { mg: draw.mg, costMinor: draw.cost_minor, stockId: draw.stock_id },
      tx,
    );
    await execute(
      'update shelf_draws set returned_at = clock_timestamp() where id = :id',
      { id: draw.id },
      tx,
    );
  }
}

/** What an order took from each lot, by offer, when all its packs came; null when it took nothing from the shelf. */
export async function lotsOfOrder(
  buyId: string,
  orderId: string,
  tx: Tx,
): Promise<Map<string, { mg: number; packs: number; lot: string }[]>> {
  const rows = await select<{ offer_id: string; mg: number; packs: number; lot: string }>(
    `select d.offer_id, d.mg, d.packs, s.lot from shelf_draws d join shelf_stock s on s.id = d.stock_id
     where d.buy_id = :buyId and d.returned_at is null
       and d.supplier_id = (select supplier_id from supplier_orders where id = :orderId) order by d.created_at, d.id`,
    { buyId, orderId },
    tx,
  );
  const found = new Map<string, { mg: number; packs: number; lot: string }[]>();
  for (const { offer_id: offerId, ...row } of rows)
    found.set(offerId, [...(found.get(offerId) ?? []), row]);
  return found;
}

/** Sums of postings by account, so that an entry names each once. */
export function mergePostings(postings: readonly Posting[]): Posting[] {
  const sums = new Map<string, Posting>();
  for (const posting of postings) {
    const key = JSON.stringify(posting.account);
    const before = sums.get(key)?.amountMinor ?? 0;
    sums.set(key, {
      ...posting,
      amountMinor: exactSum([before, posting.amountMinor], 'amountMinor'),
    });
  }
  return [...sums.values()].filter(({ amountMinor }) => amountMinor !== 0);
}
