import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import { bagHoldsMg, bagLeavesMg, reconcileBags } from '#shared/domain/splits/bagSums.ts';
import { portionChanges, shareTargets } from '#shared/domain/splits/targets.ts';

const salt = {
  name: 'Potassium nitrate',
  formula: 'KNO3',
  classified: true,
  reportable: false,
  signalWord: null,
  hazards: [],
  pictograms: [],
  cautions: [],
  storage: '',
  note: '',
};

function termsWith(line: Partial<SheetTerms['lines'][number]> = {}): SheetTerms {
  return {
    buyId: 'buy',
    clubId: 'club',
    currency: 'EUR',
    termsVersion: 1,
    state: 'arrived',
    closesAt: null,
    frozenUntil: null,
    loweringFreezeHours: 24,
    minimum: { kind: 'none', amount: 0 },
    leftOverPayer: 'members',
    shelfLimitMinor: 0,
    spreadMaxPermille: 100,
    lines: [
      {
        id: 'a',
        saltId: 'KNO3',
        salt,
        stepMg: 1000,
        reservePermyriad: 0,
        surplus: 'spread',
        shortage: 'scale',
        note: '',
        totalsOnly: false,
        ...line,
      },
    ],
    offers: [],
    suppliers: [],
    charges: [],
  };
}

const bag = (nominalMg: number, netMg: number | null, more: object = {}) => ({
  lineId: 'a',
  nominalMg,
  netMg,
  missing: false,
  portionsMg: 0,
  spilledMg: 0,
  shelfMg: null,
  ...more,
});
const pledge = (membershipId: string, wantedMg: number, minute: number) => ({
  membershipId,
  lineId: 'a',
  wantedMg,
  upToMg: null,
  version: 1,
  at: `2027-01-01T00:0${minute}:00.000Z`,
});
const costs = { lines: {}, charges: [] };
const targetsOf = (given: Omit<Parameters<typeof shareTargets>[0], 'costs'>) =>
  Object.fromEntries(
    shareTargets({ ...given, costs }).targets.map(({ membershipId, targetMg }) => [
      membershipId,
      targetMg,
    ]),
  );

describe('shareTargets', () => {
  const pledges = [pledge('ana', 6_000_000, 1), pledge('ben', 4_000_000, 2)];

  it('counts the lesser of nominal and net of each bag, and nothing of a missing one', () => {
    const bags = [
      bag(5_000_000, 5_100_000),
      bag(5_000_000, 4_000_000),
      bag(5_000_000, null, { missing: true }),
    ];
    const given = { terms: termsWith(), pledges, bags, begun: false, portions: [] };
    expect(targetsOf(given)).toEqual({ ana: 5_400_000, ben: 3_600_000 });
    const queued = { ...given, terms: termsWith({ shortage: 'queue' }) };
    expect(targetsOf(queued)).toEqual({ ana: 6_000_000, ben: 3_000_000 });
  });

  it('keeps what is weighed, and what was taken out, and shares only the rest', () => {
    const portion = (
      membershipId: string,
      targetMg: number,
      state: 'done' | 'waiting' | 'void',
    ) => ({
      membershipId,
      lineId: 'a',
      targetMg,
      state,
      takenOut: state === 'void',
    });
    const given = {
      terms: termsWith(),
      pledges: [...pledges, pledge('cleo', 2_000_000, 3)],
      bags: [bag(12_000_000, 12_000_000, { portionsMg: 3_000_000, spilledMg: 1_000_000 })],
      begun: true,
      portions: [
        portion('ana', 3_000_000, 'done'),
        portion('ana', 3_000_000, 'waiting'),
        portion('ben', 4_000_000, 'void'),
        portion('cleo', 2_000_000, 'waiting'),
      ],
    };
    // 8 kg are left, 3 kg of it promised to Ana's second part: Cleo may have 10 % more.
    expect(targetsOf(given)).toEqual({ cleo: 2_200_000, ana: 6_000_000, ben: 0 });
  });

  it('never shares out more than is there', () => {
    fc.assert(
      fc.property(
        fc.array(fc.nat({ max: 9_000 }), { minLength: 1, maxLength: 6 }),
        fc.array(
          fc.record({
            nominal: fc.integer({ min: 1, max: 9_000_000 }),
            net: fc.nat({ max: 9_000_000 }),
          }),
          {
            minLength: 1,
            maxLength: 4,
          },
        ),
        fc.constantFrom('scale' as const, 'queue' as const),
        (wanted, packs, shortage) => {
          const bags = packs.map(({ nominal, net }) => bag(nominal, net));
          const { targets, sheet } = shareTargets({
            terms: termsWith({ shortage }),
            pledges: wanted.map((grams, index) => pledge(`m${index}`, grams * 1000, index)),
            bags,
            costs,
            begun: false,
            portions: [],
          });
          const there = bags.reduce(
            (sum, each) => sum + Math.min(each.nominalMg, each.netMg ?? 0),
            0,
          );
          const shared = targets.reduce((sum, { targetMg }) => sum + targetMg, 0);
          expect(shared + (sheet.shelf.lines[0]?.mg ?? 0)).toBe(there);
          expect(targets.every(({ targetMg }) => targetMg % 1000 === 0)).toBe(true);
        },
      ),
    );
  });
});

describe('portionChanges', () => {
  const waiting = (targetMg: number) => ({ targetMg, state: 'waiting' as const });
  const gone = (targetMg: number) => ({ targetMg, state: 'void' as const });

  it('adds, keeps, sets, joins, voids and brings back', () => {
    const [a, b] = [waiting(300), waiting(200)];
    expect(portionChanges([], 500)).toEqual([{ act: 'add', targetMg: 500 }]);
    expect(portionChanges([a, b], 500)).toEqual([]);
    expect(portionChanges([a], 500)).toEqual([{ act: 'set', portion: a, targetMg: 500 }]);
    expect(portionChanges([a, b], 400)).toEqual([
      { act: 'set', portion: a, targetMg: 400 },
      { act: 'void', portion: b },
    ]);
    expect(portionChanges([a, b], 0)).toEqual([
      { act: 'void', portion: a },
      { act: 'void', portion: b },
    ]);
    const old = gone(300);
    expect(portionChanges([old], 500)).toEqual([{ act: 'set', portion: old, targetMg: 500 }]);
    expect(portionChanges([old], 0)).toEqual([]);
  });
});

describe('bag sums', () => {
  it('says what a bag should hold and may still give', () => {
    const open = bag(5_000_000, 5_100_000, { portionsMg: 2_000_000, spilledMg: 50_000 });
    expect(bagHoldsMg(open)).toBe(3_050_000);
    expect(bagLeavesMg(open)).toBe(2_950_000);
    expect(bagHoldsMg({ ...open, shelfMg: 3_000_000 })).toBe(0);
    expect(bagHoldsMg({ ...open, missing: true })).toBe(0);
    expect(bagHoldsMg({ ...open, portionsMg: 6_000_000 })).toBe(0);
  });

  it('reconciles a line: net = portions + shelf + spilled + unaccounted, of either sign', () => {
    const mass = fc.nat({ max: 30_000_000 });
    fc.assert(
      fc.property(
        fc.array(fc.record({ netMg: mass, portionsMg: mass, spilledMg: mass, shelfMg: mass }), {
          maxLength: 5,
        }),
        (given) => {
          const line = reconcileBags(given.map((each) => bag(1, each.netMg, each)));
          expect(line.portionsMg + line.shelfMg + line.spilledMg + line.unaccountedMg).toBe(
            line.netMg,
          );
        },
      ),
    );
  });
});
