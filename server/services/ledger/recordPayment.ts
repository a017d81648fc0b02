import type { NoteCashBody, PaymentReply, RecordPaymentBody } from '#shared/schemas/ledger.ts';
import { transact } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import type { BuyActor, ClubActor } from '../actors.ts';
import { withBuy } from '../buys/withBuy.ts';
import { invalid } from '../problem.ts';
import { takePayment } from './takePayment.ts';
import { tellPaymentReceived } from './tellPayment.ts';

/** A treasurer records money that came in; without a buy it goes to the oldest due. */
export async function recordPayment(
  actor: ClubActor,
  body: RecordPaymentBody,
): Promise<PaymentReply> {
  return transact(async (tx) => {
    if (body.buyId) {
      const buy = await Buy.findOne({
        where: { id: body.buyId, clubId: actor.club.id },
        transaction: tx.transaction,
        lock: tx.transaction.LOCK.UPDATE,
      });
      if (!buy || buy.state === 'draft') throw invalid({ buyId: 'Choose a buy of this club.' });
    }
    const { payment, fresh } = await takePayment(
      actor,
      { ...body, into: { kind: body.method === 'cash' ? 'cash' : 'bank' }, confirmed: true },
      tx,
    );
    if (fresh) await tellPaymentReceived(actor.club, payment, tx);
    return payment;
  });
}

/** An organiser or cash helper notes cash in hand: it counts for the payer at once, and stands on "cash held by" its taker. */
export async function noteCash(actor: BuyActor, body: NoteCashBody): Promise<PaymentReply> {
  const states = ['locked', 'ordered', 'arrived', 'splitting', 'pickup'] as const;
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const { payment } = await takePayment(
      actor,
      {
        ...body,
        buyId: buy.id,
        method: 'cash',
        reference: '',
        into: { kind: 'cash_held', refId: actor.membershipId },
        confirmed: false,
      },
      tx,
    );
    return payment;
  });
}
