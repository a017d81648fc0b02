import { z } from 'zod';
import { buyStates } from '../domain/buys/states.ts';
import { Day, Id, Instant, MinorField, Text } from './fields.ts';

/** An amount that is paid, in minor units: at least one of them. */
export const PaidMinor = MinorField.min(1, 'Enter an amount above zero.');

export const PaymentMethod = z.enum(['cash', 'transfer']);
export type PaymentMethod = z.infer<typeof PaymentMethod>;

const Key = z.uuid();
const Reason = Text(300).min(3, 'Say why, in a few words.');

/** What a treasurer records; without a buy the money goes to the oldest due. `key` is made once per form. */
export const RecordPaymentBody = z.strictObject({
  key: Key,
  memberId: Id,
  buyId: Id.nullable(),
  method: PaymentMethod,
  amountMinor: PaidMinor,
  receivedOn: Day,
  reference: Text(140),
});
export type RecordPaymentBody = z.infer<typeof RecordPaymentBody>;

/** Cash that an organiser or a cash helper was handed for a buy. */
export const NoteCashBody = z.strictObject({
  key: Key,
  memberId: Id,
  amountMinor: PaidMinor,
  receivedOn: Day,
});
export type NoteCashBody = z.infer<typeof NoteCashBody>;

/** Credit that goes back to its member. */
export const RefundBody = z.strictObject({
  key: Key,
  memberId: Id,
  method: PaymentMethod,
  amountMinor: PaidMinor,
  paidOn: Day,
  reference: Text(140),
});
export type RefundBody = z.infer<typeof RefundBody>;

/** Cash noted by others that the treasurer now has in hand. */
export const ConfirmCashBody = z.strictObject({
  paymentIds: z.array(Id).min(1, 'Choose at least one payment.').max(500),
  receivedOn: Day,
});
export type ConfirmCashBody = z.infer<typeof ConfirmCashBody>;

export const ReverseBody = z.strictObject({ reason: Reason });
export type ReverseBody = z.infer<typeof ReverseBody>;

const Named = z.strictObject({ id: Id, name: z.string() });

export const PaymentPart = z.strictObject({
  buyId: Id.nullable(),
  buyName: z.string().nullable(),
  amountMinor: MinorField,
});

export const PaymentReply = z.strictObject({
  id: Id,
  direction: z.enum(['in', 'refund']),
  method: PaymentMethod,
  member: Named,
  amountMinor: MinorField,
  /** What coins could not pay exactly, taken to the club's rounding. */
  roundingMinor: MinorField,
  receivedOn: Day,
  reference: z.string(),
  parts: z.array(PaymentPart),
  notedBy: Named,
  confirmedBy: Named.nullable(),
  confirmedAt: Instant.nullable(),
  reversedAt: Instant.nullable(),
  reversedReason: z.string().nullable(),
  createdAt: Instant,
});
export type PaymentReply = z.infer<typeof PaymentReply>;

export const PaymentList = z.strictObject({ payments: z.array(PaymentReply) });
export type PaymentList = z.infer<typeof PaymentList>;

/** What a member owes for one buy, with the words for a transfer. */
export const StatementBuy = z.strictObject({
  buyId: Id,
  buyName: z.string(),
  state: z.enum(buyStates),
  dueMinor: MinorField,
  paidMinor: MinorField,
  finalMinor: MinorField.nullable(),
  openMinor: MinorField,
  creditMinor: MinorField,
  carriedMinor: MinorField,
  dueAt: Instant.nullable(),
  overdue: z.boolean(),
  vouchedBy: z.string().nullable(),
  /** RF creditor reference, ungrouped. */
  reference: z.string(),
});
export type StatementBuy = z.infer<typeof StatementBuy>;

export const StatementEntry = z.strictObject({
  id: z.string(),
  onDate: Day,
  memo: z.string(),
  buyName: z.string().nullable(),
  amountMinor: MinorField,
  balanceMinor: MinorField,
  reversal: z.boolean(),
});
export type StatementEntry = z.infer<typeof StatementEntry>;

export const Statement = z.strictObject({
  member: Named.extend({ guest: z.boolean() }),
  balanceMinor: MinorField,
  openMinor: MinorField,
  accountOpenMinor: MinorField,
  carriedMinor: MinorField,
  creditMinor: MinorField,
  buys: z.array(StatementBuy),
  /** Oldest first, with the balance after each. */
  entries: z.array(StatementEntry),
  transferHow: z.string(),
  club: z.strictObject({ name: z.string() }),
});
export type Statement = z.infer<typeof Statement>;

export const LedgerMember = z.strictObject({
  id: Id,
  name: z.string(),
  guest: z.boolean(),
  active: z.boolean(),
  balanceMinor: MinorField,
  openMinor: MinorField,
  overdueMinor: MinorField,
  carriedMinor: MinorField,
  creditMinor: MinorField,
  buys: z.array(
    z.strictObject({
      buyId: Id,
      buyName: z.string(),
      openMinor: MinorField,
      dueAt: Instant.nullable(),
      overdue: z.boolean(),
    }),
  ),
});
export type LedgerMember = z.infer<typeof LedgerMember>;
export const LedgerMembers = z.strictObject({ members: z.array(LedgerMember) });
export type LedgerMembers = z.infer<typeof LedgerMembers>;

/** What waits for the treasurer. */
export const LedgerTasks = z.strictObject({
  refunds: z.array(
    z.strictObject({
      member: Named,
      creditMinor: MinorField,
      /** Where the credit comes from, in words. */
      from: z.array(z.string()),
    }),
  ),
  cashHeld: z.array(
    z.strictObject({
      holder: Named,
      totalMinor: MinorField,
      payments: z.array(PaymentReply),
    }),
  ),
  bills: z.array(
    z.strictObject({
      id: Id,
      buyId: Id,
      buyName: z.string(),
      supplierId: Id,
      supplierName: z.string(),
      number: z.string(),
      billedOn: Day,
      totalMinor: MinorField,
      enteredBy: z.string(),
    }),
  ),
  overdue: z.array(
    z.strictObject({
      member: Named,
      buyId: Id,
      buyName: z.string(),
      openMinor: MinorField,
      dueAt: Instant,
    }),
  ),
  toSettle: z.array(z.strictObject({ buyId: Id, buyName: z.string() })),
});
export type LedgerTasks = z.infer<typeof LedgerTasks>;

export const LedgerAccountKind = z.enum([
  'bank',
  'cash',
  'cash_held',
  'card_clearing',
  'member',
  'supplier',
  'buy',
  'shelf',
  'fees',
  'losses',
  'rounding',
]);

/** An account of the books with its sum; debit positive. */
export const LedgerAccountRow = z.strictObject({
  kind: LedgerAccountKind,
  name: z.string(),
  balanceMinor: MinorField,
});

export const JournalEntry = z.strictObject({
  id: Id,
  onDate: Day,
  createdAt: Instant,
  eventType: z.string(),
  memo: z.string(),
  buyName: z.string().nullable(),
  by: z.string().nullable(),
  reversesId: Id.nullable(),
  reversedById: Id.nullable(),
  postings: z.array(z.strictObject({ account: z.string(), amountMinor: MinorField })),
});
export type JournalEntry = z.infer<typeof JournalEntry>;

export const JournalQuery = z.strictObject({ before: z.uuid().optional() });
export type JournalQuery = z.infer<typeof JournalQuery>;

export const Journal = z.strictObject({
  accounts: z.array(LedgerAccountRow),
  entries: z.array(JournalEntry),
  /** Pass as `before` for the next page; null at the end. */
  next: Id.nullable(),
});
export type Journal = z.infer<typeof Journal>;
