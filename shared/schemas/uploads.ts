import { z } from 'zod';
import { Id, Instant } from './fields.ts';

export const UploadOwnerType = z.enum([
  'offer',
  'supplier',
  'bag',
  'bill',
  'line',
  'buy',
  'supplier_order',
]);
export type UploadOwnerType = z.infer<typeof UploadOwnerType>;

export const UploadPurpose = z.enum(['price_list', 'certificate', 'photo', 'bill', 'safety_sheet']);
export type UploadPurpose = z.infer<typeof UploadPurpose>;

/** A file beside an offer, a bag, a bill and the like. */
export const Upload = z.strictObject({
  id: Id,
  ownerType: UploadOwnerType,
  ownerId: Id,
  purpose: UploadPurpose,
  fileName: z.string(),
  contentType: z.string(),
  bytes: z.int().min(1),
  addedBy: z.string(),
  addedAt: Instant,
});
export type Upload = z.infer<typeof Upload>;

export const UploadList = z.strictObject({
  uploads: z.array(Upload),
  may: z.strictObject({ add: z.boolean() }),
});
export type UploadList = z.infer<typeof UploadList>;

/** Fields beside the file in a multipart request. */
export const UploadBody = z.strictObject({
  ownerType: UploadOwnerType,
  ownerId: Id,
  purpose: UploadPurpose,
});
export type UploadBody = z.infer<typeof UploadBody>;

export const UploadQuery = z.object({ ownerType: UploadOwnerType, ownerId: Id });
export const UploadParams = z.object({ upload: Id });
