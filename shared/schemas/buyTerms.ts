import { z } from 'zod';
import { BuyHeader, BuyName, LeftOverPayer, MinimumKind } from './buys.ts';
import { Id, Instant, MilligramsField, MinorField, Text, Version } from './fields.ts';
import { SheetTerms } from './sheet.ts';

const SaltId = z.string().trim().min(1, 'Choose a salt.').max(80);
const Ppm = z.int().min(0).max(1_000_000);

/** An offer that a line may draw on; `gone`: its supplier or the offer itself was archived. */
export const DraftOffer = z.strictObject({
  id: Id,
  saltId: z.string(),
  supplierId: Id,
  supplierName: z.string(),
  label: z.string(),
  packMg: MilligramsField,
  priceMinor: MinorField,
  priceIncludesTax: z.boolean(),
  taxRatePpm: z.int(),
  stockPacks: z.int().nullable(),
  multipleOf: z.int(),
  gone: z.boolean(),
});
export type DraftOffer = z.infer<typeof DraftOffer>;

/** A line as its organiser edits it. It draws on `offerIds`, or on any offer of one supplier. */
export const DraftLine = z.strictObject({
  id: Id,
  saltId: z.string(),
  name: z.string(),
  formula: z.string().nullable(),
  classified: z.boolean(),
  reportable: z.boolean(),
  /** Why this salt can't be a line (any more), in plain words. */
  refusal: z.string().nullable(),
  stepMg: MilligramsField,
  reservePermyriad: z.int(),
  surplus: z.enum(['spread', 'shelf']),
  shortage: z.enum(['scale', 'queue']),
  anyOfSupplierId: Id.nullable(),
  offerIds: z.array(Id),
  note: z.string(),
  pledgers: z.int(),
  pledgedMg: MilligramsField,
});
export type DraftLine = z.infer<typeof DraftLine>;

export const DraftSupplier = z.strictObject({ id: Id, name: z.string(), isShelf: z.boolean() });
export type DraftSupplier = z.infer<typeof DraftSupplier>;

/** All that the editor of a buy shows besides its head; `sheet`: the same terms as the sums take them. */
export const BuyTerms = z.strictObject({
  termsVersion: Version,
  lines: z.array(DraftLine),
  /** Offers for the lines' salts: all living ones, and those chosen that are gone. */
  offers: z.array(DraftOffer),
  suppliers: z.array(DraftSupplier),
  sheet: SheetTerms,
  /** What keeps a draft from opening, by field. */
  blocks: z.record(z.string(), z.string()),
});
export type BuyTerms = z.infer<typeof BuyTerms>;

/** What a change of an open buy's terms does: the words that everybody gets, and the sums before and after. */
export const TermsEffect = z.strictObject({
  summary: z.string(),
  told: z.int(),
  beforeMinor: MinorField.nullable(),
  afterMinor: MinorField.nullable(),
});
export type TermsEffect = z.infer<typeof TermsEffect>;

/** Reply of every change of the terms; with `preview` nothing was saved and only `effect` is new. */
export const TermsReply = z.strictObject({
  head: BuyHeader,
  terms: BuyTerms,
  effect: TermsEffect.nullable(),
});
export type TermsReply = z.infer<typeof TermsReply>;

const seen = { termsVersion: Version, preview: z.boolean().optional() };

/** Any of a buy's own fields. */
export const HeadBody = z
  .strictObject({
    name: BuyName,
    closesAt: Instant.nullable(),
    splitsAt: Instant.nullable(),
    splitEndsAt: Instant.nullable(),
    place: Text(300),
    pickupRules: Text(1000),
    note: Text(2000),
    minimumKind: MinimumKind,
    minimumAmount: z.int().min(0).max(Number.MAX_SAFE_INTEGER),
    priceLimitPermille: z.int().min(0, 'From 0 %.').max(1000, 'Up to 100 %.'),
    dueDays: z.int().min(0, 'From 0 days.').max(90, 'Up to 90 days.'),
    loweringFreezeHours: z.int().min(0, 'From 0 hours.').max(336, 'Up to 336 hours.'),
    leftOverPayer: LeftOverPayer,
    shelfLimitMinor: MinorField.min(0),
    spreadMaxPermille: z.int().min(0, 'From 0 %.').max(100, 'Up to 10 %.'),
    bandPermille: z.int().min(0, 'From 0 %.').max(100, 'Up to 10 %.'),
    unclaimedDays: z.int().min(1, 'From 1 day.').max(365, 'Up to 365 days.'),
  })
  .partial()
  .extend(seen);
export type HeadBody = z.infer<typeof HeadBody>;

const lineFields = {
  stepMg: MilligramsField.min(1, 'From 1 mg.').max(10_000_000, 'Up to 10 kg.'),
  reservePermyriad: z.int().min(0, 'From 0 %.').max(300, 'Up to 3 %.'),
  surplus: z.enum(['spread', 'shelf']),
  shortage: z.enum(['scale', 'queue']),
  anyOfSupplierId: Id.nullable(),
  offerIds: z.array(Id).max(50),
  note: Text(500),
};

/** A new line; what is left out is the default, all living offers of the salt included. */
export const LineBody = z
  .strictObject(lineFields)
  .partial()
  .extend({ ...seen, saltId: SaltId });
export type LineBody = z.infer<typeof LineBody>;

export const LineChange = z.strictObject({ ...lineFields, ...seen });
export type LineChange = z.infer<typeof LineChange>;

export const LineOrder = z.strictObject({ termsVersion: Version, lineIds: z.array(Id).max(200) });
export type LineOrder = z.infer<typeof LineOrder>;

export const ChargeKind = z.enum(['freight', 'duty', 'bags', 'rebate', 'other']);
export const ChargeBody = z.strictObject({
  ...seen,
  kind: ChargeKind,
  name: Text(80).min(1, 'Write a name.'),
  /** Below zero for a rebate. */
  amountMinor: MinorField,
  basis: z.enum(['mass', 'value', 'member', 'portion']),
  /** Belongs to this supplier's lines; else to `lineIds`; else to all. */
  supplierId: Id.nullable(),
  lineIds: z.array(Id).min(1, 'Choose at least one line.').max(200).nullable(),
  taxRatePpm: Ppm,
});
export type ChargeBody = z.infer<typeof ChargeBody>;

export const TermsBody = z.strictObject(seen);
export type TermsBody = z.infer<typeof TermsBody>;

export const NewBuyBody = z.strictObject({ name: BuyName.optional() });
export type NewBuyBody = z.infer<typeof NewBuyBody>;

export const OpenBody = z.strictObject({ termsVersion: Version });
export type OpenBody = z.infer<typeof OpenBody>;

export const CancelBody = z.strictObject({
  termsVersion: Version,
  reason: Text(500).min(3, 'Say why, for everyone who pledged.'),
});
export type CancelBody = z.infer<typeof CancelBody>;

/** A salt that may be picked for a line, or why it may not. */
export const LineChoice = z.strictObject({
  saltId: z.string(),
  name: z.string(),
  otherNames: z.array(z.string()),
  formula: z.string().nullable(),
  classified: z.boolean(),
  reportable: z.boolean(),
  refusal: z.string().nullable(),
  offers: z.int(),
});
export type LineChoice = z.infer<typeof LineChoice>;
export const LineChoices = z.strictObject({ salts: z.array(LineChoice) });
export type LineChoices = z.infer<typeof LineChoices>;

export const LineParams = z.object({ line: Id });
export const ChargeParams = z.object({ charge: Id });
