import type { LossBody, RecordList } from '#shared/schemas/precursors.ts';
import { execute, select, transact, type Tx } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { clubToday } from '../ledger/clubDay.ts';
import { invalid } from '../problem.ts';
import { saltsByIds } from '../salts/saltsOfClub.ts';
import type { PortionOfMember } from './portionsOf.ts';

// How long the club keeps a record is its own setting.
const eraseAfter = `(:onDate::date + make_interval(months => (select precursor_months from clubs where id = :clubId)))::date`;

/** Records who received how much of each reportable salt, by lot, in the transaction that hands it over. */
export async function writeRecords(
  actor: ClubActor & { buy: { id: string } },
  to: { handoverId: string; membershipId: string },
  portions: readonly PortionOfMember[],
  tx: Tx,
): Promise<void> {
  const sums = new Map<string, { saltId: string; lot: string; mg: number }>();
  for (const { saltId, lot, mg } of portions) {
    const key = `${saltId}\n${lot}`;
    sums.set(key, { saltId, lot, mg: (sums.get(key)?.mg ?? 0) + mg });
  }
  const onDate = await clubToday(actor.club.id, tx);
  for (const { saltId, lot, mg } of sums.values()) {
    await execute(
      `insert into precursor_records (club_id, buy_id, kind, salt_id, membership_id, legal_name, mg, lot, on_date,
          handed_by_id, handover_id, erase_after)
       values (:clubId, :buyId, 'handover', :saltId, :membershipId,
          (select coalesce(legal_name, display_name) from memberships where id = :membershipId),
          :mg, :lot, :onDate, :byId, :handoverId, ${eraseAfter})`,
      {
        clubId: actor.club.id,
        buyId: actor.buy.id,
        saltId,
        lot,
        mg,
        membershipId: to.membershipId,
        onDate,
        byId: actor.membershipId,
        handoverId: to.handoverId,
      },
      tx,
    );
  }
}

/** A hand-over that was taken back never happened; its records go too. */
export async function eraseRecordsOf(handoverId: string, tx: Tx): Promise<void> {
  await execute(
    'delete from precursor_records where handover_id = :handoverId',
    { handoverId },
    tx,
  );
}

interface Row {
  id: string;
  kind: 'handover' | 'loss';
  buy_name: string;
  salt_id: string;
  legal_name: string;
  mg: number;
  lot: string;
  on_date: string;
  handed_by: string | null;
  note: string;
  reported_to: string;
  erase_after: string;
}

/** Records of the club, or of one buy, newest first. */
export async function listRecords(actor: ClubActor, buyId?: string): Promise<RecordList> {
  const rows = await select<Row>(
    `select r.id, r.kind, b.name as buy_name, r.salt_id, r.legal_name, r.mg, r.lot, r.on_date,
        h.display_name as handed_by, r.note, r.reported_to, r.erase_after
     from precursor_records r join buys b on b.id = r.buy_id left join memberships h on h.id = r.handed_by_id
     where r.club_id = :clubId ${buyId ? 'and r.buy_id = :buyId' : ''}
     order by r.on_date desc, r.created_at desc, r.id`,
    { clubId: actor.club.id, ...(buyId ? { buyId } : {}) },
  );
  const lines = await select<{ buy_id: string; buy_name: string; salt_id: string }>(
    `select b.id as buy_id, b.name as buy_name, l.salt_id from lines l join buys b on b.id = l.buy_id
     where b.club_id = :clubId and l.removed_at is null ${buyId ? 'and b.id = :buyId' : "and b.state not in ('draft', 'open', 'cancelled')"}
     order by b.created_at desc, b.id, l.position, l.id`,
    { clubId: actor.club.id, ...(buyId ? { buyId } : {}) },
  );
  const [club] = await select<{ months: number }>(
    'select precursor_months as months from clubs where id = :clubId',
    { clubId: actor.club.id },
  );
  const salts = await saltsByIds(actor.club.id, [
    ...new Set([...rows, ...lines].map((row) => row.salt_id)),
  ]);
  return {
    months: club?.months ?? 0,
    salts: lines.flatMap((row) => {
      const salt = salts.get(row.salt_id);
      return salt?.reportable
        ? [{ buyId: row.buy_id, buyName: row.buy_name, saltId: row.salt_id, salt: salt.name }]
        : [];
    }),
    records: rows.map((row) => ({
      id: row.id,
      kind: row.kind,
      buyName: row.buy_name,
      saltId: row.salt_id,
      salt: salts.get(row.salt_id)?.name ?? row.salt_id,
      legalName: row.legal_name,
      mg: row.mg,
      lot: row.lot,
      onDate: row.on_date,
      handedBy: row.handed_by,
      note: row.note,
      reportedTo: row.reported_to,
      eraseAfter: row.erase_after,
    })),
  };
}

/**
 * Writes down a loss or theft of a reportable salt, and where it was reported.
 * @throws DomainProblem 422 when the salt is no reportable line of the buy
 */
export async function recordLoss(
  actor: ClubActor & { buy: { id: string } },
  body: LossBody,
): Promise<RecordList> {
  await transact(async (tx) => {
    const salt = (await saltsByIds(actor.club.id, [body.saltId], tx)).get(body.saltId);
    const [line] = await select<{ id: string }>(
      'select id from lines where buy_id = :buyId and salt_id = :saltId and removed_at is null',
      { buyId: actor.buy.id, saltId: body.saltId },
      tx,
    );
    if (!line || !salt?.reportable)
      throw invalid({ saltId: 'Choose a reportable salt of this buy.' });
    await execute(
      `insert into precursor_records (club_id, buy_id, kind, salt_id, mg, lot, on_date, handed_by_id, note, reported_to, erase_after)
       values (:clubId, :buyId, 'loss', :saltId, :mg, :lot, :onDate, :byId, :note, :reportedTo, ${eraseAfter})`,
      {
        clubId: actor.club.id,
        buyId: actor.buy.id,
        byId: actor.membershipId,
        saltId: body.saltId,
        mg: body.mg,
        lot: body.lot,
        onDate: body.onDate,
        note: body.note,
        reportedTo: body.reportedTo,
      },
      tx,
    );
    await writeAudit(tx, {
      clubId: actor.club.id,
      buyId: actor.buy.id,
      by: byActor(actor),
      action: 'precursors.loss',
      subject: { type: 'salt', id: body.saltId },
      after: { mg: body.mg, onDate: body.onDate, reportedTo: body.reportedTo },
    });
  });
  return listRecords(actor, actor.buy.id);
}

/** Erases records whose time is over, in each club's own calendar, and legal names that no record needs any more. */
export async function eraseOldRecords(): Promise<void> {
  await transact(async (tx) => {
    await execute(
      `delete from precursor_records r using clubs c
       where c.id = r.club_id and r.erase_after < (now() at time zone c.time_zone)::date`,
      {},
      tx,
    );
    await execute(
      `update memberships m set legal_name = null where legal_name is not null and not exists (
         select 1 from precursor_records r where r.membership_id = m.id)
       and not exists (select 1 from portions p where p.membership_id = m.id and p.handed_over_at is null and p.state = 'done')`,
      {},
      tx,
    );
  });
}
