import { supplierOfShipping } from '#shared/domain/buys/boughtPacks.ts';
import type { SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import { explainStep } from '#shared/domain/shares/explainStep.ts';
import type { MemberShare, ShareSheet } from '#shared/domain/shares/shareTypes.ts';
import type { Slip, SlipRow } from '#shared/schemas/orders.ts';

/** How a charge is called on a slip, by its id. */
export function chargeName(
  terms: SheetTerms,
  chargeId: string,
  names: Readonly<Record<string, string>> = {},
): string {
  const supplierId = supplierOfShipping(chargeId);
  if (supplierId !== null) {
    const supplier = terms.suppliers.find(({ id }) => id === supplierId);
    return supplier ? `Shipping, ${supplier.name}` : 'Shipping';
  }
  return names[chargeId] ?? terms.charges.find(({ id }) => id === chargeId)?.name ?? 'Charge';
}

function stepsOf(share: MemberShare, key: 'lineId' | 'chargeId', id: string, currency: string) {
  return share.steps
    .filter(({ values }) => values[key] === id)
    .map((step) => explainStep(step, currency));
}

/** One member's share as a slip, each figure with its arithmetic; null when they have none. */
export function presentSlip(
  terms: SheetTerms,
  sheet: ShareSheet,
  member: { id: string; name: string },
  names?: Readonly<Record<string, string>>,
): Slip | null {
  const share = sheet.members.find(({ memberId }) => memberId === member.id);
  if (!share) return null;
  const salts = new Map(terms.lines.map(({ id, salt }) => [id, salt.name]));
  const order = new Map(terms.lines.map(({ id }, index) => [id, index]));
  const lines = [...share.lines]
    .sort((a, b) => (order.get(a.lineId) ?? 0) - (order.get(b.lineId) ?? 0))
    .map(({ lineId, mg, costMinor }): SlipRow => ({
      label: salts.get(lineId) ?? lineId,
      mg,
      minor: costMinor,
      steps: stepsOf(share, 'lineId', lineId, terms.currency),
    }));
  const charges = share.charges
    .filter(({ minor }) => minor !== 0)
    .map(({ id, minor }): SlipRow => ({
      label: chargeName(terms, id, names),
      mg: null,
      minor,
      steps: stepsOf(share, 'chargeId', id, terms.currency),
    }));
  const taxes = [...share.lines, ...share.charges].map(({ taxMinor }) => taxMinor);
  return {
    member,
    lines,
    charges,
    totalMinor: share.totalMinor,
    taxMinor: taxes.reduce((sum, tax) => sum + tax, 0),
  };
}
