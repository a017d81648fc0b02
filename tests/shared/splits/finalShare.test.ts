import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import { shareOut } from '#shared/domain/shares/shareOut.ts';
import { finalShareOf } from '#shared/domain/splits/finalShare.ts';
import { reconcile } from '#shared/domain/splits/reconcile.ts';

function termsOf(lineIds: readonly string[], leftOverPayer: 'members' | 'shelf'): SheetTerms {
  return {
    buyId: 'buy',
    clubId: 'club',
    currency: 'EUR',
    termsVersion: 1,
    state: 'splitting',
    closesAt: null,
    frozenUntil: null,
    loweringFreezeHours: 24,
    minimum: { kind: 'none', amount: 0 },
    leftOverPayer,
    shelfLimitMinor: 0,
    spreadMaxPermille: 100,
    lines: lineIds.map((id) => ({
      id,
      saltId: 'KNO3',
      salt: {
        name: id,
        formula: null,
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
      surplus: 'spread',
      shortage: 'scale',
      note: '',
      totalsOnly: false,
    })),
    offers: [],
    suppliers: [],
    charges: [],
  };
}

const at = '2027-01-01T00:00:00.000Z';
const charged = (membershipId: string, chargedMg: number, lineId = 'a') => ({
  membershipId,
  lineId,
  chargedMg,
  at,
});

describe('finalShareOf', () => {
  const reconciled = {
    a: reconcile({
      netMg: 25_000_000,
      portionsMg: 20_000_000,
      shelfMg: 4_000_000,
      spilledMg: 1_000_000,
    }),
  };
  const given = {
    terms: termsOf(['a'], 'members'),
    charged: [charged('ana', 12_000_000), charged('ben', 8_000_000)],
    reconciled,
    costs: { lines: { a: { availableMg: 25_000_000, costMinor: 10_000 } }, charges: [] },
    lost: [],
    clubTakesExcess: false,
  };

  it('raises everyone’s price alike by what was lost; the shelf joins at nil cost', () => {
    const { members, sheet, totalMinor } = finalShareOf(given);
    expect(members).toEqual([
      { memberId: 'ana', finalMinor: 6000 },
      { memberId: 'ben', finalMinor: 4000 },
    ]);
    expect(sheet.shelf.lines).toEqual([{ lineId: 'a', mg: 4_000_000, costMinor: 0, taxMinor: 0 }]);
    expect(totalMinor).toBe(10_000);
  });

  it('lets the club take what was lost above 2 %, by its part of the net', () => {
    const share = finalShareOf({ ...given, clubTakesExcess: true });
    // 1 000 g lost, 500 g of it above 2 % of 25 kg: 1 part in 50 of the cost.
    expect(share.excess).toEqual([{ lineId: 'a', mg: 500_000, minor: 200 }]);
    expect(share.members.map(({ finalMinor }) => finalMinor)).toEqual([5880, 3920]);
    expect(share.totalMinor).toBe(10_000);
  });

  it('adds to a member what stays lost with a supplier', () => {
    const { members, totalMinor } = finalShareOf({
      ...given,
      lost: [
        { memberId: 'ana', minor: 50 },
        { memberId: 'cleo', minor: 25 },
      ],
    });
    expect(members.map(({ memberId, finalMinor }) => [memberId, finalMinor])).toEqual([
      ['ana', 6050],
      ['ben', 4000],
      ['cleo', 25],
    ]);
    expect(totalMinor).toBe(10_075);
  });

  it('always sums to what the buy cost, and is shareOut of the numbers', () => {
    const mass = fc.nat({ max: 5_000_000 });
    const line = fc.record({
      portions: fc.array(mass, { maxLength: 5 }),
      shelfMg: mass,
      spilledMg: mass,
      netMg: fc.nat({ max: 40_000_000 }),
      costMinor: fc.nat({ max: 1_000_000 }),
    });
    fc.assert(
      fc.property(
        fc.array(line, { minLength: 1, maxLength: 3 }),
        fc.integer({ min: -5_000, max: 50_000 }),
        fc.constantFrom('mass' as const, 'value' as const, 'member' as const, 'portion' as const),
        fc.constantFrom('members' as const, 'shelf' as const),
        fc.boolean(),
        (lines, amountMinor, basis, payer, clubTakesExcess) => {
          const ids = lines.map((_line, index) => `l${index}`);
          const share = finalShareOf({
            terms: termsOf(ids, payer),
            charged: lines.flatMap(({ portions }, index) =>
              portions.map((mg, who) => charged(`m${who}`, mg, `l${index}`)),
            ),
            reconciled: Object.fromEntries(
              lines.map(({ portions, shelfMg, spilledMg, netMg }, index) => [
                `l${index}`,
                reconcile({
                  netMg,
                  portionsMg: portions.reduce((a, b) => a + b, 0),
                  shelfMg,
                  spilledMg,
                }),
              ]),
            ),
            costs: {
              lines: Object.fromEntries(
                lines.map(({ costMinor }, index) => [`l${index}`, { availableMg: 0, costMinor }]),
              ),
              charges: [{ id: 'c', amountMinor, basis }],
            },
            lost: [],
            clubTakesExcess,
          });
          const cost = lines.reduce((sum, { costMinor }) => sum + costMinor, 0) + amountMinor;
          expect(share.totalMinor).toBe(cost);
          expect(share.sheet).toEqual(shareOut(share.request));
          const finals = share.members.reduce((sum, { finalMinor }) => sum + finalMinor, 0);
          const losses = share.excess.reduce((sum, { minor }) => sum + minor, 0);
          expect(finals + share.sheet.shelf.totalMinor + losses).toBe(cost);
        },
      ),
    );
  });
});
