import { describe, expect, it, test } from 'vitest';
import {
  packObstacle,
  planPacks,
  pricePacks,
  type PackOffer,
  type PackRequest,
  type PackSupplier,
  type Shipping,
} from '#shared/index.ts';
import { kg, offer, packRequest as request, supplier } from '#tests/support/packBuilders.ts';
import { Dice, smallRequest } from '#tests/support/packRequests.ts';

describe('what cannot be planned', () => {
  it('names the obstacle for screens', () => {
    expect(packObstacle(request(1, []))).toEqual({ code: 'no_offer', lineId: 'kno3' });
    expect(packObstacle(request(5, [offer('one', 1, 1, { maxPacks: 4 })]))).toEqual({
      code: 'too_little_stock',
      lineId: 'kno3',
      neededMg: 5 * kg,
      stockMg: 4 * kg,
    });
    expect(packObstacle(request(5, [offer('one', 1, 1)]))).toEqual({ code: 'terms' });
  });

  test.each<[string, PackRequest, RegExp]>([
    ['no offer', request(1, []), /kno3 has no offer/],
    ['no stock', request(1, [offer('one', 1, 1, { maxPacks: 0 })]), /kno3 has no offer/],
    ['too little stock', request(5, [offer('one', 1, 1, { maxPacks: 4 })]), /5000 g.*4000 g/],
    [
      'a minimum out of reach',
      request(1, [offer('one', 1, 1, { maxPacks: 4 })], [supplier({ minimumOrderMinor: 99 })]),
      /minimum orders/,
    ],
  ])('%s', (_, asked, reason) => {
    const made = planPacks(asked);
    expect(made.reason).toMatch(reason);
    expect({ ...made, reason: '' }).toEqual({
      feasible: false,
      exact: true,
      reason: '',
      packs: {},
      goodsMinor: 0,
      shippingMinor: 0,
      shippingBySupplier: {},
      totalMinor: 0,
      leftOverMg: {},
    });
  });
});

describe('the order of the input', () => {
  it("doesn't matter, but for which of two lines is named first", () => {
    for (let seed = 0; seed < 200; seed++) {
      const asked = smallRequest(new Dice(seed));
      const turned = {
        lines: [...asked.lines].reverse(),
        offers: [...asked.offers].reverse(),
        suppliers: [...asked.suppliers].reverse(),
      };
      const [one, other] = [planPacks(asked), planPacks(turned)];
      const apart = { nextStep: undefined, reason: undefined };
      expect({ ...other, ...apart }).toEqual({ ...one, ...apart });
      expect(other.nextStep?.moreMg).toBe(one.nextStep?.moreMg);
    }
  });
});

describe('the budget', () => {
  /** Ten suppliers with minimums and odd sizes at one price per gram: hard to prove. */
  function hardRequest(): PackRequest {
    const dice = new Dice(7);
    const suppliers = Array.from({ length: 10 }, (_, i) =>
      supplier({
        id: `s${i}`,
        minimumOrderMinor: dice.whole(20_000, 60_000),
        shipping: { kind: 'flat', minor: dice.whole(500, 1500) },
      }),
    );
    const lines = Array.from({ length: 20 }, (_, i) => ({
      id: `l${i}`,
      neededMg: dice.whole(1, 30) * kg,
    }));
    const offers = lines.flatMap(({ id: lineId }) =>
      suppliers.map(({ id: supplierId }): PackOffer => {
        const packMg = dice.whole(100_000, 5 * kg);
        const id = `${lineId} ${supplierId}`;
        return { id, lineId, supplierId, packMg, priceMinor: Math.round(packMg / 1000) };
      }),
    );
    return { lines, offers, suppliers };
  }

  it('ends the search with the best found, which can be ordered', () => {
    const asked = hardRequest();
    const started = performance.now();
    const made = planPacks(asked, 200);
    expect(performance.now() - started).toBeLessThan(2000);
    expect(made).toMatchObject({ feasible: true, exact: false });
    expect(made.nextStep).toBeUndefined();
    const price = pricePacks(asked, made.packs);
    expect(price).toMatchObject({ feasible: true, totalMinor: made.totalMinor });
  });

  it('has a plan to show even when there is no time at all', () => {
    const asked = hardRequest();
    const made = planPacks(asked, 0);
    expect(made).toMatchObject({ feasible: true, exact: false });
    expect(pricePacks(asked, made.packs)).toMatchObject({ feasible: true });
  });

  it("doesn't make an easy plan less exact", () => {
    const asked = request(12, [offer('one', 1, 500), offer('ten', 10, 2000)]);
    expect(planPacks(asked, 2000)).toEqual(planPacks(asked));
  });
});

describe('planPacks refuses', () => {
  const steps = (...upTo: (number | null)[]): Shipping => ({
    kind: 'byMass',
    steps: upTo.map((most) => ({ upTo: most, minor: 1 })),
  });
  const good = [offer('one', 1, 500)];
  const terms = (over: Partial<PackSupplier>) => request(1, good, [supplier(over)]);
  const one = (over: Partial<PackOffer>) => request(1, [offer('one', 1, 500, over)]);

  test.each<[string, PackRequest, RegExp]>([
    ['a need below zero', request(-1, good), /neededMg/],
    ['half a milligram', request(0.5 / kg, good), /neededMg/],
    ['an empty pack', one({ packMg: 0 }), /packMg/],
    ['a price below zero', one({ priceMinor: -1 }), /priceMinor/],
    ['half a pack', one({ maxPacks: 0.5 }), /maxPacks/],
    ['a multiple of zero', one({ multipleOf: 0 }), /multipleOf/],
    ['an unknown line', one({ lineId: 'x' }), /lineId/],
    ['an unknown supplier', one({ supplierId: 'x' }), /supplierId/],
    ['an offer twice', request(1, [...good, ...good]), /one/],
    ['steps that fall', terms({ shipping: steps(5, 4) }), /upTo/],
    ['steps that stand still', terms({ shipping: steps(5, 5) }), /upTo/],
    ['steps after the open one', terms({ shipping: steps(null, 5) }), /upTo/],
    ['two open steps', terms({ shipping: steps(null, null) }), /upTo/],
    ['a minimum below zero', terms({ minimumOrderMinor: -1 }), /minimumOrderMinor/],
    ['free from nonsense', terms({ freeShippingFromMinor: NaN }), /freeShippingFromMinor/],
    ['shipping below zero', terms({ shipping: { kind: 'flat', minor: -1 } }), /shipping/],
    [
      'a total past the safe integers',
      request(2, [offer('one', 1, Number.MAX_SAFE_INTEGER)]),
      /goodsMinor|safe/,
    ],
  ])('%s', (_, asked, field) => {
    expect(() => planPacks(asked)).toThrow(RangeError);
    expect(() => planPacks(asked)).toThrow(field);
  });

  test.each([-1, NaN, Infinity])('a budget of %d', (budget) => {
    expect(() => planPacks(request(1, good), budget)).toThrow(/budgetMs/);
  });
});
