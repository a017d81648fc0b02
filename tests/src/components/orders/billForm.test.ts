import { describe, expect, it } from 'vitest';
import type { BillsReply, SupplierOrder } from '#shared/schemas/orders.ts';
import {
  billBody,
  billTotal,
  expectBill,
  newCharge,
  rateTax,
  type BillForm,
} from 'src/components/orders/billForm.ts';

const order: SupplierOrder = {
  id: 'order',
  supplierId: 'grainmoor',
  supplierName: 'Grainmoor Salts',
  supplierEmail: '',
  supplierContact: '',
  isShelf: false,
  state: 'placed',
  version: 2,
  packs: [
    {
      offerId: 'sack',
      lineId: 'line',
      salt: 'Potassium nitrate',
      formula: 'KNO3',
      label: '',
      packs: 2,
      packMg: 25_000_000,
      lockedMinor: 9500,
      priceMinor: 9900,
    },
  ],
  goodsMinor: 19_800,
  lockedShippingMinor: 1200,
  shippingMinor: 1250,
  totalMinor: 21_050,
  quotedAt: null,
  reference: '',
  note: '',
  placedOn: '2026-11-20',
  placedBy: 'Noor Valdane',
  billed: false,
};
const planned: BillsReply['plannedCharges'] = [
  {
    id: 'duty',
    kind: 'duty',
    name: 'Duty',
    supplierId: 'grainmoor',
    amountMinor: 800,
    taxRatePpm: 0,
    billed: false,
  },
  {
    id: 'bags',
    kind: 'bags',
    name: 'Zip bags',
    supplierId: null,
    amountMinor: 480,
    taxRatePpm: 190_000,
    billed: false,
  },
];
const rates = new Map([['sack', 190_000]]);
const say = ({ salt }: { salt: string }) => salt;
const formOf = (fields: Partial<BillForm>): BillForm => ({
  version: 0,
  supplierId: 'grainmoor',
  payee: '',
  number: '',
  billedOn: '2026-11-24',
  goods: [],
  charges: [],
  taxMinor: null,
  paidBy: 'club',
  advancedById: null,
  ...fields,
});

describe('a bill while it is typed', () => {
  it('begins with what the order and the terms let expect', () => {
    const form = formOf(expectBill(order, planned, rates, say));
    expect(form.goods).toMatchObject([{ offerId: 'sack', packs: 2, amountMinor: 19_800 }]);
    expect(form.charges.map(({ name, chargeId }) => [name, chargeId])).toEqual([
      ['Shipping', null],
      ['Duty', 'duty'],
    ]);
    expect(billTotal(form)).toBe(19_800 + 1250 + 800);
    // 19 % contained in goods and shipping: 31.61 and 2.00, none in the duty.
    expect(rateTax(form)).toBe(3161 + 200);
  });

  it('leaves a planned cost out once a bill has it', () => {
    const billed = planned.map((charge) => ({ ...charge, billed: true }));
    expect(expectBill(order, billed, rates, say).charges).toHaveLength(1);
    expect(expectBill(undefined, planned, rates, say).charges).toMatchObject([
      { name: 'Zip bags', chargeId: 'bags' },
    ]);
    expect(expectBill(undefined, billed, rates, say).charges).toMatchObject([
      { name: '', basis: 'mass' },
    ]);
  });

  it('sends neither empty rows nor an advancer when the club pays', () => {
    const body = billBody(
      formOf({
        charges: [newCharge(), newCharge({ name: 'Carriage', amountMinor: 500 })],
        taxMinor: 80,
        advancedById: 'somebody',
      }),
    );
    expect(body.charges).toEqual([
      {
        kind: 'other',
        name: 'Carriage',
        amountMinor: 500,
        taxRatePpm: 0,
        chargeId: null,
        basis: null,
      },
    ]);
    expect(body).toMatchObject({ advancedById: null, taxMinor: 80, goods: [] });
  });
});
