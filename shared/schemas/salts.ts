import { z } from 'zod';
import { compositionParts } from '../domain/salts/compositionParts.ts';
import { Instant, Text, Version } from './fields.ts';

export const SaltKind = z.enum(['salt', 'trace_mix']);
export type SaltKind = z.infer<typeof SaltKind>;
export const SignalWordField = z.enum(['Danger', 'Warning']);

/** Of the shipped list (`KNO3`) or of the club (a UUID). */
export const SaltId = z.string().trim().min(1, 'Choose a salt.').max(64);

export const CompositionPpmField = z.partialRecord(
  z.enum(compositionParts),
  z.int('Write a number.').min(0, 'Not below 0.').max(1_000_000, 'At most 100 %.'),
);

/** A salt as a club sees it, of the shipped list or its own, with what the rules of care say. */
export const ClubSalt = z.strictObject({
  id: SaltId,
  source: z.enum(['catalogue', 'club']),
  kind: SaltKind,
  name: z.string(),
  otherNames: z.array(z.string()),
  formula: z.string().nullable(),
  cas: z.string().nullable(),
  /** Parts per million by mass; empty for the shipped list, whose formula or label assay tells. */
  compositionPpm: CompositionPpmField,
  /** Hazard statements that count: stated or inherited. */
  statements: z.array(z.string()),
  signalWord: SignalWordField.nullable(),
  pictograms: z.array(z.string()),
  /** The hazards were not read from a published sheet: "check the supplier's sheet". */
  checkSheet: z.boolean(),
  classified: z.boolean(),
  reportable: z.boolean(),
  lineRefusal: z.string().nullable(),
  /** The salt of the shipped list that a club's own really is. */
  twinId: z.string().nullable(),
  hidden: z.boolean(),
  storage: z.string(),
  note: z.string(),
  archivedAt: Instant.nullable(),
  version: Version,
});
export type ClubSalt = z.infer<typeof ClubSalt>;

export const SaltList = z.strictObject({
  salts: z.array(ClubSalt),
  may: z.strictObject({ edit: z.boolean() }),
});
export type SaltList = z.infer<typeof SaltList>;

const emptyAsNull = (max: number) =>
  Text(max)
    .nullable()
    .transform((text) => (text === '' ? null : text));

/** A club's own salt or trace mix, as it is filled in. */
export const OwnSaltBody = z.strictObject({
  kind: SaltKind,
  name: z.string().trim().min(1, 'Write a name.').max(80, 'At most 80 characters.'),
  formula: emptyAsNull(120),
  cas: emptyAsNull(12),
  compositionPpm: CompositionPpmField,
  statements: z.array(z.string().trim().max(8)).max(30),
  signalWord: SignalWordField.nullable(),
  storage: Text(500),
  note: Text(1000),
});
export type OwnSaltBody = z.infer<typeof OwnSaltBody>;

export const OwnSaltChange = OwnSaltBody.extend({ version: Version });
export type OwnSaltChange = z.infer<typeof OwnSaltChange>;

export const SaltParams = z.object({ salt: SaltId });
export const HiddenBody = z.strictObject({ hidden: z.boolean() });
export const VersionBody = z.strictObject({ version: Version });
