import type { SheetCharge, SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import type { BillCharge, BillChargeKind, BillGoods } from '#shared/domain/orders/orderTypes.ts';
import type { ChargeBasis } from '#shared/domain/shares/shareTypes.ts';
import type { BillBody } from '#shared/schemas/orders.ts';
import { invalid } from '../problem.ts';
import type { OrderBook } from './orderBook.ts';

/** How a cost is divided where neither a planned charge nor the organiser says so. */
const usualBasis: Record<BillChargeKind, ChargeBasis> = {
  freight: 'mass',
  duty: 'value',
  rebate: 'value',
  bags: 'portion',
  other: 'mass',
};

function basisOf(
  row: BillBody['charges'][number],
  planned: SheetCharge | undefined,
  terms: SheetTerms,
  supplierId: string | null,
): ChargeBasis {
  if (planned) return planned.basis;
  if (row.basis) return row.basis;
  const supplier = terms.suppliers.find(({ id }) => id === supplierId);
  if (row.kind === 'freight' && supplier) {
    return supplier.shipping.kind === 'byValue' ? 'value' : 'mass';
  }
  return usualBasis[row.kind];
}

/**
 * A bill's rows with the lines they belong to and how they are divided.
 * @throws DomainProblem 422 at `goods.N.offerId`, `charges.N.chargeId` or `charges.N.amountMinor`
 */
export function billRows(
  book: OrderBook,
  body: Pick<BillBody, 'supplierId' | 'goods' | 'charges'>,
): { goods: BillGoods[]; charges: BillCharge[] } {
  const { terms } = book;
  const order = book.orders.find(({ supplierId }) => supplierId === body.supplierId);
  const goods = body.goods.map((row, index): BillGoods => {
    const pack = order?.packs.find(({ offerId }) => offerId === row.offerId);
    if (!pack) throw invalid({ [`goods.${index}.offerId`]: 'This pack is not in the order.' });
    return { ...row, lineId: pack.lineId };
  });
  const charges = body.charges.map((row, index): BillCharge => {
    const planned = terms.charges.find(({ id }) => id === row.chargeId);
    if (row.chargeId !== null && !planned) {
      throw invalid({ [`charges.${index}.chargeId`]: 'This cost is not in the terms.' });
    }
    if (row.kind === 'rebate' ? row.amountMinor > 0 : row.amountMinor < 0) {
      throw invalid({
        [`charges.${index}.amountMinor`]:
          row.kind === 'rebate' ? 'A rebate goes below zero.' : 'Only a rebate goes below zero.',
      });
    }
    return {
      kind: row.kind,
      name: row.name,
      amountMinor: row.amountMinor,
      taxRatePpm: row.taxRatePpm,
      basis: basisOf(row, planned, terms, body.supplierId),
      lineIds: body.supplierId === null ? (planned?.lineIds ?? null) : null,
      chargeId: row.chargeId,
    };
  });
  return { goods, charges };
}
