import { z } from 'zod';
import { Day, Id, MilligramsField, Text } from './fields.ts';

/** Who received how much of a reportable salt, or what was lost of it. */
export const PrecursorRecord = z.strictObject({
  id: Id,
  kind: z.enum(['handover', 'loss']),
  buyName: z.string(),
  saltId: z.string(),
  salt: z.string(),
  legalName: z.string(),
  mg: MilligramsField,
  lot: z.string(),
  onDate: Day,
  handedBy: z.string().nullable(),
  note: z.string(),
  reportedTo: z.string(),
  eraseAfter: Day,
});
export type PrecursorRecord = z.infer<typeof PrecursorRecord>;

/** A reportable salt of a buy, for which a loss can be written down. */
export const RecordedSalt = z.strictObject({
  buyId: Id,
  buyName: z.string(),
  saltId: z.string(),
  salt: z.string(),
});
export type RecordedSalt = z.infer<typeof RecordedSalt>;

export const RecordList = z.strictObject({
  records: z.array(PrecursorRecord),
  salts: z.array(RecordedSalt),
  /** How long the club keeps a record. */
  months: z.int(),
});
export type RecordList = z.infer<typeof RecordList>;

export const LossBody = z.strictObject({
  saltId: z.string().min(1, 'Choose the salt.').max(64),
  mg: z.int().min(1, 'How much is gone?').max(Number.MAX_SAFE_INTEGER),
  lot: Text(80),
  onDate: Day,
  note: Text(1000).min(1, 'Write what happened.'),
  reportedTo: Text(200).min(1, 'Name the place it was reported to, or write “not yet”.'),
});
export type LossBody = z.infer<typeof LossBody>;
