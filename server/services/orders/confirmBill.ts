import type { ConfirmBillBody, VoidBillBody } from '#shared/schemas/orders.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { clubToday } from '../ledger/clubDay.ts';
import { clubMoney, ledgerPath } from '../ledger/paymentWords.ts';
import { postTransaction, type Posting } from '../ledger/postTransaction.ts';
import { reverseTransaction, transactionsOf } from '../ledger/reverseTransaction.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { wrongState } from '../problem.ts';
import { billStates, lockBill } from './enterBill.ts';
import { finalPosted } from './finalPosted.ts';
import { findBills, type BillRow } from './findBills.ts';
import { tellBuyChanged } from './tellBuy.ts';

/** A cancelled buy may still be billed for what was ordered and failed. */
const confirmStates = [...billStates, 'cancelled'] as const;

function billPostings(buyId: string, bill: BillRow, paidFrom: 'bank' | 'cash'): Posting[] {
  const total = bill.totalMinor;
  const postings: Posting[] = [{ account: { kind: 'buy', refId: buyId }, amountMinor: total }];
  const paid = 0 - total;
  if (bill.supplierId !== null) {
    const account = { kind: 'supplier' as const, refId: bill.supplierId };
    postings.push({ account, amountMinor: paid }, { account, amountMinor: total });
  }
  if (bill.advancedById !== null) {
    // The advance is the member's credit at large, not a payment for their own share.
    const account = { kind: 'member' as const, refId: bill.advancedById };
    postings.push({ account, amountMinor: paid, buyId: null });
  } else {
    postings.push({ account: { kind: paidFrom }, amountMinor: paid });
  }
  return postings;
}

async function getBill(buy: Buy, billId: string, tx: Tx): Promise<BillRow> {
  const bill = (await findBills(buy.id, tx)).find(({ id }) => id === billId);
  if (!bill) throw new Error('bill missing');
  return bill;
}

async function supplierName(bill: BillRow, tx: Tx): Promise<string> {
  const [row] = await select<{ name: string }>(
    'select name from suppliers where id = :id::uuid',
    { id: bill.supplierId },
    tx,
  );
  return row?.name ?? bill.payee;
}

/** A treasurer confirms a bill, which posts it: to the buy, and from the bank, the cash, or the member who advanced it. */
export async function confirmBill(
  actor: BuyActor,
  billId: string,
  body: ConfirmBillBody,
): Promise<void> {
  await withBuy(actor.buy.id, { states: confirmStates }, async (buy, tx) => {
    const { confirmedAt } = await lockBill(buy, billId, body.version, tx);
    if (confirmedAt) throw wrongState('This bill is confirmed already.');
    const bill = await getBill(buy, billId, tx);
    const name = await supplierName(bill, tx);
    await postTransaction(tx, {
      clubId: buy.clubId,
      eventType: 'bill',
      eventId: billId,
      onDate: bill.billedOn,
      memo: `Bill ${bill.number} of ${name}`.replace('  ', ' '),
      buyId: buy.id,
      by: byActor(actor),
      postings: billPostings(buy.id, bill, body.paidFrom),
    });
    await execute(
      `update bills set confirmed_at = clock_timestamp(), confirmed_by_id = :byId, posted_from = :paidFrom,
         version = version + 1, updated_at = now() where id = :billId`,
      { byId: actor.membershipId, paidFrom: body.paidFrom, billId },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'bills.confirm',
      subject: { type: 'bill', id: billId },
      after: { totalMinor: bill.totalMinor, paidFrom: body.paidFrom, supplier: name },
    });
    if (bill.advancedById) {
      await queueNotice(tx, {
        clubId: buy.clubId,
        buyId: buy.id,
        kind: 'payment_received',
        eventKey: `bill:${billId}:advanced`,
        to: [bill.advancedById],
        content: {
          subject: `${clubMoney(actor.club, bill.totalMinor)} is on your account`,
          paragraphs: [
            `The bill of ${name} that you advanced for ${buy.name} is confirmed. Its ${clubMoney(actor.club, bill.totalMinor)} is credit on your account.`,
          ],
          action: { label: 'See your statement', path: ledgerPath(actor.club) },
        },
      });
    }
    tellBuyChanged(buy, 'terms', tx);
  });
}

async function markVoid(actor: BuyActor, billId: string, reason: string, tx: Tx): Promise<void> {
  await execute(
    `update bills set voided_at = clock_timestamp(), voided_by_id = :byId, voided_reason = :reason,
       version = version + 1, updated_at = now() where id = :billId`,
    { byId: actor.membershipId, reason, billId },
    tx,
  );
}

/** An organiser takes back a bill that no treasurer has confirmed. */
export async function voidBill(actor: BuyActor, billId: string, body: VoidBillBody): Promise<void> {
  await withBuy(actor.buy.id, { states: confirmStates }, async (buy, tx) => {
    const { confirmedAt } = await lockBill(buy, billId, body.version, tx);
    if (confirmedAt)
      throw wrongState('A treasurer has confirmed this bill: it can only be reversed.');
    if (await finalPosted(buy.id, tx)) {
      throw wrongState(
        'The final shares rest on this bill. Let the treasurer confirm it, then book the rest.',
      );
    }
    await markVoid(actor, billId, body.reason, tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'bills.void',
      subject: { type: 'bill', id: billId },
      after: { reason: body.reason },
    });
    tellBuyChanged(buy, 'terms', tx);
  });
}

/** A treasurer reverses a confirmed bill, by mirror postings; the right one is entered anew. */
export async function reverseBill(
  actor: BuyActor,
  billId: string,
  body: VoidBillBody,
): Promise<void> {
  await withBuy(actor.buy.id, { states: confirmStates }, async (buy, tx) => {
    const { confirmedAt } = await lockBill(buy, billId, body.version, tx);
    if (!confirmedAt) throw wrongState('This bill is not confirmed: void it instead.');
    const onDate = await clubToday(buy.clubId, tx);
    for (const transactionId of await transactionsOf(buy.clubId, [['bill', billId]], tx)) {
      await reverseTransaction(tx, {
        transactionId,
        onDate,
        reason: body.reason,
        by: byActor(actor),
      });
    }
    await markVoid(actor, billId, body.reason, tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'bills.reverse',
      subject: { type: 'bill', id: billId },
      after: { reason: body.reason },
    });
    tellBuyChanged(buy, 'terms', tx);
  });
}
