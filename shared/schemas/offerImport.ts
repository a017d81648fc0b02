import { z } from 'zod';
import { importFields } from '../domain/salts/import/columns.ts';
import { Id } from './fields.ts';
import { OfferBody } from './suppliers.ts';

export const ImportFieldName = z.enum(importFields);

/** Which column holds what, the decimal mark and the unit of bare sizes; null: not chosen, the app guesses. */
export const ImportRules = z.strictObject({
  columns: z.partialRecord(ImportFieldName, z.int().min(0).max(200)).nullable(),
  decimalMark: z.enum(['point', 'comma']).nullable(),
  packUnit: z.enum(['g', 'kg']).nullable(),
  /** For new offers of tables that don't say. */
  priceIncludesTax: z.boolean(),
  taxRatePpm: z.int().min(0).max(1_000_000),
});
export type ImportRules = z.infer<typeof ImportRules>;

const json = <T>(schema: z.ZodType<T>) =>
  z
    .string()
    .max(10_000)
    .transform((text, context) => {
      try {
        return JSON.parse(text) as unknown;
      } catch {
        context.addIssue({ code: 'custom', message: 'This is no JSON.' });
        return z.NEVER;
      }
    })
    .pipe(schema);

/** Multipart: the file and `rules` as JSON. */
export const ImportPreviewBody = z.strictObject({ rules: json(ImportRules) });

/** The same with what the preview showed: refused when the offers have changed since. */
export const ImportBody = z.strictObject({
  rules: json(ImportRules),
  seen: z.string().length(64),
  leaveOutBad: z.enum(['yes', 'no']),
});

/** One row: what it is taken for, and what is wrong in it by field. */
export const ImportRow = z.strictObject({
  /** The line in the file where it begins, from 1. */
  line: z.int().min(1),
  kind: z.enum(['new', 'change', 'same', 'bad']),
  cells: z.partialRecord(ImportFieldName, z.string()),
  errors: z.partialRecord(z.enum([...importFields, 'row']), z.string()),
  saltName: z.string().nullable(),
  /** The offer as it will stand; null for a bad row. */
  offer: OfferBody.nullable(),
  offerId: Id.nullable(),
  /** The price now, where an offer changes. */
  beforeMinor: z.int().nullable(),
});
export type ImportRow = z.infer<typeof ImportRow>;

export const ImportPreview = z.strictObject({
  headers: z.array(z.string()),
  delimiter: z.enum([',', ';', 'tab']),
  /** As used: guessed where nothing was chosen. */
  rules: z.strictObject({
    columns: z.partialRecord(ImportFieldName, z.int().min(0)),
    decimalMark: z.enum(['point', 'comma']).nullable(),
    packUnit: z.enum(['g', 'kg']),
    priceIncludesTax: z.boolean(),
    taxRatePpm: z.int(),
  }),
  missing: z.array(ImportFieldName),
  rows: z.array(ImportRow),
  counts: z.strictObject({
    new: z.int(),
    change: z.int(),
    same: z.int(),
    bad: z.int(),
  }),
  seen: z.string(),
});
export type ImportPreview = z.infer<typeof ImportPreview>;

export const ImportDone = z.strictObject({
  added: z.int(),
  changed: z.int(),
  same: z.int(),
  leftOut: z.int(),
});
export type ImportDone = z.infer<typeof ImportDone>;
