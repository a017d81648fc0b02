import type { BillChargeKind } from '#shared/domain/orders/orderTypes.ts';
import { taxByRates } from '#shared/domain/orders/billTaxes.ts';
import type { BillBody, BillReply, BillsReply, SupplierOrder } from '#shared/schemas/orders.ts';

type Basis = NonNullable<BillBody['charges'][number]['basis']>;

export type GoodsRow = {
  offerId: string;
  label: string;
  packs: number;
  amountMinor: number | null;
  taxRatePpm: number;
};
export type ChargeRow = {
  key: number;
  kind: BillChargeKind;
  name: string;
  amountMinor: number | null;
  taxRatePpm: number;
  chargeId: string | null;
  basis: Basis | null;
};
/** A bill while it is typed. */
export type BillForm = {
  version: number;
  supplierId: string | null;
  payee: string;
  number: string;
  billedOn: string | null;
  goods: GoodsRow[];
  charges: ChargeRow[];
  taxMinor: number | null;
  paidBy: 'club' | 'member';
  advancedById: string | null;
};

export const chargeKinds: { value: BillChargeKind; label: string }[] = [
  { value: 'freight', label: 'Freight' },
  { value: 'duty', label: 'Duty' },
  { value: 'bags', label: 'Bags' },
  { value: 'rebate', label: 'Rebate' },
  { value: 'other', label: 'Other' },
];
export const bases: { value: Basis; label: string }[] = [
  { value: 'mass', label: 'By grams' },
  { value: 'value', label: 'By value' },
  { value: 'member', label: 'Equally' },
  { value: 'portion', label: 'By portions' },
];

let keys = 0;
export const newCharge = (fields: Partial<ChargeRow> = {}): ChargeRow => ({
  key: (keys += 1),
  kind: 'other',
  name: '',
  amountMinor: null,
  taxRatePpm: 0,
  chargeId: null,
  basis: null,
  ...fields,
});

type PackWords = (pack: { packMg: number; salt: string; label: string }) => string;

/** What the order lets expect on the supplier's bill: its packs, shipping and planned costs. */
export function expectBill(
  order: SupplierOrder | undefined,
  planned: BillsReply['plannedCharges'],
  taxRates: ReadonlyMap<string, number>,
  say: PackWords,
): Pick<BillForm, 'goods' | 'charges'> {
  const own = planned.filter(
    ({ supplierId, billed }) => !billed && supplierId === (order?.supplierId ?? null),
  );
  const charges = own.map((charge) =>
    newCharge({
      kind: charge.kind,
      name: charge.name,
      amountMinor: charge.amountMinor,
      taxRatePpm: charge.taxRatePpm,
      chargeId: charge.id,
    }),
  );
  if (!order)
    return { goods: [], charges: charges.length > 0 ? charges : [newCharge({ basis: 'mass' })] };
  const goods = order.packs.map((pack) => ({
    offerId: pack.offerId,
    label: say(pack),
    packs: pack.packs,
    amountMinor: pack.packs * pack.priceMinor,
    taxRatePpm: taxRates.get(pack.offerId) ?? 0,
  }));
  const rate = goods[0]?.taxRatePpm ?? 0;
  const shipping =
    order.shippingMinor > 0
      ? [
          newCharge({
            kind: 'freight',
            name: 'Shipping',
            amountMinor: order.shippingMinor,
            taxRatePpm: rate,
          }),
        ]
      : [];
  return { goods, charges: [...shipping, ...charges] };
}

/** A bill that was entered, as the form takes it. */
export function openBill(bill: BillReply, say: PackWords): BillForm {
  return {
    version: bill.version,
    supplierId: bill.supplierId,
    payee: bill.supplierId === null ? bill.payee : '',
    number: bill.number,
    billedOn: bill.billedOn,
    goods: bill.goods.map((row) => ({ ...row, label: say(row) })),
    charges: bill.charges.map((row) => newCharge(row)),
    taxMinor: bill.taxMinor,
    paidBy: bill.paidBy,
    advancedById: bill.advancedBy?.id ?? null,
  };
}

const goodsRows = (form: BillForm) =>
  form.goods
    .filter(({ amountMinor }) => amountMinor !== null)
    .map(({ offerId, packs, amountMinor, taxRatePpm }) => ({
      offerId,
      packs,
      amountMinor: amountMinor ?? 0,
      taxRatePpm,
    }));
const chargeRows = (form: BillForm) =>
  form.charges
    .filter(({ amountMinor, name }) => amountMinor !== null || name !== '')
    .map(({ kind, name, amountMinor, taxRatePpm, chargeId, basis }) => ({
      kind,
      name,
      amountMinor: amountMinor ?? 0,
      taxRatePpm,
      chargeId,
      basis,
    }));

export const billTotal = (form: BillForm) =>
  [...goodsRows(form), ...chargeRows(form)].reduce((sum, row) => sum + row.amountMinor, 0);

/** The tax that the rows' rates contain, until the bill's own figure is typed. */
export const rateTax = (form: BillForm) =>
  taxByRates({
    goods: goodsRows(form).map((row) => ({ ...row, lineId: '' })),
    charges: chargeRows(form).map((row) => ({ ...row, basis: 'mass', lineIds: null })),
  });

export const billBody = (form: BillForm): BillBody => ({
  version: form.version,
  supplierId: form.supplierId,
  payee: form.payee,
  number: form.number,
  billedOn: form.billedOn ?? '',
  goods: goodsRows(form),
  charges: chargeRows(form),
  taxMinor: form.taxMinor ?? 0,
  paidBy: form.paidBy,
  advancedById: form.paidBy === 'member' ? form.advancedById : null,
});
