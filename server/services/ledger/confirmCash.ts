import type { ConfirmCashBody, PaymentList } from '#shared/schemas/ledger.ts';
import { execute, select, transact } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { notFound, wrongState } from '../problem.ts';
import { checkNotAhead } from './clubDay.ts';
import { findPayments } from './findPayments.ts';
import { postTransaction } from './postTransaction.ts';
import { tellPaymentReceived } from './tellPayment.ts';

interface HeldRow {
  id: string;
  amount_minor: number;
  noted_by_id: string;
  noted_by_name: string;
  buy_id: string | null;
  confirmed_at: Date | null;
  reversed_at: Date | null;
}

/** The treasurer has the cash that others noted: it moves from "cash held by" them into the club's cash. */
export async function confirmCash(actor: ClubActor, body: ConfirmCashBody): Promise<PaymentList> {
  const { club } = actor;
  const ids = [...new Set(body.paymentIds)];
  return transact(async (tx) => {
    const rows = await select<HeldRow>(
      `select p.id, p.amount_minor, p.noted_by_id, n.display_name as noted_by_name, p.buy_id, p.confirmed_at, p.reversed_at
       from payments p join memberships n on n.id = p.noted_by_id
       where p.club_id = :clubId and p.id in (:ids) order by p.id for no key update of p`,
      { clubId: club.id, ids },
      tx,
    );
    if (rows.length !== ids.length) throw notFound('A payment');
    if (rows.some((row) => row.confirmed_at ?? row.reversed_at)) {
      throw wrongState('One of these is confirmed or reversed already. Nothing was changed.');
    }
    await checkNotAhead(club.id, body.receivedOn, 'receivedOn', tx);
    await execute(
      `update payments set confirmed_at = clock_timestamp(), confirmed_by_id = :byId where id in (:ids)`,
      { ids, byId: actor.membershipId },
      tx,
    );
    const payments = [];
    for (const row of rows) {
      await postTransaction(tx, {
        clubId: club.id,
        eventType: 'cash_confirmed',
        eventId: row.id,
        onDate: body.receivedOn,
        memo: `Cash handed over by ${row.noted_by_name}`,
        ...(row.buy_id ? { buyId: row.buy_id } : {}),
        by: byActor(actor),
        postings: [
          { account: { kind: 'cash' }, amountMinor: row.amount_minor },
          {
            account: { kind: 'cash_held', refId: row.noted_by_id },
            amountMinor: 0 - row.amount_minor,
          },
        ],
      });
      await writeAudit(tx, {
        clubId: club.id,
        ...(row.buy_id ? { buyId: row.buy_id } : {}),
        by: byActor(actor),
        action: 'ledger.cash_confirmed',
        subject: { type: 'payment', id: row.id },
        after: { heldBy: row.noted_by_name, private: { amountMinor: row.amount_minor } },
      });
      const [payment] = await findPayments(club.id, 'id', row.id, tx);
      if (!payment) throw new Error('payment missing');
      await tellPaymentReceived(club, payment, tx);
      payments.push(payment);
    }
    return { payments };
  });
}
