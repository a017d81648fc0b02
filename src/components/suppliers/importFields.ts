import type { ImportField } from '#shared/domain/salts/import/columns.ts';
import type { ImportRow } from '#shared/schemas/offerImport.ts';
import type { ChipTone } from 'src/components/common/StateChip.vue';

/** What a column can hold, in the order in which it is asked. */
export const fieldLabels: Record<ImportField, string> = {
  salt: 'Salt',
  pack: 'Pack size',
  price: 'Price',
  includesTax: 'Price includes tax',
  taxRate: 'Tax rate',
  stock: 'Packs in stock',
  multiple: 'Sold in multiples of',
  label: 'Label',
  link: 'Link',
};

export const kindLabels: Record<ImportRow['kind'], { label: string; tone: ChipTone }> = {
  new: { label: 'New', tone: 'moss' },
  change: { label: 'Changes', tone: 'plum' },
  same: { label: 'As it is', tone: 'neutral' },
  bad: { label: 'Mistake', tone: 'danger' },
};

const offers = (count: number) => `${count} ${count === 1 ? 'offer' : 'offers'}`;

/** What saving would do, for the button: "Save 3 new and 1 changed offer". */
export function saveLabel(counts: { new: number; change: number }): string {
  if (counts.change === 0) return `Save ${offers(counts.new).replace(' ', ' new ')}`;
  if (counts.new === 0) return `Save ${offers(counts.change).replace(' ', ' changed ')}`;
  return `Save ${counts.new} new and ${offers(counts.change).replace(' ', ' changed ')}`;
}
