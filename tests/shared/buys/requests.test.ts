import { describe, expect, it } from 'vitest';
import {
  boughtByLine,
  offerPriceMinor,
  shippingChargeId,
  supplierOfShipping,
} from '#shared/domain/buys/boughtPacks.ts';
import {
  estimateOf,
  packRequestOf,
  planInForce,
  pooledMg,
  shareRequestOf,
} from '#shared/domain/buys/requests.ts';
import { planSheetSums } from '#shared/domain/buys/planSheetSums.ts';
import { sumsOfPlan, type SumsGround } from '#shared/domain/buys/sheetSums.ts';
import type { SheetOffer, SheetPledge, SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import { planPacks } from '#shared/domain/packs/planPacks.ts';
import { shareOut } from '#shared/domain/shares/shareOut.ts';

const line = (id: string, more: Partial<SheetTerms['lines'][number]> = {}) => ({
  id,
  saltId: id,
  salt: {
    name: id,
    formula: id,
    classified: false,
    reportable: false,
    signalWord: null,
    hazards: [],
    pictograms: [],
    cautions: [],
    storage: '',
    note: '',
  },
  stepMg: 1000,
  reservePermyriad: 50,
  surplus: 'spread' as const,
  shortage: 'scale' as const,
  note: '',
  totalsOnly: false,
  ...more,
});

const offer = (
  id: string,
  lineId: string,
  supplierId: string,
  kg: number,
  priceMinor: number,
  more: Partial<SheetOffer> = {},
): SheetOffer => ({
  id,
  lineId,
  supplierId,
  label: '',
  packMg: kg * 1_000_000,
  priceMinor,
  priceIncludesTax: true,
  taxRatePpm: 0,
  maxPacks: null,
  multipleOf: 1,
  ...more,
});

const supplier = (id: string, more: Partial<SheetTerms['suppliers'][number]> = {}) => ({
  id,
  name: id,
  isShelf: false,
  shipping: { kind: 'flat' as const, minor: 500 },
  freeShippingFromMinor: null,
  minimumOrderMinor: null,
  ...more,
});

const terms = (more: Partial<SheetTerms> = {}): SheetTerms => ({
  buyId: 'b',
  clubId: 'c',
  currency: 'EUR',
  termsVersion: 1,
  state: 'open',
  closesAt: null,
  frozenUntil: null,
  loweringFreezeHours: 24,
  minimum: { kind: 'none', amount: 0 },
  leftOverPayer: 'members',
  shelfLimitMinor: 0,
  spreadMaxPermille: 100,
  lines: [line('K'), line('M')],
  offers: [offer('k25', 'K', 's', 25, 9500), offer('m5', 'M', 't', 5, 1450)],
  suppliers: [supplier('s'), supplier('t')],
  charges: [],
  ...more,
});

const pledge = (
  membershipId: string,
  lineId: string,
  grams: number,
  upTo: number | null = null,
): SheetPledge => ({
  membershipId,
  lineId,
  wantedMg: grams * 1000,
  upToMg: upTo === null ? null : upTo * 1000,
  version: 1,
  at: '2026-12-01T10:00:00.000Z',
});

describe('what must be bought', () => {
  it('is what was pledged and the reserve, rounded up to whole milligrams', () => {
    const odd = [{ lineId: 'K', wantedMg: 333 }];
    const request = packRequestOf(
      terms({ lines: [line('K', { reservePermyriad: 33 }), line('M')] }),
      odd,
    );
    // 333 mg x 0.33 % = 1.0989 mg, so 2 mg.
    expect(request.lines).toEqual([
      { id: 'K', neededMg: 335 },
      { id: 'M', neededMg: 0 },
    ]);
  });

  it('counts no pledge on a line that is gone', () => {
    expect(pooledMg(terms(), [pledge('a', 'K', 5), pledge('a', 'gone', 7)])).toEqual({
      K: 5000,
      M: 0,
    });
  });

  it('prices a pack with its tax, half up, where it comes without', () => {
    const net = offer('x', 'K', 's', 1, 7059, { priceIncludesTax: false, taxRatePpm: 190_000 });
    expect(offerPriceMinor(net)).toBe(8400);
    expect(packRequestOf(terms({ offers: [net] }), []).offers[0]?.priceMinor).toBe(8400);
  });

  it('keeps stock, multiples and the terms of suppliers, and leaves out what is not limited', () => {
    const request = packRequestOf(
      terms({
        offers: [offer('x', 'K', 's', 1, 600, { maxPacks: 4, multipleOf: 2 })],
        suppliers: [supplier('s', { minimumOrderMinor: 2500, freeShippingFromMinor: 9000 })],
      }),
      [],
    );
    expect(request.offers[0]).toMatchObject({ maxPacks: 4, multipleOf: 2 });
    expect(request.suppliers[0]).toEqual({
      id: 's',
      shipping: { kind: 'flat', minor: 500 },
      freeShippingFromMinor: 9000,
      minimumOrderMinor: 2500,
    });
    expect(packRequestOf(terms(), []).offers[0]).not.toHaveProperty('maxPacks');
  });
});

describe('what is shared out', () => {
  const chosen = { packs: { k25: 1, m5: 2 }, shippingBySupplier: { s: 500, t: 700 } };

  it('sends the policies of the buy', () => {
    const pledges = [pledge('a', 'K', 24_000)];
    const request = shareRequestOf(terms({ spreadMaxPermille: 50 }), pledges, chosen);
    expect(request.lines[0]).toEqual({
      id: 'K',
      availableMg: 25_000_000,
      costMinor: 9500,
      taxRate: 0,
      stepMg: 1000,
      reserveMg: 120_000,
      surplus: 'spread',
      spreadMaxPermille: 50,
      shortage: 'scale',
      shelfPays: false,
    });
    const shelf = shareRequestOf(terms({ leftOverPayer: 'shelf' }), pledges, chosen);
    expect(shelf.lines.every(({ shelfPays }) => shelfPays)).toBe(true);
  });

  it("lays each supplier's shipping on the lines bought from it, by its table's measure", () => {
    const request = shareRequestOf(
      terms({
        suppliers: [
          supplier('s'),
          supplier('t', { shipping: { kind: 'byValue', steps: [{ upTo: null, minor: 700 }] } }),
        ],
      }),
      [pledge('a', 'K', 100)],
      chosen,
    );
    expect(request.charges).toEqual([
      { id: shippingChargeId('s'), amountMinor: 500, basis: 'mass', lineIds: ['K'] },
      { id: shippingChargeId('t'), amountMinor: 700, basis: 'value', lineIds: ['M'] },
    ]);
    expect(supplierOfShipping(shippingChargeId('s'))).toBe('s');
    expect(supplierOfShipping('anything')).toBeNull();
  });

  it("puts a charge on its supplier's lines, on its own lines or on all", () => {
    const base = {
      name: '',
      kind: 'duty' as const,
      amountMinor: 100,
      basis: 'member' as const,
      taxRatePpm: 190_000,
    };
    const charges = [
      { ...base, id: 'duty', supplierId: 't', lineIds: null },
      { ...base, id: 'bags', supplierId: null, lineIds: null },
      { ...base, id: 'jars', supplierId: null, lineIds: ['K', 'gone'] },
      { ...base, id: 'unused', supplierId: 'u', lineIds: null },
    ];
    const request = shareRequestOf(terms({ charges }), [pledge('a', 'K', 1)], {
      packs: { k25: 1, m5: 1 },
      shippingBySupplier: {},
    });
    expect(request.charges.map(({ id, lineIds, taxRate }) => [id, lineIds, taxRate])).toEqual([
      ['duty', ['M'], 0.19],
      ['bags', undefined, 0.19],
      ['jars', ['K'], 0.19],
    ]);
  });

  it('leaves out charges and shipping of a supplier nothing is bought from', () => {
    const duty = {
      id: 'duty',
      name: '',
      kind: 'duty' as const,
      amountMinor: 100,
      basis: 'mass' as const,
      supplierId: 't',
      lineIds: null,
      taxRatePpm: 0,
    };
    const request = shareRequestOf(terms({ charges: [duty] }), [pledge('a', 'K', 1)], {
      packs: { k25: 1 },
      shippingBySupplier: { t: 700 },
    });
    expect(request.charges).toEqual([]);
  });

  it('says the one rate of its packs, or the rate at which the sum contains all their taxes', () => {
    const offers = [
      offer('a', 'K', 's', 1, 1190, { taxRatePpm: 190_000 }),
      offer('b', 'K', 's', 1, 1070, { taxRatePpm: 70_000 }),
    ];
    const one = boughtByLine(terms({ offers }), { a: 3 }).get('K');
    expect(one).toMatchObject({ costMinor: 3570, taxRate: 0.19, availableMg: 3_000_000 });
    const both = boughtByLine(terms({ offers }), { a: 1, b: 1 }).get('K');
    // 190 + 70 contained in 2 260.
    expect(both?.taxRate).toBeCloseTo(260 / 2000, 12);
    const sheet = estimateOf(terms({ offers }), [pledge('x', 'K', 1000)], {
      packs: { a: 1, b: 1 },
      shippingBySupplier: {},
    });
    expect(sheet.members[0]?.lines[0]?.taxMinor).toBe(260);
  });

  it('drops empty pledges, keeps those that only say up to', () => {
    const request = shareRequestOf(
      terms(),
      [pledge('a', 'K', 0), pledge('b', 'K', 0, 500), pledge('c', 'M', 5)],
      chosen,
    );
    expect(request.pledges.map(({ memberId }) => memberId)).toEqual(['b', 'c']);
  });

  it('takes what came and what it really cost in place of the plan', () => {
    const received = {
      lines: { K: { availableMg: 24_800_000, costMinor: 9900, taxRate: 0.19 } },
      charges: [{ id: 'freight', amountMinor: 800, basis: 'mass' as const }],
    };
    const request = shareRequestOf(terms(), [pledge('a', 'K', 100)], received, 'targets');
    expect(request.lines[0]).toMatchObject({
      availableMg: 24_800_000,
      costMinor: 9900,
      taxRate: 0.19,
      stepMg: 1000,
    });
    expect(request.lines[1]).toMatchObject({ availableMg: 0, costMinor: 0 });
    expect(request.charges).toEqual(received.charges);
  });

  it('is to the milligram at the end, the rest for the shelf', () => {
    const received = { lines: { K: { availableMg: 650_123, costMinor: 6501 } }, charges: [] };
    const weighed = [
      { ...pledge('a', 'K', 0, 900), wantedMg: 400_123 },
      { ...pledge('b', 'K', 0), wantedMg: 200_000 },
    ];
    const request = shareRequestOf(terms(), weighed, received, 'final');
    expect(request.lines[0]).toMatchObject({ stepMg: 1, reserveMg: 0, surplus: 'shelf' });
    const sheet = shareOut(request);
    expect(sheet.members.map(({ memberId, lines }) => [memberId, lines[0]?.mg])).toEqual([
      ['a', 400_123],
      ['b', 200_000],
    ]);
    expect(sheet.shelf.lines[0]).toMatchObject({ mg: 50_000, costMinor: 0 });
  });
});

describe('the plan in force', () => {
  const pledges = [pledge('a', 'M', 4000)];
  const computed = planPacks(packRequestOf(terms(), pledges));

  it('is the computed one without a choice', () => {
    expect(planInForce(terms(), pledges, computed, null)).toEqual({
      plan: computed,
      overridden: false,
    });
  });

  it("is the organiser's as long as it covers every line and can be ordered", () => {
    const { plan, overridden } = planInForce(terms(), pledges, computed, { m5: 2 });
    expect(overridden).toBe(true);
    expect(plan).toMatchObject({
      packs: { m5: 2 },
      goodsMinor: 2900,
      shippingMinor: 500,
      totalMinor: 3400,
    });
    expect(planInForce(terms(), pledges, computed, {}).overridden).toBe(false);
    expect(planInForce(terms(), pledges, computed, { gone: 1 }).overridden).toBe(false);
  });
});

describe('the sums of a sheet', () => {
  const pledges = [pledge('a', 'K', 23_000), pledge('b', 'K', 650, 2000), pledge('b', 'M', 400)];
  const ground = (more: Partial<SumsGround> = {}): SumsGround => ({
    terms: terms(),
    pledges,
    override: null,
    me: 'b',
    ...more,
  });
  const sums = (more: Partial<SumsGround> = {}) => planSheetSums(ground(more), 1000);

  it('agree with the plan and the shares they are made of', () => {
    const made = sums();
    const plan = planPacks(packRequestOf(terms(), pledges));
    const sheet = estimateOf(terms(), pledges, plan);
    expect(made.plan).toEqual(plan);
    expect(made.totalMinor).toBe(sheet.totalMinor);
    expect(made.totals).toEqual(
      Object.fromEntries(sheet.members.map((one) => [one.memberId, one.totalMinor])),
    );
    expect(made.mine).toEqual(sheet.members.find(({ memberId }) => memberId === 'b'));
  });

  it('say what is bought, left over and paid for each gram', () => {
    const { lines, got } = sums();
    // 25 000 g hold 23 650 g and 118.25 g of reserve: b takes 1 231 g of what is left over.
    expect(got).toEqual({ b: { K: 1_881_000, M: 440_000 } });
    expect(lines.K).toMatchObject({
      pooledMg: 23_650_000,
      boughtMg: 25_000_000,
      reserveMg: 118_250,
      leftOverMg: 750,
      costMinor: 9500,
    });
    expect(lines.K?.packs).toEqual([{ offerId: 'k25', packMg: 25_000_000, count: 1 }]);
    expect(lines.K?.perGram).toBeCloseTo(9500 / 24_881, 10);
  });

  it('use a plan that is known, and say nothing where none is feasible', () => {
    const known = { ...planPacks(packRequestOf(terms(), pledges)), packs: { k25: 2, m5: 1 } };
    expect(sumsOfPlan(ground(), known).lines.K?.boughtMg).toBe(50_000_000);
    const none = sums({ terms: terms({ offers: [] }) });
    expect(none.plan.feasible).toBe(false);
    expect(none.mine).toBeNull();
    expect(none.lines.K).toMatchObject({ pooledMg: 23_650_000, packs: [], perGram: 0 });
  });
});
