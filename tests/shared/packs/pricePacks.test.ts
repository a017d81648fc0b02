import { describe, expect, it, test } from 'vitest';
import { planPacks, pricePacks, type PackRequest } from '#shared/index.ts';
import { clubRequest, Dice } from '#tests/support/packRequests.ts';

const request: PackRequest = {
  lines: [
    { id: 'kno3', neededMg: 3000 },
    { id: 'mgso4', neededMg: 0 },
  ],
  offers: [
    { id: 'a', lineId: 'kno3', supplierId: 'mill', packMg: 1000, priceMinor: 500, maxPacks: 4 },
    { id: 'b', lineId: 'kno3', supplierId: 'quarry', packMg: 2000, priceMinor: 900, multipleOf: 2 },
    { id: 'c', lineId: 'mgso4', supplierId: 'mill', packMg: 500, priceMinor: 100 },
  ],
  suppliers: [
    {
      id: 'mill',
      minimumOrderMinor: 1500,
      shipping: { kind: 'byMass', steps: [{ upTo: 3500, minor: 300 }] },
    },
    { id: 'quarry', shipping: { kind: 'flat', minor: 0 } },
  ],
};

describe('pricePacks', () => {
  it('prices a choice that can be ordered', () => {
    expect(pricePacks(request, { a: 3, c: 1, b: 0 })).toEqual({
      feasible: true,
      problems: [],
      goodsMinor: 1600,
      goodsByLine: { kno3: 1500, mgso4: 100 },
      shippingMinor: 300,
      shippingBySupplier: { mill: 300 },
      totalMinor: 1900,
      boughtMg: { kno3: 3000, mgso4: 500 },
      leftOverMg: { kno3: 0, mgso4: 500 },
    });
  });

  test.each<[Record<string, number>, object[]]>([
    [
      { b: 1 },
      [
        { code: 'not_a_multiple', offerId: 'b', multipleOf: 2 },
        { code: 'line_short', lineId: 'kno3', missingMg: 1000 },
      ],
    ],
    [
      { a: 5 },
      [
        { code: 'over_stock', offerId: 'a', maxPacks: 4 },
        { code: 'not_delivered', supplierId: 'mill' },
      ],
    ],
    [{ a: 1, b: 2 }, [{ code: 'below_minimum', supplierId: 'mill', missingMinor: 1000 }]],
    [{}, [{ code: 'line_short', lineId: 'kno3', missingMg: 3000 }]],
  ])('says what is wrong with %j', (packs, problems) => {
    expect(pricePacks(request, packs)).toMatchObject({ feasible: false, problems });
  });

  test.each([[{ x: 1 }], [{ a: -1 }], [{ a: 1.5 }]])('refuses %j', (packs) => {
    expect(() => pricePacks(request, packs)).toThrow(RangeError);
  });

  it("agrees with the plan on the plan's own packs", () => {
    for (let seed = 0; seed < 20; seed++) {
      const asked = clubRequest(new Dice(seed), { lines: 5, offersPerLine: 4, suppliers: 3 });
      const plan = planPacks(asked);
      const price = pricePacks(asked, plan.packs);
      expect(price.feasible).toBe(plan.feasible);
      if (plan.feasible) expect(price.totalMinor).toBe(plan.totalMinor);
    }
  });
});
