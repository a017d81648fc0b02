import { z } from 'zod';
import { Id, Instant, MilligramsField, MinorField, Text, Version } from './fields.ts';
import { SaltId } from './salts.ts';

const Money = MinorField.min(0, 'Not below 0.');

const Steps = z
  .array(
    z.strictObject({
      upTo: z.int('Write a number.').min(1, 'More than 0.').max(Number.MAX_SAFE_INTEGER).nullable(),
      minor: Money,
    }),
  )
  .min(1, 'Add a step.')
  .max(30, 'At most 30 steps.')
  .superRefine((steps, context) => {
    steps.forEach(({ upTo }, index) => {
      const before = steps[index - 1];
      if (!before) return;
      if (before.upTo === null) {
        const message = 'Only the last step may be without an end.';
        context.addIssue({ code: 'custom', path: [index - 1, 'upTo'], message });
      } else if (upTo !== null && upTo <= before.upTo) {
        const message = 'Each step must reach further than the one before.';
        context.addIssue({ code: 'custom', path: [index, 'upTo'], message });
      }
    });
  });

/** What a supplier charges to ship: steps in mg or minor units, up to and including `upTo`, null without end. */
export const ShippingField = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('flat'), minor: Money }),
  z.strictObject({ kind: z.literal('byMass'), steps: Steps }),
  z.strictObject({ kind: z.literal('byValue'), steps: Steps }),
]);
export type ShippingField = z.infer<typeof ShippingField>;

const Link = Text(500).refine((text) => text === '' || z.httpUrl().safeParse(text).success, {
  message: 'A web address starts with https:// or http://.',
});

export const SupplierBody = z.strictObject({
  name: z.string().trim().min(1, 'Write a name.').max(80, 'At most 80 characters.'),
  contact: Text(300),
  email: Text(254).refine((text) => text === '' || z.email().safeParse(text).success, {
    message: 'This is not an e-mail address.',
  }),
  website: Link,
  note: Text(1000),
  shipping: ShippingField,
  freeShippingFromMinor: Money.nullable(),
  minimumOrderMinor: Money.nullable(),
});
export type SupplierBody = z.infer<typeof SupplierBody>;
export const SupplierChange = SupplierBody.extend({ version: Version });
export type SupplierChange = z.infer<typeof SupplierChange>;

export const Supplier = z.strictObject({
  id: Id,
  ...SupplierBody.shape,
  /** The club's own shelf: kept by the app, nobody edits it. */
  isShelf: z.boolean(),
  archivedAt: Instant.nullable(),
  version: Version,
  /** Offers that are not archived. */
  offers: z.int().min(0),
});
export type Supplier = z.infer<typeof Supplier>;

export const SupplierList = z.strictObject({
  suppliers: z.array(Supplier),
  may: z.strictObject({ edit: z.boolean() }),
});
export type SupplierList = z.infer<typeof SupplierList>;

export const OfferBody = z.strictObject({
  saltId: SaltId,
  label: Text(80),
  packMg: MilligramsField.min(1, 'Write the pack size.'),
  priceMinor: Money,
  priceIncludesTax: z.boolean(),
  /** 190 000 is 19 %. */
  taxRatePpm: z.int('Write a number.').min(0, 'Not below 0.').max(1_000_000, 'At most 100 %.'),
  stockPacks: z
    .int('Whole packs.')
    .min(0, 'Not below 0.')
    .max(1_000_000, 'At most 1 000 000.')
    .nullable(),
  multipleOf: z.int('Whole packs.').min(1, 'At least 1.').max(10_000, 'At most 10 000.'),
  link: Link,
});
export type OfferBody = z.infer<typeof OfferBody>;
export const OfferChange = OfferBody.extend({ version: Version });
export type OfferChange = z.infer<typeof OfferChange>;

export const Offer = z.strictObject({
  id: Id,
  supplierId: Id,
  ...OfferBody.shape,
  /** Open buys with a line that draws on it: their members are told of a change. */
  openBuys: z.int().min(0),
  archivedAt: Instant.nullable(),
  updatedAt: Instant,
  version: Version,
});
export type Offer = z.infer<typeof Offer>;

export const SupplierPage = z.strictObject({
  supplier: Supplier,
  offers: z.array(Offer),
  may: z.strictObject({ edit: z.boolean() }),
});
export type SupplierPage = z.infer<typeof SupplierPage>;

/** One price an offer had, the newest first. */
export const OfferPrice = z.strictObject({
  priceMinor: MinorField,
  priceIncludesTax: z.boolean(),
  taxRatePpm: z.int(),
  setBy: z.string().nullable(),
  setAt: Instant,
});
export type OfferPrice = z.infer<typeof OfferPrice>;
export const OfferPrices = z.strictObject({ prices: z.array(OfferPrice) });

export const SupplierParams = z.object({ supplier: Id });
export const OfferParams = z.object({ supplier: Id, offer: Id });
