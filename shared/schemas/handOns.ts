import { z } from 'zod';
import { BuyPerson } from './buys.ts';
import { Id, Instant, MilligramsField, MinorField } from './fields.ts';

/** A line that one member offers to another, or has handed on. */
export const HandOn = z.strictObject({
  id: Id,
  lineId: Id,
  saltId: z.string(),
  salt: z.string(),
  from: BuyPerson,
  to: BuyPerson,
  state: z.enum(['offered', 'accepted', 'declined', 'withdrawn']),
  /** As it stands now, or as it was when it was accepted. */
  mg: MilligramsField,
  /** Cost and part of the charges; null for readers whom it doesn't concern. */
  amountMinor: MinorField.nullable(),
  createdAt: Instant,
  answeredAt: Instant.nullable(),
  mayAnswer: z.boolean(),
  mayWithdraw: z.boolean(),
  /** The taker must first say that they have read the salt's cautions. */
  needsConfirmation: z.boolean(),
  reportable: z.boolean(),
});
export type HandOn = z.infer<typeof HandOn>;

/** What the reader could hand on: own lines that nobody has handed over yet. */
export const HandOnChoice = z.strictObject({
  lineId: Id,
  salt: z.string(),
  mg: MilligramsField,
  amountMinor: MinorField,
});
export type HandOnChoice = z.infer<typeof HandOnChoice>;

export const HandOns = z.strictObject({
  handOns: z.array(HandOn),
  choices: z.array(HandOnChoice),
});
export type HandOns = z.infer<typeof HandOns>;

export const OfferHandOnBody = z.strictObject({ lineId: Id, toId: Id });
export type OfferHandOnBody = z.infer<typeof OfferHandOnBody>;

export const AnswerHandOnBody = z.strictObject({
  accept: z.boolean(),
  /** The taker has read the cautions of a classified salt and keeps it from children. */
  cautionsRead: z.boolean(),
});
export type AnswerHandOnBody = z.infer<typeof AnswerHandOnBody>;

export const HandOnParams = z.object({ handOn: Id });
