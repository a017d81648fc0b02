import { z } from 'zod';
import { billChargeKinds, orderStates } from '../domain/orders/orderTypes.ts';
import { buyStates } from '../domain/buys/states.ts';
import { Day, Id, Instant, MilligramsField, MinorField, Text, Version } from './fields.ts';

const Reason = Text(300).min(3, 'Say why, in a few words.');
const Price = MinorField.min(0, 'At least 0.');
const Person = z.strictObject({ id: Id, name: z.string() });

export const OrderStateField = z.enum(orderStates);

/** One offer's packs in a supplier's order. */
export const OrderPackRow = z.strictObject({
  offerId: Id,
  lineId: Id,
  salt: z.string(),
  formula: z.string().nullable(),
  label: z.string(),
  packs: z.int().min(0),
  packMg: MilligramsField,
  /** A pack's price at the lock, tax included. */
  lockedMinor: MinorField,
  /** A pack's price as last quoted. */
  priceMinor: MinorField,
});
export type OrderPackRow = z.infer<typeof OrderPackRow>;

export const SupplierOrder = z.strictObject({
  /** Null until something about the order was saved. */
  id: Id.nullable(),
  supplierId: Id,
  supplierName: z.string(),
  supplierEmail: z.string(),
  supplierContact: z.string(),
  isShelf: z.boolean(),
  state: OrderStateField,
  version: Version,
  packs: z.array(OrderPackRow),
  goodsMinor: MinorField,
  lockedShippingMinor: MinorField,
  shippingMinor: MinorField,
  totalMinor: MinorField,
  quotedAt: Instant.nullable(),
  reference: z.string(),
  note: z.string(),
  placedOn: Day.nullable(),
  placedBy: z.string().nullable(),
  /** A bill that counts is there. */
  billed: z.boolean(),
});
export type SupplierOrder = z.infer<typeof SupplierOrder>;

/** What a change does to one share. */
export const ShareChange = z.strictObject({
  memberId: Id,
  name: z.string(),
  lockedMinor: MinorField,
  /** As it stands now. */
  oldMinor: MinorField,
  newMinor: MinorField,
  overLimit: z.boolean(),
  /** Agreed to pay this much or more. */
  agreed: z.boolean(),
});
export type ShareChange = z.infer<typeof ShareChange>;

export const OrdersReply = z.strictObject({
  state: z.enum(buyStates),
  termsVersion: Version,
  priceLimitPermille: z.int(),
  orders: z.array(SupplierOrder),
  /** Locked, then as the prices known now have it; empty for those who only see their own. */
  shares: z.array(ShareChange),
  mine: ShareChange.nullable(),
  /** Before the next order may be placed: names for organisers and treasurers, else empty. */
  waits: z.strictObject({ unpaid: z.array(Person), overLimit: z.array(Person) }),
  may: z.strictObject({ order: z.boolean(), seeSheets: z.boolean() }),
});
export type OrdersReply = z.infer<typeof OrdersReply>;

const QuotedPrice = z.strictObject({ offerId: Id, priceMinor: Price });

/** Real prices of a supplier's packs and its shipping, as told before the order goes out. */
export const QuoteBody = z.strictObject({
  version: Version,
  termsVersion: Version,
  prices: z.array(QuotedPrice).max(200),
  shippingMinor: Price,
});
export type QuoteBody = z.infer<typeof QuoteBody>;

export const QuoteEffect = z.strictObject({
  shares: z.array(ShareChange),
  oldTotalMinor: MinorField,
  newTotalMinor: MinorField,
  /** How many would have to agree before the order may go out. */
  mustAgree: z.int(),
});
export type QuoteEffect = z.infer<typeof QuoteEffect>;

export const PlaceOrderBody = z.strictObject({
  version: Version,
  termsVersion: Version,
  placedOn: Day,
  reference: Text(120),
  note: Text(1000),
});
export type PlaceOrderBody = z.infer<typeof PlaceOrderBody>;

export const OrderStateBody = z.strictObject({
  version: Version,
  state: z.enum(['confirmed', 'failed']),
  note: Text(1000),
});
export type OrderStateBody = z.infer<typeof OrderStateBody>;

export const AgreementBody = z.strictObject({
  agree: z.boolean(),
  /** The share that the member was shown. */
  shareMinor: MinorField,
});
export type AgreementBody = z.infer<typeof AgreementBody>;

export const VouchBody = z.strictObject({ reason: Reason });
export type VouchBody = z.infer<typeof VouchBody>;

export const DropBody = z.strictObject({
  termsVersion: Version,
  memberIds: z.array(Id).min(1, 'Choose who is dropped.').max(500),
  reason: Reason,
});
export type DropBody = z.infer<typeof DropBody>;

export const DropCheckBody = z.strictObject({ memberIds: DropBody.shape.memberIds });
export type DropCheckBody = z.infer<typeof DropCheckBody>;

export const RemindBody = z.strictObject({ memberIds: z.array(Id).max(500) });
export type RemindBody = z.infer<typeof RemindBody>;
export const Reminded = z.strictObject({ told: z.int() });

/** A line of a slip, with its arithmetic in words. */
export const SlipRow = z.strictObject({
  label: z.string(),
  mg: MilligramsField.nullable(),
  minor: MinorField,
  steps: z.array(z.string()),
});
export type SlipRow = z.infer<typeof SlipRow>;

/** A member's share as a paper slip shows it. */
export const Slip = z.strictObject({
  member: Person,
  lines: z.array(SlipRow),
  charges: z.array(SlipRow),
  totalMinor: MinorField,
  taxMinor: MinorField,
});
export type Slip = z.infer<typeof Slip>;

export const LockedMember = z.strictObject({
  id: Id,
  name: z.string(),
  guest: z.boolean(),
  shareMinor: MinorField,
  lockedMinor: MinorField,
  dropped: z.boolean(),
  /** Only for those who may see others' payments, and for oneself. */
  money: z
    .strictObject({
      dueMinor: MinorField,
      paidMinor: MinorField,
      openMinor: MinorField,
      vouchedBy: z.string().nullable(),
      vouchedReason: z.string().nullable(),
      remindedAt: Instant.nullable(),
    })
    .nullable(),
  mustAgree: z.boolean(),
  agreedMinor: MinorField.nullable(),
});
export type LockedMember = z.infer<typeof LockedMember>;

export const LockedReply = z.strictObject({
  state: z.enum(buyStates),
  termsVersion: Version,
  dueAt: Instant.nullable(),
  lockedAt: Instant.nullable(),
  priceLimitPermille: z.int(),
  ordersPlaced: z.boolean(),
  members: z.array(LockedMember),
  slip: Slip.nullable(),
  plan: z.array(OrderPackRow.extend({ supplierName: z.string(), leftOverMg: z.int() })),
  totals: z.strictObject({
    shareMinor: MinorField,
    shelfMinor: MinorField,
    paidMinor: MinorField.nullable(),
    openMinor: MinorField.nullable(),
  }),
  /** How to pay, for who still owes. */
  pay: z.strictObject({ transferHow: z.string(), reference: z.string() }),
  may: z.strictObject({
    seeMoney: z.boolean(),
    vouch: z.boolean(),
    drop: z.boolean(),
    remind: z.boolean(),
    noteCash: z.boolean(),
    reopen: z.boolean(),
    recordPayment: z.boolean(),
  }),
});
export type LockedReply = z.infer<typeof LockedReply>;

const BillGoodsRow = z.strictObject({
  offerId: Id,
  packs: z.int().min(0).max(1_000_000),
  amountMinor: Price,
  taxRatePpm: z.int().min(0).max(1_000_000),
});
const BillChargeRow = z.strictObject({
  kind: z.enum(billChargeKinds),
  name: Text(80).min(1, 'Name this cost.'),
  amountMinor: MinorField,
  taxRatePpm: z.int().min(0).max(1_000_000),
  chargeId: Id.nullable(),
  /** How it is divided; only where no planned charge and no supplier says so. */
  basis: z.enum(['mass', 'value', 'member', 'portion']).nullable(),
});

/** A bill as the organiser types it off the paper; amounts with tax. */
export const BillBody = z.strictObject({
  version: Version,
  /** Null for a cost outside the suppliers' orders; then `payee` says who was paid. */
  supplierId: Id.nullable(),
  payee: Text(120),
  number: Text(60),
  billedOn: Day,
  goods: z.array(BillGoodsRow).max(200),
  charges: z.array(BillChargeRow).max(50),
  taxMinor: Price,
  paidBy: z.enum(['club', 'member']),
  advancedById: Id.nullable(),
});
export type BillBody = z.infer<typeof BillBody>;

export const BillReply = z.strictObject({
  id: Id,
  version: Version,
  supplierId: Id.nullable(),
  payee: z.string(),
  number: z.string(),
  billedOn: Day,
  goods: z.array(
    BillGoodsRow.extend({
      lineId: Id,
      salt: z.string(),
      label: z.string(),
      packMg: MilligramsField,
    }),
  ),
  charges: z.array(BillChargeRow),
  goodsMinor: MinorField,
  chargesMinor: MinorField,
  taxMinor: MinorField,
  totalMinor: MinorField,
  paidBy: z.enum(['club', 'member']),
  advancedBy: Person.nullable(),
  enteredBy: Person,
  confirmedBy: Person.nullable(),
  confirmedAt: Instant.nullable(),
  voidedAt: Instant.nullable(),
  voidedReason: z.string().nullable(),
});
export type BillReply = z.infer<typeof BillReply>;

export const SupplierRefundReply = z.strictObject({
  id: Id,
  supplierId: Id,
  supplierName: z.string(),
  amountMinor: MinorField,
  receivedOn: Day,
  reference: z.string(),
  reversedAt: Instant.nullable(),
});
export const LossReply = z.strictObject({
  id: Id,
  supplierName: z.string().nullable(),
  amountMinor: MinorField,
  reason: z.string(),
  reversedAt: Instant.nullable(),
});

export const BillsReply = z.strictObject({
  bills: z.array(BillReply),
  refunds: z.array(SupplierRefundReply),
  losses: z.array(LossReply),
  /** Costs that the terms plan and no bill has yet. */
  plannedCharges: z.array(
    z.strictObject({
      id: Id,
      kind: z.enum(billChargeKinds),
      name: z.string(),
      supplierId: Id.nullable(),
      amountMinor: MinorField,
      taxRatePpm: z.int(),
      billed: z.boolean(),
    }),
  ),
  /** Tax that the offers' prices contain, by the terms. */
  taxRates: z.array(z.strictObject({ offerId: Id, taxRatePpm: z.int() })),
  /** What the bills do to each share so far. */
  shares: z.array(ShareChange),
  may: z.strictObject({ enter: z.boolean(), confirm: z.boolean() }),
});
export type BillsReply = z.infer<typeof BillsReply>;

export const ConfirmBillBody = z.strictObject({
  version: Version,
  paidFrom: z.enum(['bank', 'cash']),
});
export type ConfirmBillBody = z.infer<typeof ConfirmBillBody>;
export const VoidBillBody = z.strictObject({ version: Version, reason: Reason });
export type VoidBillBody = z.infer<typeof VoidBillBody>;

export const SupplierRefundBody = z.strictObject({
  key: Id,
  supplierId: Id,
  amountMinor: MinorField.min(1, 'Enter an amount above zero.'),
  receivedOn: Day,
  into: z.enum(['bank', 'cash']),
  reference: Text(140),
});
export type SupplierRefundBody = z.infer<typeof SupplierRefundBody>;

/** What the club takes on itself before the shares are final. */
export const LossBody = z.strictObject({
  key: Id,
  supplierId: Id.nullable(),
  amountMinor: MinorField.min(1, 'Enter an amount above zero.'),
  reason: Reason,
});
export type LossBody = z.infer<typeof LossBody>;

/** What is left on the buy's account once the shares are final: to the members' accounts, or to the club's losses. */
export const RestBody = z.strictObject({
  key: Id,
  to: z.enum(['members', 'losses']),
  /** The balance that was shown. */
  balanceMinor: MinorField,
  reason: Reason,
});
export type RestBody = z.infer<typeof RestBody>;

export const SettleBody = z.strictObject({ termsVersion: Version });
export type SettleBody = z.infer<typeof SettleBody>;

export const SettlingReply = z.strictObject({
  state: z.enum(buyStates),
  termsVersion: Version,
  settledAt: Instant.nullable(),
  /** What must be gone before the buy settles, in words; empty when it can, or for who can't see it. */
  blocks: z.array(z.string()),
  /** What stays open without blocking. */
  notes: z.array(z.string()),
  balanceMinor: MinorField.nullable(),
  unclaimedPortions: z.int().nullable(),
  members: z.array(
    Person.extend({
      finalMinor: MinorField.nullable(),
      paidMinor: MinorField,
      openMinor: MinorField,
      creditMinor: MinorField,
      carriedMinor: MinorField,
    }),
  ),
  receipt: z
    .strictObject({
      slip: Slip,
      lockedMinor: MinorField.nullable(),
      paidMinor: MinorField,
      openMinor: MinorField,
      creditMinor: MinorField,
      carriedMinor: MinorField,
      /** What stays lost with a supplier. */
      lostMinor: MinorField,
      /** What came after the final share, of either sign. */
      laterMinor: MinorField,
    })
    .nullable(),
  may: z.strictObject({ seeAll: z.boolean(), settle: z.boolean(), bookRest: z.boolean() }),
});
export type SettlingReply = z.infer<typeof SettlingReply>;
