import type { PaymentReply } from '#shared/schemas/ledger.ts';
import { execute, select, transact } from '../../config/database.ts';
import type { BuyActor, ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { forbidden, notFound, wrongState } from '../problem.ts';
import { clubToday } from './clubDay.ts';
import { findPayments } from './findPayments.ts';
import { reverseTransaction, transactionsOf } from './reverseTransaction.ts';
import { tellPaymentPages } from './tellPayers.ts';
import { tellReversal } from './tellPayment.ts';

interface PaymentState {
  membership_id: string;
  buy_id: string | null;
  noted_by_id: string;
  confirmed_at: Date | null;
  reversed_at: Date | null;
}

async function reverse(
  actor: ClubActor,
  paymentId: string,
  reason: string,
  check: (row: PaymentState) => void,
): Promise<PaymentReply> {
  const { club } = actor;
  return transact(async (tx) => {
    const [row] = await select<PaymentState>(
      `select membership_id, buy_id, noted_by_id, confirmed_at, reversed_at from payments
       where id = :paymentId and club_id = :clubId for no key update`,
      { paymentId, clubId: club.id },
      tx,
    );
    if (!row) throw notFound('This payment');
    check(row);
    if (row.reversed_at) throw wrongState('This entry is reversed already.');
    const onDate = await clubToday(club.id, tx);
    const events = [
      ['cash_confirmed', paymentId],
      ['payment', paymentId],
    ] as const;
    for (const transactionId of await transactionsOf(club.id, events, tx)) {
      await reverseTransaction(tx, { transactionId, onDate, reason, by: byActor(actor) });
    }
    await execute(
      `update payments set reversed_at = clock_timestamp(), reversed_by_id = :byId, reversed_reason = :reason
       where id = :paymentId`,
      { paymentId, byId: actor.membershipId, reason },
      tx,
    );
    const [payment] = await findPayments(club.id, 'id', paymentId, tx);
    if (!payment) throw new Error('payment missing');
    await writeAudit(tx, {
      clubId: club.id,
      ...(row.buy_id ? { buyId: row.buy_id } : {}),
      by: byActor(actor),
      action: 'ledger.reverse',
      subject: { type: 'payment', id: paymentId },
      after: {
        reason,
        private: { member: payment.member.name, amountMinor: payment.amountMinor },
      },
    });
    await tellPaymentPages(payment, tx);
    if (row.confirmed_at) await tellReversal(club, payment, reason, tx);
    return payment;
  });
}

/** A treasurer takes a mistaken entry back, by mirror postings, with the reason. */
export async function reversePayment(
  actor: ClubActor,
  paymentId: string,
  reason: string,
): Promise<PaymentReply> {
  return reverse(actor, paymentId, reason, () => undefined);
}

/** Whoever noted cash takes their own note back, as long as the treasurer hasn't confirmed it. */
export async function withdrawCashNote(
  actor: BuyActor,
  paymentId: string,
  reason: string,
): Promise<PaymentReply> {
  return reverse(actor, paymentId, reason, (row) => {
    if (row.buy_id !== actor.buy.id) throw notFound('This payment');
    if (row.noted_by_id !== actor.membershipId) throw forbidden('Somebody else noted this cash.');
    if (row.confirmed_at) throw wrongState('The treasurer has confirmed this cash already.');
  });
}
