import { execute, type Tx } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { clubToday } from '../ledger/clubDay.ts';

/** Records who bought how much of a reportable salt from the shelf. */
export async function writeSaleRecord(
  actor: ClubActor,
  sale: {
    id: string;
    membershipId: string;
    mg: number;
    stock: { saltId: string; lot: string; buyId: string };
  },
  tx: Tx,
): Promise<void> {
  await execute(
    `insert into precursor_records (club_id, buy_id, kind, salt_id, membership_id, legal_name, mg, lot, on_date,
        handed_by_id, sale_id, erase_after)
     values (:clubId, :buyId, 'handover', :saltId, :membershipId,
        (select coalesce(legal_name, display_name) from memberships where id = :membershipId),
        :mg, :lot, :onDate, :byId, :saleId,
        (:onDate::date + make_interval(months => (select precursor_months from clubs where id = :clubId)))::date)`,
    {
      clubId: actor.club.id,
      buyId: sale.stock.buyId,
      saltId: sale.stock.saltId,
      membershipId: sale.membershipId,
      mg: sale.mg,
      lot: sale.stock.lot,
      onDate: await clubToday(actor.club.id, tx),
      byId: actor.membershipId,
      saleId: sale.id,
    },
    tx,
  );
}

/** A sale that was taken back never happened; its record goes too. */
export async function eraseSaleRecord(saleId: string, tx: Tx): Promise<void> {
  await execute('delete from precursor_records where sale_id = :saleId', { saleId }, tx);
}
