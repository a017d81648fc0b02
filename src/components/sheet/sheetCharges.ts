import { supplierOfShipping } from '#shared/domain/buys/boughtPacks.ts';
import type { SheetTerms } from '#shared/domain/buys/sheetTerms.ts';

const bases = {
  mass: 'by weight',
  value: 'by value',
  member: 'each',
  portion: 'by portion',
} as const;

/** A charge's name as a slip shows it: "Freight, by weight"; a supplier's own shipping by its name. */
export function nameCharge(id: string, terms: SheetTerms): string {
  const supplierId = supplierOfShipping(id);
  if (supplierId !== null) {
    const supplier = terms.suppliers.find((one) => one.id === supplierId);
    const basis = supplier?.shipping.kind === 'byValue' ? bases.value : bases.mass;
    return `Shipping from ${supplier?.name ?? 'a supplier'}, ${basis}`;
  }
  const charge = terms.charges.find((one) => one.id === id);
  return charge ? `${charge.name}, ${bases[charge.basis]}` : 'Charge';
}
