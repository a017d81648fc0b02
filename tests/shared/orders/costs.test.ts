import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { billTaxes, taxByRates } from '#shared/domain/orders/billTaxes.ts';
import { bookedMinor, costsOf, type CostFacts } from '#shared/domain/orders/costs.ts';
import type { BillFacts, OrderFacts } from '#shared/domain/orders/orderTypes.ts';

const order = (
  supplierId: string,
  lineIds: string[],
  fields: Partial<OrderFacts> = {},
): OrderFacts => ({
  supplierId,
  isShelf: false,
  state: 'placed',
  packs: lineIds.map((lineId) => ({
    offerId: `${supplierId}-${lineId}`,
    lineId,
    packs: 2,
    packMg: 5_000_000,
    priceMinor: 1000,
  })),
  shippingMinor: 500,
  shippingBasis: 'mass',
  ...fields,
});
const bill = (
  supplierId: string | null,
  amounts: Record<string, number>,
  freight = 0,
): BillFacts => ({
  id: `bill-${supplierId}`,
  supplierId,
  goods: Object.entries(amounts).map(([lineId, amountMinor]) => ({
    offerId: `${supplierId}-${lineId}`,
    lineId,
    packs: 2,
    amountMinor,
    taxRatePpm: 190_000,
  })),
  charges:
    freight === 0
      ? []
      : [
          {
            kind: 'freight',
            name: 'Freight',
            amountMinor: freight,
            taxRatePpm: 190_000,
            basis: 'mass',
            lineIds: null,
            chargeId: null,
          },
        ],
  taxMinor: 0,
});
const locked = {
  members: [
    { memberId: 'ana', lines: [{ lineId: 'a', mg: 6, costMinor: 3000, taxMinor: 0 }] },
    {
      memberId: 'ben',
      lines: [
        { lineId: 'a', mg: 2, costMinor: 1000, taxMinor: 0 },
        { lineId: 'b', mg: 4, costMinor: 2000, taxMinor: 0 },
      ],
    },
  ].map((member) => ({ ...member, charges: [], totalMinor: 0, steps: [], why: [] })),
};
const base: CostFacts = {
  orders: [],
  bills: [],
  refunds: [],
  losses: [],
  arrivedMg: null,
  locked,
};

describe('costsOf', () => {
  it('takes the order prices until a bill is there, and names the supplier', () => {
    const costs = costsOf({ ...base, orders: [order('s', ['a'])] });
    expect(costs.received.lines).toEqual({
      a: { availableMg: 10_000_000, costMinor: 2000, taxRate: 0 },
    });
    expect(costs.received.charges).toMatchObject([{ id: 'shipping:s', amountMinor: 500 }]);
    expect(costs.unbilled).toEqual(['s']);
  });

  it('takes the bill, and only the bill, once it is there', () => {
    const costs = costsOf({
      ...base,
      orders: [order('s', ['a'])],
      bills: [{ ...bill('s', { a: 2140 }, 600), taxMinor: 437 }],
    });
    expect(costs.received.lines.a?.costMinor).toBe(2140);
    expect(costs.received.charges).toMatchObject([
      { id: 'bill:bill-s:0', amountMinor: 600, basis: 'mass', lineIds: ['a'] },
    ]);
    expect(costs).toMatchObject({ totalMinor: 2740, unbilled: [], lost: [] });
  });

  it('keeps the order prices beside a bill of duty alone', () => {
    const duty = { ...bill('s', {}, 300) };
    const costs = costsOf({ ...base, orders: [order('s', ['a'])], bills: [duty] });
    expect(costs.totalMinor).toBe(2000 + 500 + 300);
    expect(costs.unbilled).toEqual(['s']);
  });

  it('lets members of a failed supplier’s lines bear what stays lost, by what they locked', () => {
    const facts = {
      ...base,
      orders: [order('s', ['a'], { state: 'failed' })],
      bills: [bill('s', { a: 2000 }, 400)],
      refunds: [{ id: 'r', supplierId: 's', amountMinor: 1000 }],
      losses: [{ id: 'l', supplierId: 's', amountMinor: 400 }],
    };
    expect(costsOf(facts)).toMatchObject({
      received: { lines: {}, charges: [] },
      lost: [
        { memberId: 'ana', minor: 750 },
        { memberId: 'ben', minor: 250 },
      ],
      totalMinor: 1000,
    });
  });

  it('bears a line of which nothing came, and lowers others by a refund beyond it', () => {
    const costs = costsOf({
      ...base,
      orders: [order('s', ['a', 'b'], { state: 'short' })],
      bills: [bill('s', { a: 2000, b: 1000 })],
      refunds: [{ id: 'r', supplierId: 's', amountMinor: 1200 }],
      arrivedMg: { a: 9_900_000 },
    });
    expect(costs.lost).toEqual([]);
    expect(costs.received.charges).toMatchObject([
      { id: 'refund:r', amountMinor: -200, lineIds: ['a'] },
    ]);
    expect(costs.totalMinor).toBe(1800);
  });

  it('takes the shelf at its price without a bill', () => {
    const facts = { ...base, orders: [order('shelf', ['a'], { isShelf: true, shippingMinor: 0 })] };
    expect(costsOf(facts)).toMatchObject({ totalMinor: 2000, unbilled: [] });
    expect(bookedMinor(facts)).toBe(2000);
  });
});

const cents = fc.nat(50_000);
const randomFacts = fc.record({
  states: fc.array(fc.constantFrom('placed', 'confirmed', 'arrived', 'short', 'failed'), {
    minLength: 3,
    maxLength: 3,
  }),
  goods: fc.array(cents, { minLength: 6, maxLength: 6 }),
  freight: fc.array(cents, { minLength: 4, maxLength: 4 }),
  refunds: fc.array(cents, { maxLength: 3 }),
  losses: fc.array(cents, { maxLength: 3 }),
  arrived: fc.option(fc.record({ a: fc.nat(3), b: fc.nat(3), c: fc.nat(3) })),
});

describe('costs, for any bills', () => {
  it('shares out exactly what the books hold', () => {
    fc.assert(
      fc.property(randomFacts, ({ states, goods, freight, refunds, losses, arrived }) => {
        const suppliers = ['s0', 's1', 's2'];
        const lines = [
          ['a', 'b'],
          ['b', 'c'],
          ['a', 'c'],
        ];
        const facts: CostFacts = {
          ...base,
          orders: suppliers.map((id, index) =>
            order(id, lines[index] ?? [], { state: states[index] as OrderFacts['state'] }),
          ),
          bills: [
            ...suppliers.map((id, index) =>
              bill(
                id,
                Object.fromEntries(
                  (lines[index] ?? []).map((line, place) => [line, goods[index * 2 + place] ?? 0]),
                ),
                freight[index],
              ),
            ),
            bill(null, {}, freight[3]),
          ],
          refunds: refunds.map((amountMinor, index) => ({
            id: `r${index}`,
            supplierId: suppliers[index] ?? 's0',
            amountMinor,
          })),
          losses: losses.map((amountMinor, index) => ({
            id: `l${index}`,
            supplierId: index === 0 ? null : (suppliers[index] ?? 's0'),
            amountMinor,
          })),
          arrivedMg: arrived,
        };
        expect(costsOf(facts).totalMinor).toBe(bookedMinor(facts));
      }),
    );
  });
});

describe('the tax of a bill', () => {
  it('is what the bill says, by what the rates contain', () => {
    const paper = { ...bill('s', { a: 11_900, b: 5_350 }), taxMinor: 2_300 };
    expect(taxByRates(paper)).toBe(1900 + 854);
    expect(billTaxes(paper).reduce((sum, tax) => sum + tax, 0)).toBe(2_300);
  });

  it('sums to the bill’s tax, rebates included', () => {
    fc.assert(
      fc.property(
        fc.array(fc.integer({ min: -2000, max: 20_000 }), { minLength: 1, maxLength: 6 }),
        fc.nat(3000),
        (amounts, taxMinor) => {
          const charges = amounts.map((amountMinor) => ({
            kind: 'other' as const,
            name: 'x',
            amountMinor,
            taxRatePpm: 190_000,
            basis: 'mass' as const,
            lineIds: null,
            chargeId: null,
          }));
          const parts = billTaxes({ goods: [], charges, taxMinor });
          const sum = parts.reduce((total, part) => total + part, 0);
          expect([taxMinor, 0]).toContain(sum);
          if (amounts.some((amount) => Math.abs(amount) > 5)) expect(sum).toBe(taxMinor);
        },
      ),
    );
  });
});
