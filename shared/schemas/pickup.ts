import { z } from 'zod';
import { buyStates } from '../domain/buys/states.ts';
import { Id, Instant, MilligramsField, MinorField, Text, Version } from './fields.ts';

/** A time in which shares are handed over. */
export const PickupSlot = z.strictObject({
  id: Id,
  startsAt: Instant,
  endsAt: Instant,
  place: z.string(),
  capacity: z.int().nullable(),
  taken: z.int(),
});
export type PickupSlot = z.infer<typeof PickupSlot>;

/** One container that waits for its member. */
export const PickupPortion = z.strictObject({
  id: Id,
  lineId: Id,
  saltId: z.string(),
  salt: z.string(),
  formula: z.string().nullable(),
  code: z.string(),
  part: z.int(),
  parts: z.int(),
  mg: MilligramsField,
  lot: z.string(),
  signalWord: z.string().nullable(),
  hazards: z.array(z.string()),
  handedOverAt: Instant.nullable(),
});
export type PickupPortion = z.infer<typeof PickupPortion>;

/** Somebody whose share is to be handed over, as the desk sees them. */
export const PickupPerson = z.strictObject({
  membershipId: Id,
  name: z.string(),
  isGuest: z.boolean(),
  portions: z.array(PickupPortion),
  paid: z.boolean(),
  /** What is owed; null for those who may only see whether it is paid. */
  owedMinor: MinorField.nullable(),
  vouchedBy: z.string().nullable(),
  slotId: Id.nullable(),
  proxyName: z.string().nullable(),
  /** Names of classified salts for which a guest's signed paper is still missing. */
  papersMissing: z.array(z.strictObject({ saltId: z.string(), salt: z.string() })),
  /** Salts for which the legal name is recorded. */
  reportable: z.array(z.string()),
  legalNameKnown: z.boolean(),
  handovers: z.array(
    z.strictObject({
      id: Id,
      at: Instant,
      by: z.string(),
      collectedBy: z.string(),
      portions: z.int(),
      /** Whether the reader may take it back. */
      mayUndo: z.boolean(),
    }),
  ),
  collectedAt: Instant.nullable(),
  unclaimedAt: Instant.nullable(),
  reminders: z.int(),
});
export type PickupPerson = z.infer<typeof PickupPerson>;

export const PickupDesk = z.strictObject({
  buyId: Id,
  state: z.enum(buyStates),
  termsVersion: Version,
  pickupAt: Instant.nullable(),
  unclaimedFrom: Instant.nullable(),
  slots: z.array(PickupSlot),
  people: z.array(PickupPerson),
});
export type PickupDesk = z.infer<typeof PickupDesk>;

/** One's own pickup: what waits, when and where, and the pass that shows who may collect. */
export const MyPickup = z.strictObject({
  portions: z.array(PickupPortion),
  owedMinor: MinorField,
  vouched: z.boolean(),
  slots: z.array(PickupSlot),
  slotId: Id.nullable(),
  place: z.string(),
  rules: z.string(),
  proxyName: z.string().nullable(),
  /** Null before the split is over, and when there is nothing to collect. */
  pass: z.string().nullable(),
  collectedAt: Instant.nullable(),
});
export type MyPickup = z.infer<typeof MyPickup>;

export const SlotBody = z
  .strictObject({
    startsAt: Instant,
    endsAt: Instant,
    place: Text(200),
    capacity: z.int().min(1, 'At least one.').max(500).nullable(),
  })
  .refine(({ startsAt, endsAt }) => startsAt < endsAt, {
    path: ['endsAt'],
    message: 'It ends after it starts.',
  });
export type SlotBody = z.infer<typeof SlotBody>;

export const ChooseSlotBody = z.strictObject({ slotId: Id.nullable() });
export const ProxyBody = z.strictObject({ name: Text(80).nullable() });
export const PassBody = z.strictObject({
  pass: z.string().min(1, 'Type or scan the pass.').max(60),
});
export const PassReply = z.strictObject({ membershipId: Id });

/** Handing portions over. `id` is made on the device: sending it again changes nothing. */
export const HandoverBody = z.strictObject({
  id: Id,
  membershipId: Id,
  portionIds: z.array(Id).min(1, 'Tick what is handed over.').max(200),
  method: z.enum(['pass', 'name']),
  /** Needed with method `pass`. */
  pass: z.string().max(60).nullable(),
  /** Who stands here, when it is not the member. */
  collectedBy: Text(80),
  /** Asked once, for salts whose recipients are recorded. */
  legalName: z.string().trim().max(120).nullable(),
});
export type HandoverBody = z.infer<typeof HandoverBody>;

/** Sends pickup notices with slot, place and pass: to those named. */
export const PickupNoticeBody = z.strictObject({
  id: Id,
  to: z.array(Id).min(1).max(500),
  note: Text(1000),
});
export type PickupNoticeBody = z.infer<typeof PickupNoticeBody>;
export const ToldReply = z.strictObject({ told: z.int().min(0) });
