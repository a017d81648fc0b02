import { apportion } from '#shared/domain/shares/apportion.ts';
import { shelfPriceMinor } from '#shared/domain/shelf/shelfPrice.ts';
import type { SaleBody, Shelf } from '#shared/schemas/shelf.ts';
import { execute, select, transact, type Tx } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { clubToday } from '../ledger/clubDay.ts';
import { postTransaction, type Posting } from '../ledger/postTransaction.ts';
import { invalid, wrongState } from '../problem.ts';
import { saltsByIds } from '../salts/saltsOfClub.ts';
import { readShelf } from './readShelf.ts';
import { resalePostings } from './resalePostings.ts';
import { writeSaleRecord } from './saleRecords.ts';
import { lockedStock, requireSeller, type StockRow } from './shelfStock.ts';
import { syncShelfSupplier } from './syncShelfSupplier.ts';

async function requireBuyer(stock: StockRow, body: SaleBody, actor: ClubActor, tx: Tx) {
  const [buyer] = await select<{
    name: string;
    is_guest: boolean;
    legal_name: string | null;
    confirmed: boolean;
  }>(
    `select display_name as name, is_guest, legal_name, exists (select 1 from hazard_confirmations h
        where h.membership_id = m.id and h.salt_id = :saltId and (not m.is_guest or h.on_paper_by_id is not null)) as confirmed
     from memberships m where id = :membershipId and club_id = :clubId and status = 'active' for update`,
    { membershipId: body.membershipId, clubId: actor.club.id, saltId: stock.salt_id },
    tx,
  );
  if (!buyer) throw invalid({ membershipId: 'Choose a member or guest of this club.' });
  const salt = (await saltsByIds(actor.club.id, [stock.salt_id], tx)).get(stock.salt_id);
  if (salt?.classified && !buyer.confirmed) {
    if (!body.paperSigned) {
      throw invalid({
        paperSigned: `${buyer.name} first reads and signs the cautions of ${salt.name}.`,
      });
    }
    await execute(
      `insert into hazard_confirmations (membership_id, salt_id, on_paper_by_id) values (:membershipId, :saltId, :byId)
       on conflict (membership_id, salt_id) do update set on_paper_by_id = excluded.on_paper_by_id`,
      { membershipId: body.membershipId, saltId: stock.salt_id, byId: actor.membershipId },
      tx,
    );
  }
  if (salt?.reportable && !buyer.legal_name) {
    if (!body.legalName)
      throw invalid({ legalName: 'This salt is recorded with the full legal name. Ask for it.' });
    await execute(
      'update memberships set legal_name = :legalName, updated_at = now() where id = :membershipId',
      { legalName: body.legalName, membershipId: body.membershipId },
      tx,
    );
  }
  return { name: buyer.name, salt };
}

/** What goes where: the buyer owes the price; the lot's cost leaves the shelf; the rest is the club's, or its loss. */
function postings(
  stock: StockRow,
  body: SaleBody,
  priceMinor: number,
): { list: Posting[]; costMinor: number } {
  const [costMinor = 0] = apportion(stock.cost_minor, [body.mg, stock.mg - body.mg]);
  const buyer: Posting = {
    account: { kind: 'member', refId: body.membershipId },
    amountMinor: priceMinor,
  };
  return { costMinor, list: [buyer, ...resalePostings(stock.owed_to_id, priceMinor, costMinor)] };
}

/**
 * Sells some of a lot at its set price, on the buyer's account. Sending it again changes nothing.
 * @throws DomainProblem 403, 409 when less is left or no price is set, 422 for a missing confirmation or legal name
 */
export async function sellFromShelf(
  actor: ClubActor,
  stockId: string,
  body: SaleBody,
): Promise<Shelf> {
  await requireSeller(actor);
  return transact(async (tx) => {
    const stock = await lockedStock(actor.club.id, stockId, tx);
    const [known] = await select<{ id: string }>(
      'select id from shelf_sales where id = :id',
      { id: body.id },
      tx,
    );
    if (known) return readShelf(actor, tx);
    if (stock.price_minor_per_kg === null) throw wrongState('No price is set for this lot yet.');
    if (body.mg > stock.mg) {
      throw wrongState('Less than that is left of this lot.', { mg: stock.mg });
    }
    const { name, salt } = await requireBuyer(stock, body, actor, tx);
    const priceMinor = shelfPriceMinor(body.mg, stock.price_minor_per_kg);
    const { list, costMinor } = postings(stock, body, priceMinor);
    await execute(
      `insert into shelf_sales (id, club_id, stock_id, membership_id, mg, price_minor, cost_minor, sold_by_id)
       values (:id, :clubId, :stockId, :membershipId, :mg, :priceMinor, :costMinor, :byId)`,
      {
        id: body.id,
        clubId: actor.club.id,
        stockId,
        membershipId: body.membershipId,
        mg: body.mg,
        priceMinor,
        costMinor,
        byId: actor.membershipId,
      },
      tx,
    );
    await execute(
      `update shelf_stock set mg = mg - :mg, cost_minor = cost_minor - :costMinor, version = version + 1, updated_at = now()
       where id = :stockId`,
      { mg: body.mg, costMinor, stockId },
      tx,
    );
    await postTransaction(tx, {
      clubId: actor.club.id,
      eventType: 'shelf_sale',
      eventId: body.id,
      onDate: await clubToday(actor.club.id, tx),
      memo: `${salt?.name ?? stock.salt_id} from the shelf to ${name}`,
      by: byActor(actor),
      postings: list,
    });
    if (salt?.reportable && stock.buy_id) {
      await writeSaleRecord(
        actor,
        { ...body, stock: { saltId: stock.salt_id, lot: stock.lot, buyId: stock.buy_id } },
        tx,
      );
    }
    await writeAudit(tx, {
      clubId: actor.club.id,
      by: byActor(actor),
      action: 'shelf.sell',
      subject: { type: 'shelf_stock', id: stockId },
      after: { to: name, mg: body.mg, private: { priceMinor } },
    });
    await syncShelfSupplier(actor.club, byActor(actor), tx);
    return readShelf(actor, tx);
  });
}
