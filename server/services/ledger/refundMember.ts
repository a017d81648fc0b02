import { allocateRefund } from '#shared/domain/ledger/allocate.ts';
import type { PaymentReply, RefundBody } from '#shared/schemas/ledger.ts';
import { select, transact } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { DomainProblem, invalid } from '../problem.ts';
import { settleCash } from './cashRounding.ts';
import { checkNotAhead } from './clubDay.ts';
import { findPayments } from './findPayments.ts';
import { lockMember } from './lockMember.ts';
import { owedOfMember } from './owed.ts';
import { clubMoney } from './paymentWords.ts';
import { postTransaction } from './postTransaction.ts';
import { findRepeat } from './takePayment.ts';
import { tellRefund } from './tellPayment.ts';

/**
 * Gives free credit back to its member, never more than there is once their dues are covered.
 * @throws DomainProblem 422 at `amountMinor`
 */
export async function refundMember(actor: ClubActor, body: RefundBody): Promise<PaymentReply> {
  const { club } = actor;
  return transact(async (tx) => {
    const member = await lockMember(club.id, body.memberId, tx);
    const repeat = await findRepeat(
      club.id,
      body.key,
      (known) =>
        known.direction === 'refund' &&
        known.member.id === member.id &&
        known.amountMinor === body.amountMinor,
      tx,
    );
    if (repeat) return repeat;
    await checkNotAhead(club.id, body.paidOn, 'paidOn', tx);

    const owed = await owedOfMember(club.id, member.id, tx);
    const { memberMinor, roundingMinor } =
      body.method === 'cash'
        ? settleCash(body.amountMinor, owed.creditMinor, club.currency)
        : { memberMinor: body.amountMinor, roundingMinor: 0 };
    if (memberMinor > owed.creditMinor) {
      const most = clubMoney(club, owed.creditMinor);
      throw invalid({ amountMinor: `${member.name} has ${most} of free credit.` });
    }
    const [row] = await select<{ id: string }>(
      `insert into payments (club_id, membership_id, direction, method, amount_minor, rounding_minor, received_on,
          reference, noted_by_id, confirmed_by_id, confirmed_at, idempotency_key)
       values (:clubId, :memberId, 'refund', :method, :amountMinor, :roundingMinor, :paidOn, :reference, :byId, :byId,
          clock_timestamp(), :key)
       on conflict (club_id, idempotency_key) do nothing returning id`,
      {
        clubId: club.id,
        memberId: member.id,
        method: body.method,
        amountMinor: body.amountMinor,
        roundingMinor: 0 - roundingMinor,
        paidOn: body.paidOn,
        reference: body.reference,
        byId: actor.membershipId,
        key: body.key,
      },
      tx,
    );
    if (!row) throw new DomainProblem(409, 'already_there', 'This form was sent before.');
    await postTransaction(tx, {
      clubId: club.id,
      eventType: 'payment',
      eventId: row.id,
      onDate: body.paidOn,
      memo: `Refund to ${member.name}`,
      by: byActor(actor),
      postings: [
        {
          account: { kind: body.method === 'cash' ? 'cash' : 'bank' },
          amountMinor: 0 - body.amountMinor,
        },
        { account: { kind: 'rounding' }, amountMinor: 0 - roundingMinor },
        ...allocateRefund(memberMinor, owed).map(({ buyId, amountMinor }) => ({
          account: { kind: 'member' as const, refId: member.id },
          amountMinor,
          buyId,
        })),
      ],
    });
    await writeAudit(tx, {
      clubId: club.id,
      by: byActor(actor),
      action: 'ledger.refund',
      subject: { type: 'payment', id: row.id },
      after: {
        method: body.method,
        private: { member: member.name, amountMinor: body.amountMinor },
      },
    });
    const [payment] = await findPayments(club.id, 'id', row.id, tx);
    if (!payment) throw new Error('payment missing');
    await tellRefund(club, payment, tx);
    return payment;
  });
}
