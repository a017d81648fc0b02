import type { UploadPurpose } from '#shared/schemas/uploads.ts';

export const purposeLabels: Record<UploadPurpose, string> = {
  price_list: 'Price list',
  certificate: 'Certificate',
  photo: 'Photo',
  bill: 'Bill',
  safety_sheet: 'Safety data sheet',
};
