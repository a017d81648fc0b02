import { allocatePayment } from '#shared/domain/ledger/allocate.ts';
import type { PaymentMethod, PaymentReply } from '#shared/schemas/ledger.ts';
import { select, type Tx } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { DomainProblem } from '../problem.ts';
import { settleCash } from './cashRounding.ts';
import { checkNotAhead } from './clubDay.ts';
import { findPayments } from './findPayments.ts';
import { lockMember } from './lockMember.ts';
import { owedOfMember } from './owed.ts';
import { postTransaction, type LedgerAccountRef } from './postTransaction.ts';
import { tellPaymentPages } from './tellPayers.ts';

export interface PaymentFacts {
  readonly key: string;
  readonly memberId: string;
  readonly buyId: string | null;
  readonly method: PaymentMethod;
  readonly amountMinor: number;
  readonly receivedOn: string;
  readonly reference: string;
  /** Where the money is now. */
  readonly into: LedgerAccountRef;
  readonly confirmed: boolean;
}

/** The payment that an idempotency key made before, if it says the same. */
export async function findRepeat(
  clubId: string,
  key: string,
  same: (payment: PaymentReply) => boolean,
  tx: Tx,
): Promise<PaymentReply | null> {
  const [known] = await findPayments(clubId, 'key', key, tx);
  if (!known) return null;
  if (!same(known)) {
    throw new DomainProblem(
      409,
      'already_there',
      'This form was sent before with other figures. Look at the payment that it made.',
      { current: known },
    );
  }
  return known;
}

/**
 * Money that came in from a member: one payment row, one posting, in the caller's transaction, which holds the buy's
 * lock when one is named. The same key records once.
 * @returns the payment, and whether it is new
 */
export async function takePayment(
  actor: ClubActor,
  facts: PaymentFacts,
  tx: Tx,
): Promise<{ payment: PaymentReply; fresh: boolean }> {
  const { club } = actor;
  const member = await lockMember(club.id, facts.memberId, tx);
  const repeat = await findRepeat(
    club.id,
    facts.key,
    (known) =>
      known.direction === 'in' &&
      known.member.id === member.id &&
      known.amountMinor === facts.amountMinor &&
      known.method === facts.method,
    tx,
  );
  if (repeat) return { payment: repeat, fresh: false };
  await checkNotAhead(club.id, facts.receivedOn, 'receivedOn', tx);

  const owed = await owedOfMember(club.id, member.id, tx);
  const open = facts.buyId
    ? (owed.buys.find(({ buyId }) => buyId === facts.buyId)?.openMinor ?? 0)
    : owed.openMinor;
  const { memberMinor, roundingMinor } =
    facts.method === 'cash'
      ? settleCash(facts.amountMinor, open, club.currency)
      : { memberMinor: facts.amountMinor, roundingMinor: 0 };
  const parts = allocatePayment(memberMinor, facts.buyId, owed);

  const [row] = await select<{ id: string }>(
    `insert into payments (club_id, buy_id, membership_id, direction, method, amount_minor, rounding_minor,
        received_on, reference, noted_by_id, confirmed_by_id, confirmed_at, idempotency_key)
     values (:clubId, :buyId, :memberId, 'in', :method, :amountMinor, :roundingMinor, :receivedOn, :reference, :byId,
        :confirmedById, case when :confirmed then clock_timestamp() end, :key)
     on conflict (club_id, idempotency_key) do nothing returning id`,
    {
      clubId: club.id,
      buyId: facts.buyId,
      memberId: member.id,
      method: facts.method,
      amountMinor: facts.amountMinor,
      roundingMinor,
      receivedOn: facts.receivedOn,
      reference: facts.reference,
      byId: actor.membershipId,
      confirmedById: facts.confirmed ? actor.membershipId : null,
      confirmed: facts.confirmed,
      key: facts.key,
    },
    tx,
  );
  if (!row) throw new DomainProblem(409, 'already_there', 'This form was sent before.');

  await postTransaction(tx, {
    clubId: club.id,
    eventType: 'payment',
    eventId: row.id,
    onDate: facts.receivedOn,
    memo: `${facts.method === 'cash' ? 'Cash' : 'Transfer'} from ${member.name}`,
    ...(facts.buyId ? { buyId: facts.buyId } : {}),
    by: byActor(actor),
    postings: [
      { account: facts.into, amountMinor: facts.amountMinor },
      { account: { kind: 'rounding' }, amountMinor: roundingMinor, buyId: null },
      ...parts.map(({ buyId, amountMinor }) => ({
        account: { kind: 'member' as const, refId: member.id },
        amountMinor: 0 - amountMinor,
        buyId,
      })),
    ],
  });
  await writeAudit(tx, {
    clubId: club.id,
    ...(facts.buyId ? { buyId: facts.buyId } : {}),
    by: byActor(actor),
    action: facts.confirmed ? 'ledger.payment' : 'ledger.cash_noted',
    subject: { type: 'payment', id: row.id },
    after: {
      method: facts.method,
      receivedOn: facts.receivedOn,
      private: { member: member.name, amountMinor: facts.amountMinor },
    },
  });
  const [payment] = await findPayments(club.id, 'id', row.id, tx);
  if (!payment) throw new Error('payment missing');
  await tellPaymentPages(payment, tx);
  return { payment, fresh: true };
}
