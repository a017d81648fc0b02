import type { PaymentReply } from '#shared/schemas/ledger.ts';
import type { Tx } from '../../config/database.ts';
import type { ActorClub } from '../actors.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { owedOfMember } from './owed.ts';
import { clubDay, clubMoney, ledgerPath } from './paymentWords.ts';

/** Tells the payer that the treasurer has the money, and how they stand now. */
export async function tellPaymentReceived(
  club: ActorClub,
  payment: PaymentReply,
  tx: Tx,
): Promise<void> {
  const owed = await owedOfMember(club.id, payment.member.id, tx);
  const money = (minor: number) => clubMoney(club, minor);
  const parts = payment.parts.map(
    ({ buyName, amountMinor }) => [buyName ?? 'Your account', money(amountMinor)] as const,
  );
  await queueNotice(tx, {
    clubId: club.id,
    kind: 'payment_received',
    eventKey: `payment:${payment.id}:received`,
    to: [payment.member.id],
    content: {
      subject: `Payment received: ${money(payment.amountMinor)}`,
      paragraphs: [
        `Your ${payment.method === 'cash' ? 'cash payment' : 'transfer'} of ${money(payment.amountMinor)} of ${clubDay(club, payment.receivedOn)} is in the books.`,
        owed.openMinor > 0
          ? `Still to pay: ${money(owed.openMinor)}.`
          : owed.creditMinor > 0
            ? `Nothing is left to pay. Your credit is ${money(owed.creditMinor)}.`
            : 'Nothing is left to pay.',
      ],
      rows: parts,
      action: { label: 'See your statement', path: ledgerPath(club) },
    },
  });
}

/** Tells a member that money went back to them. */
export async function tellRefund(club: ActorClub, payment: PaymentReply, tx: Tx): Promise<void> {
  await queueNotice(tx, {
    clubId: club.id,
    kind: 'payment_received',
    eventKey: `payment:${payment.id}:refunded`,
    to: [payment.member.id],
    content: {
      subject: `Refund: ${clubMoney(club, payment.amountMinor)}`,
      paragraphs: [
        `${clubMoney(club, payment.amountMinor)} of your credit went back to you ${payment.method === 'cash' ? 'in cash' : 'by transfer'} on ${clubDay(club, payment.receivedOn)}.`,
      ],
      action: { label: 'See your statement', path: ledgerPath(club) },
    },
  });
}

/** Tells a member that an entry about them was taken back, and why. */
export async function tellReversal(
  club: ActorClub,
  payment: PaymentReply,
  reason: string,
  tx: Tx,
): Promise<void> {
  await queueNotice(tx, {
    clubId: club.id,
    kind: 'payment_received',
    eventKey: `payment:${payment.id}:reversed`,
    to: [payment.member.id],
    content: {
      subject: `Entry taken back: ${clubMoney(club, payment.amountMinor)}`,
      paragraphs: [
        `The ${payment.direction === 'in' ? 'payment' : 'refund'} of ${clubMoney(club, payment.amountMinor)} of ${clubDay(club, payment.receivedOn)} was entered by mistake and is reversed: ${reason}`,
      ],
      action: { label: 'See your statement', path: ledgerPath(club) },
    },
  });
}
