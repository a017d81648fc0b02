import { describe, expect, it, test } from 'vitest';
import { planPacks, type PackOffer, type PackSupplier, type Shipping } from '#shared/index.ts';
import { kg, offer, packRequest as request, supplier } from '#tests/support/packBuilders.ts';

function plan(...args: Parameters<typeof request>) {
  const { feasible, packs, totalMinor, shippingMinor } = planPacks(request(...args));
  expect(feasible).toBe(true);
  return { packs, totalMinor, shippingMinor };
}

describe('covering a line', () => {
  it('takes the cheapest packs, not the largest', () => {
    // 10 kg out of sacks of 7 and 5: two fives, where taking the largest first would buy 7 + 5.
    const offers = [offer('seven', 7, 700), offer('five', 5, 500)];
    expect(plan(10, offers).packs).toEqual({ five: 2 });
  });

  it('buys more than needed where that is cheaper', () => {
    expect(plan(9, [offer('one', 1, 500), offer('sack', 25, 3000)]).packs).toEqual({ sack: 1 });
  });

  it('keeps to stock and multiples', () => {
    const scarce = [offer('one', 1, 500), offer('ten', 10, 2000, { maxPacks: 1 })];
    expect(plan(12, scarce).packs).toEqual({ ten: 1, one: 2 });
    const boxed = [offer('one', 1, 500), offer('two', 2, 600, { multipleOf: 3 })];
    expect(plan(5, boxed).packs).toEqual({ two: 3 });
    expect(plan(3, boxed).packs).toEqual({ one: 3 });
    const short = [offer('one', 1, 500), offer('two', 2, 100, { multipleOf: 3, maxPacks: 5 })];
    expect(plan(7, short).packs).toEqual({ two: 3, one: 1 });
  });

  it('buys nothing for a line that needs nothing', () => {
    expect(planPacks(request(0, [offer('one', 1, 500)]))).toEqual({
      feasible: true,
      exact: true,
      packs: {},
      goodsMinor: 0,
      shippingMinor: 0,
      shippingBySupplier: {},
      totalMinor: 0,
      leftOverMg: { kno3: 0 },
    });
  });

  it('plans an empty request', () => {
    const empty = planPacks({ lines: [], offers: [], suppliers: [] });
    expect(empty).toMatchObject({ feasible: true, exact: true, totalMinor: 0, packs: {} });
  });
});

describe('equal costs', () => {
  test.each<[string, number, PackOffer[], Record<string, number>]>([
    ['least left over', 3, [offer('a', 5, 900), offer('b', 3, 900)], { b: 1 }],
    ['then fewest packs', 4, [offer('a', 2, 450), offer('b', 4, 900)], { b: 1 }],
    ['then the lowest offer id', 4, [offer('b', 4, 900), offer('a', 4, 900)], { a: 1 }],
    ['ids by code unit', 4, [offer('a', 4, 900), offer('Z', 4, 900)], { Z: 1 }],
    [
      'more of the lowest, then of the next',
      9,
      [offer('c', 3, 300), offer('b', 4, 400), offer('a', 2, 200), offer('d', 5, 500)],
      { b: 1, d: 1 },
    ],
    [
      'the lowest id even where its packs are one of three',
      9,
      [offer('c', 3, 300), offer('b', 4, 400), offer('a', 2, 200)],
      { a: 1, b: 1, c: 1 },
    ],
  ])('go to %s', (_, need, offers, packs) => {
    expect(plan(need, offers).packs).toEqual(packs);
  });
});

describe("a supplier's terms", () => {
  const single = [offer('one', 1, 1000)];
  const ship = (shipping: Shipping, over: Partial<PackSupplier> = {}) => [
    supplier({ shipping, ...over }),
  ];

  it('charges shipping once, and only where something is bought', () => {
    const other = offer('other', 1, 1000, { supplierId: 'quarry' });
    const suppliers = [
      supplier({ shipping: { kind: 'flat', minor: 600 } }),
      supplier({ id: 'quarry', shipping: { kind: 'flat', minor: 500 } }),
    ];
    const made = planPacks(request(3, [...single, other], suppliers));
    expect(made).toMatchObject({ packs: { other: 3 }, totalMinor: 3500, shippingMinor: 500 });
    expect(made.shippingBySupplier).toEqual({ quarry: 500 });
  });

  test.each<[string, Shipping, number, number]>([
    [
      'by mass, upTo inclusive',
      {
        kind: 'byMass',
        steps: [
          { upTo: 3 * kg, minor: 400 },
          { upTo: null, minor: 700 },
        ],
      },
      3,
      400,
    ],
    [
      'by mass, past the first step',
      {
        kind: 'byMass',
        steps: [
          { upTo: 3 * kg - 1, minor: 400 },
          { upTo: null, minor: 700 },
        ],
      },
      3,
      700,
    ],
    [
      'by value, upTo inclusive',
      {
        kind: 'byValue',
        steps: [
          { upTo: 3000, minor: 400 },
          { upTo: null, minor: 0 },
        ],
      },
      3,
      400,
    ],
    [
      'by value, past the first step',
      {
        kind: 'byValue',
        steps: [
          { upTo: 2999, minor: 400 },
          { upTo: null, minor: 300 },
        ],
      },
      3,
      300,
    ],
  ])('%s', (_, shipping, need, minor) => {
    expect(plan(need, single, ship(shipping)).shippingMinor).toBe(minor);
  });

  it('is free from a value on, that value included', () => {
    const flat: Shipping = { kind: 'flat', minor: 900 };
    const at = (freeShippingFromMinor: number) =>
      plan(3, single, ship(flat, { freeShippingFromMinor }));
    expect(at(3000)).toMatchObject({ totalMinor: 3000, shippingMinor: 0 });
    expect(at(3001)).toMatchObject({ totalMinor: 3900, packs: { one: 3 } });
    expect(at(0)).toMatchObject({ totalMinor: 3000, shippingMinor: 0 });
  });

  it('pays to buy more where that saves the shipping', () => {
    const offers = [...single, offer('bit', 0.1, 150)];
    const suppliers = ship({ kind: 'flat', minor: 900 }, { freeShippingFromMinor: 3100 });
    expect(plan(3, offers, suppliers)).toEqual({
      packs: { one: 3, bit: 1 },
      totalMinor: 3150,
      shippingMinor: 0,
    });
  });

  it('fills up a line that needs nothing to reach a minimum', () => {
    const asked = request(
      1,
      [...single, offer('spare', 1, 250, { lineId: 'mgso4' })],
      [supplier({ minimumOrderMinor: 1500 })],
    );
    asked.lines.push({ id: 'mgso4', neededMg: 0 });
    const made = planPacks(asked);
    expect(made).toMatchObject({ packs: { one: 1, spare: 2 }, totalMinor: 1500 });
    expect(made.leftOverMg).toEqual({ kno3: 0, mgso4: 2 * kg });
    expect(made.nextStep?.lineId).not.toBe('mgso4');
  });

  it('never buys below a minimum where somebody else sells without', () => {
    const dear = offer('dear', 1, 1200, { supplierId: 'quarry' });
    const suppliers = [supplier({ minimumOrderMinor: 5000 }), supplier({ id: 'quarry' })];
    expect(plan(3, [...single, dear], suppliers).packs).toEqual({ dear: 3 });
    expect(plan(5, [...single, dear], suppliers).packs).toEqual({ one: 5 });
  });

  it("can't be used past the last step, unless shipping is free at that value", () => {
    const shipping: Shipping = { kind: 'byMass', steps: [{ upTo: 2 * kg, minor: 400 }] };
    const made = planPacks(request(3, single, ship(shipping)));
    expect(made.feasible).toBe(false);
    const free = ship(shipping, { freeShippingFromMinor: 3000 });
    expect(plan(3, single, free).totalMinor).toBe(3000);
    expect(plan(2, single, free).totalMinor).toBe(2400);
    const nowhere = ship({ kind: 'byMass', steps: [] }, { freeShippingFromMinor: 3000 });
    expect(plan(2, single, nowhere)).toMatchObject({ packs: { one: 3 }, totalMinor: 3000 });
  });

  it('plans all lines together', () => {
    const asked = request(3, single, ship({ kind: 'flat', minor: 600 }));
    asked.lines.push({ id: 'mgso4', neededMg: 2 * kg });
    asked.suppliers.push(supplier({ id: 'quarry', shipping: { kind: 'flat', minor: 600 } }));
    asked.offers.push(
      offer('m', 1, 300, { lineId: 'mgso4' }),
      offer('cheap-m', 1, 200, { lineId: 'mgso4', supplierId: 'quarry' }),
    );
    expect(planPacks(asked)).toMatchObject({ packs: { one: 3, m: 2 }, totalMinor: 4200 });
  });
});
