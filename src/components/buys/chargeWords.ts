import type { BuyTerms } from '#shared/schemas/buyTerms.ts';

type Charge = BuyTerms['sheet']['charges'][number];

/** How a charge is shared, in words. */
export const chargeBases: Readonly<Record<Charge['basis'], string>> = {
  mass: 'shared by weight',
  value: 'shared by value',
  member: 'each the same',
  portion: 'by portion',
};

/** What it is called unless somebody says otherwise. */
export const chargeNames: Readonly<Record<Charge['kind'], string>> = {
  freight: 'Freight',
  duty: 'Duty',
  bags: 'Bags and labels',
  rebate: 'Rebate',
  other: '',
};

/** How a kind is shared unless somebody says otherwise. */
export const usualBases: Readonly<Record<Charge['kind'], Charge['basis']>> = {
  freight: 'mass',
  duty: 'value',
  bags: 'portion',
  rebate: 'value',
  other: 'member',
};

/** Whose lines a charge belongs to, in words. */
export function chargeBelongs(
  { supplierId, lineIds }: Pick<Charge, 'supplierId' | 'lineIds'>,
  terms: BuyTerms,
): string {
  if (supplierId) {
    const supplier = terms.suppliers.find(({ id }) => id === supplierId);
    return `lines from ${supplier?.name ?? 'a supplier'}`;
  }
  if (!lineIds) return 'all lines';
  return terms.lines
    .filter(({ id }) => lineIds.includes(id))
    .map(({ name }) => name)
    .join(', ');
}
