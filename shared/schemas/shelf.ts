import { z } from 'zod';
import { Id, Instant, MilligramsField, MinorField, Version } from './fields.ts';

/** What lies on the club's shelf of one lot. */
export const ShelfStock = z.strictObject({
  id: Id,
  saltId: z.string(),
  salt: z.string(),
  formula: z.string().nullable(),
  signalWord: z.string().nullable(),
  hazards: z.array(z.string()),
  classified: z.boolean(),
  reportable: z.boolean(),
  lot: z.string(),
  buyName: z.string().nullable(),
  origin: z.enum(['left_over', 'unclaimed']),
  mg: MilligramsField,
  priceMinorPerKg: MinorField.nullable(),
  version: Version,
});
export type ShelfStock = z.infer<typeof ShelfStock>;

export const ShelfSale = z.strictObject({
  id: Id,
  salt: z.string(),
  lot: z.string(),
  name: z.string(),
  mg: MilligramsField,
  priceMinor: MinorField,
  soldBy: z.string(),
  at: Instant,
  undone: z.boolean(),
  /** Whether the reader may take it back. */
  mayUndo: z.boolean(),
});
export type ShelfSale = z.infer<typeof ShelfSale>;

export const ShelfPerson = z.strictObject({
  membershipId: Id,
  name: z.string(),
  isGuest: z.boolean(),
  legalNameKnown: z.boolean(),
  /** Classified salts this person has confirmed, in the app or, a guest, on paper. */
  confirmed: z.array(z.string()),
});
export type ShelfPerson = z.infer<typeof ShelfPerson>;

export const Shelf = z.strictObject({
  stock: z.array(ShelfStock),
  /** The latest hundred; empty for those who may not sell. */
  sales: z.array(ShelfSale),
  /** Who can buy; empty for those who may not sell. */
  people: z.array(ShelfPerson),
  may: z.strictObject({ price: z.boolean(), sell: z.boolean() }),
});
export type Shelf = z.infer<typeof Shelf>;

export const PriceBody = z.strictObject({
  priceMinorPerKg: z.int().min(0).max(100_000_000).nullable(),
  version: Version,
});
export type PriceBody = z.infer<typeof PriceBody>;

/** A sale at the meetup. `id` is made on the device. */
export const SaleBody = z.strictObject({
  id: Id,
  membershipId: Id,
  mg: z.int().min(1, 'How many grams?').max(Number.MAX_SAFE_INTEGER),
  legalName: z.string().trim().max(120).nullable(),
  /** The guest's signed paper for a classified salt is in the seller's hand. */
  paperSigned: z.boolean(),
});
export type SaleBody = z.infer<typeof SaleBody>;
