import { z } from 'zod';
import { buyStates } from '../domain/buys/states.ts';
import { BuyMay } from './buyMay.ts';
import { Id, Instant, MilligramsField, MinorField, Text, Version } from './fields.ts';

export const BuyStateField = z.enum(buyStates);

/** A person as a buy names them. */
export const BuyPerson = z.strictObject({ membershipId: Id, name: z.string() });
export type BuyPerson = z.infer<typeof BuyPerson>;

export const BuyHelper = BuyPerson.extend({ takesCash: z.boolean() });
export type BuyHelper = z.infer<typeof BuyHelper>;

/** What is next in a buy, and who must do it; codes in shared/domain/buys/nextStep.ts. */
export const BuyNext = z.strictObject({
  code: z.string(),
  who: z.enum(['you', 'organiser', 'members', 'treasurer', 'nobody']),
  text: z.string(),
});
export type BuyNext = z.infer<typeof BuyNext>;

/** One buy in the list. */
export const BuySummary = z.strictObject({
  id: Id,
  name: z.string(),
  state: BuyStateField,
  frozen: z.boolean(),
  /** False for drafts, and for drafts that were discarded. */
  opened: z.boolean(),
  responsible: BuyPerson,
  closesAt: Instant.nullable(),
  frozenUntil: Instant.nullable(),
  splitsAt: Instant.nullable(),
  place: z.string(),
  lines: z.int(),
  members: z.int(),
  pledgedMg: MilligramsField,
  /** What the viewer wants in it, over all lines. */
  mineMg: MilligramsField,
  organises: z.boolean(),
  next: BuyNext,
  createdAt: Instant,
});
export type BuySummary = z.infer<typeof BuySummary>;
export const BuyList = z.strictObject({ buys: z.array(BuySummary), mayDraft: z.boolean() });
export type BuyList = z.infer<typeof BuyList>;

/** One change of the terms since the buy opened. */
export const TermsChange = z.strictObject({
  termsVersion: Version,
  summary: z.string(),
  at: Instant,
  by: z.string().nullable(),
});
export type TermsChange = z.infer<typeof TermsChange>;

export const MinimumKind = z.enum(['none', 'mass', 'value', 'members']);
export const LeftOverPayer = z.enum(['members', 'shelf']);

/** A buy's head: everything but its lines, offers, charges and pledges. */
export const BuyHeader = z.strictObject({
  id: Id,
  name: z.string(),
  state: BuyStateField,
  termsVersion: Version,
  sheetVersion: Version,
  responsible: BuyPerson,
  offeredTo: BuyPerson.nullable(),
  coOrganisers: z.array(BuyPerson),
  helpers: z.array(BuyHelper),
  minimumKind: MinimumKind,
  /** Milligrams, minor units or members, by `minimumKind`. */
  minimumAmount: z.int().min(0),
  priceLimitPermille: z.int(),
  dueDays: z.int(),
  dueAt: Instant.nullable(),
  closesAt: Instant.nullable(),
  frozenAt: Instant.nullable(),
  frozenUntil: Instant.nullable(),
  splitsAt: Instant.nullable(),
  splitEndsAt: Instant.nullable(),
  place: z.string(),
  pickupRules: z.string(),
  note: z.string(),
  loweringFreezeHours: z.int(),
  leftOverPayer: LeftOverPayer,
  shelfLimitMinor: MinorField,
  /** The most that the treasurer lets a buy charge the shelf. */
  clubShelfLimitMinor: MinorField,
  spreadMaxPermille: z.int(),
  bandPermille: z.int(),
  unclaimedDays: z.int(),
  targetVersion: Version,
  copiedFrom: z.strictObject({ id: Id, name: z.string() }).nullable(),
  reopenReason: z.string().nullable(),
  cancelReason: z.string().nullable(),
  openedAt: Instant.nullable(),
  lockedAt: Instant.nullable(),
  orderedAt: Instant.nullable(),
  arrivedAt: Instant.nullable(),
  splittingAt: Instant.nullable(),
  pickupAt: Instant.nullable(),
  settledAt: Instant.nullable(),
  cancelledAt: Instant.nullable(),
  createdAt: Instant,
  counts: z.strictObject({ lines: z.int(), members: z.int(), pledgedMg: MilligramsField }),
  /** The viewer's own part; `owedMinor` is null until something is due. */
  mine: z.strictObject({
    membershipId: Id,
    organises: z.boolean(),
    helps: z.boolean(),
    takesCash: z.boolean(),
    takesPart: z.boolean(),
    wantedMg: MilligramsField,
    /** Lines that others offer to hand on to the viewer. */
    offeredLines: z.int(),
    owedMinor: MinorField.nullable(),
  }),
  changes: z.array(TermsChange),
  may: BuyMay,
  next: BuyNext,
  /** The server's clock, for countdowns. */
  now: Instant,
});
export type BuyHeader = z.infer<typeof BuyHeader>;

export const BuyName = Text(120).min(1, 'Write a name.');
/** Reply of an act that moves a buy on: its new head. */
export const BuyReply = BuyHeader;
