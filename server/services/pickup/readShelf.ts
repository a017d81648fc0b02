import { hazardText } from '#shared/domain/salts/hazards.ts';
import type { Shelf } from '#shared/schemas/shelf.ts';
import { select, type Tx } from '../../config/database.ts';
import { canPriceShelf } from '../../policies/pickup.ts';
import type { ClubActor } from '../actors.ts';
import { saltsByIds } from '../salts/saltsOfClub.ts';
import { maySell, type StockRow } from './shelfStock.ts';

/** What lies on the shelf; for those who sell, also the latest sales and who can buy. */
export async function readShelf(actor: ClubActor, tx?: Tx): Promise<Shelf> {
  const clubId = actor.club.id;
  const sell = await maySell(actor);
  const rows = await select<StockRow>(
    `select s.id, s.salt_id, s.lot, s.buy_id, b.name as buy_name, s.origin, s.mg, s.cost_minor, s.price_minor_per_kg,
        s.owed_to_id, s.version
     from shelf_stock s left join buys b on b.id = s.buy_id
     where s.club_id = :clubId and s.mg > 0 order by s.salt_id, s.created_at, s.id`,
    { clubId },
    tx,
  );
  const sales = sell
    ? await select<{
        id: string;
        salt_id: string;
        lot: string;
        name: string;
        mg: number;
        price_minor: number;
        sold_by: string;
        sold_by_id: string;
        created_at: Date;
        undone_at: Date | null;
      }>(
        `select x.id, s.salt_id, s.lot, m.display_name as name, x.mg, x.price_minor, o.display_name as sold_by, x.sold_by_id,
            x.created_at, x.undone_at
         from shelf_sales x join shelf_stock s on s.id = x.stock_id join memberships m on m.id = x.membership_id
         join memberships o on o.id = x.sold_by_id
         where x.club_id = :clubId order by x.created_at desc, x.id limit 100`,
        { clubId },
        tx,
      )
    : [];
  const people = sell
    ? await select<{
        id: string;
        name: string;
        is_guest: boolean;
        legal_name: string | null;
        confirmed: string[];
      }>(
        `select m.id, m.display_name as name, m.is_guest, m.legal_name,
            coalesce((select json_agg(h.salt_id) from hazard_confirmations h where h.membership_id = m.id
              and (not m.is_guest or h.on_paper_by_id is not null)), '[]'::json) as confirmed
         from memberships m where m.club_id = :clubId and m.status = 'active' order by lower(m.display_name), m.id`,
        { clubId },
        tx,
      )
    : [];
  const salts = await saltsByIds(
    clubId,
    [...new Set([...rows, ...sales].map((row) => row.salt_id))],
    tx,
  );
  return {
    stock: rows.map((row) => {
      const salt = salts.get(row.salt_id);
      return {
        id: row.id,
        saltId: row.salt_id,
        salt: salt?.name ?? row.salt_id,
        formula: salt?.formula ?? null,
        signalWord: salt?.signalWord ?? null,
        hazards: salt?.statements.map(hazardText) ?? [],
        classified: salt?.classified ?? false,
        reportable: salt?.reportable ?? false,
        lot: row.lot,
        buyName: row.buy_name,
        origin: row.origin,
        mg: row.mg,
        priceMinorPerKg: row.price_minor_per_kg,
        version: row.version,
      };
    }),
    sales: sales.map((row) => ({
      id: row.id,
      salt: salts.get(row.salt_id)?.name ?? row.salt_id,
      lot: row.lot,
      name: row.name,
      mg: row.mg,
      priceMinor: row.price_minor,
      soldBy: row.sold_by,
      at: row.created_at.toISOString(),
      undone: row.undone_at !== null,
      mayUndo:
        row.undone_at === null && (actor.roles.organiser || row.sold_by_id === actor.membershipId),
    })),
    people: people.map((row) => ({
      membershipId: row.id,
      name: row.name,
      isGuest: row.is_guest,
      legalNameKnown: !!row.legal_name,
      confirmed: row.confirmed,
    })),
    may: { price: canPriceShelf(actor), sell },
  };
}
