import { describe, expect, it, test } from 'vitest';
import { shareOut, type ShareCharge, type ShareRequest } from '#shared/index.ts';
import { shareCharge, shareLine, sharePledge, shareRequest } from '#tests/support/shareRequests.ts';

function charged(request: ShareRequest, id: string): Record<string, number> {
  const { members, shelf } = shareOut(request);
  const minor = (charges: { id: string; minor: number }[]) =>
    charges.find((charge) => charge.id === id)?.minor ?? NaN;
  const parts = members.map(({ memberId, charges }) => [memberId, minor(charges)]);
  return { ...Object.fromEntries(parts), shelf: minor(shelf.charges) };
}

describe("a line's cost", () => {
  const pledges = [sharePledge('amy', 600), sharePledge('bo', 23_050)];

  it('falls on members alone unless the shelf pays', () => {
    const { members, shelf } = shareOut(shareRequest([shareLine()], pledges));
    expect(members.map((member) => member.totalMinor)).toEqual([241, 9259]);
    expect(shelf).toEqual({
      lines: [{ lineId: 'kno3', mg: 1_350_000, costMinor: 0, taxMinor: 0 }],
      charges: [],
      totalMinor: 0,
    });
  });

  it.each([true, undefined])(
    'falls on the shelf by its grams when shelfPays is %s',
    (shelfPays) => {
      const line = shareLine({ costMinor: 10_000, shelfPays });
      if (shelfPays === undefined) delete line.shelfPays;
      const { members, shelf } = shareOut(shareRequest([line], pledges));
      expect(members.map((member) => member.totalMinor)).toEqual([240, 9220]);
      expect(shelf.totalMinor).toBe(540);
    },
  );

  it("is the shelf's where nobody gets any", () => {
    const { members, shelf } = shareOut(shareRequest([shareLine()], [sharePledge('amy', 0)]));
    expect(shelf.totalMinor).toBe(9500);
    expect(members).toMatchObject([{ memberId: 'amy', totalMinor: 0 }]);
  });

  it('gives the odd cent of a tie to the earlier pledge, then the lower id, the shelf last', () => {
    const third = [sharePledge('cy', 1, 2), sharePledge('bo', 1, 1), sharePledge('amy', 1, 2)];
    const line = shareLine({ availableMg: 4000, costMinor: 10, shelfPays: true });
    const { members, shelf } = shareOut(shareRequest([line], third));
    expect(members.map(({ memberId, totalMinor }) => [memberId, totalMinor])).toEqual([
      ['bo', 3],
      ['amy', 3],
      ['cy', 2],
    ]);
    expect(shelf.totalMinor).toBe(2);
  });
});

describe('charges', () => {
  const lines = [
    shareLine({ id: 'kno3', availableMg: 1_000_000, costMinor: 1000 }),
    shareLine({ id: 'mgso4', availableMg: 4_000_000, costMinor: 3000, shelfPays: true }),
  ];
  const pledges = [
    sharePledge('amy', 750, 1),
    sharePledge('bo', 250, 2),
    sharePledge('amy', 1000, 1, { lineId: 'mgso4' }),
    sharePledge('cy', 1000, 3, { lineId: 'mgso4' }),
    sharePledge('di', 0, 0, { lineId: 'mgso4' }),
  ];
  const part = (charge: Partial<ShareCharge>) =>
    charged(shareRequest(lines, pledges, [shareCharge(charge)]), 'freight');

  test.each<[string, Partial<ShareCharge>, Record<string, number>]>([
    ['mass', { amountMinor: 5000, basis: 'mass' }, { amy: 1750, bo: 250, cy: 1000, shelf: 2000 }],
    ['value', { amountMinor: 4000, basis: 'value' }, { amy: 1500, bo: 250, cy: 750, shelf: 1500 }],
    ['member', { amountMinor: 100, basis: 'member' }, { amy: 34, bo: 33, cy: 33, shelf: 0 }],
    ['portion', { amountMinor: 100, basis: 'portion' }, { amy: 50, bo: 25, cy: 25, shelf: 0 }],
    ['a rebate', { amountMinor: -101, basis: 'member' }, { amy: -34, bo: -34, cy: -33, shelf: 0 }],
    [
      'one line only',
      { amountMinor: 99, basis: 'member', lineIds: ['mgso4'] },
      { amy: 50, bo: 0, cy: 49, shelf: 0 },
    ],
    [
      'mass on a line whose shelf pays nothing',
      { amountMinor: 100, basis: 'mass', lineIds: ['kno3'] },
      { amy: 75, bo: 25, cy: 0, shelf: 0 },
    ],
    ['no lines: the shelf', { amountMinor: 99, lineIds: [] }, { amy: 0, bo: 0, cy: 0, shelf: 99 }],
  ])('by %s', (_, charge, expected) => {
    expect(part(charge)).toEqual({ ...expected, di: 0 });
  });

  it("uses a member's earliest pledge above zero for ties", () => {
    const early = sharePledge('cy', 0, 0, { lineId: 'kno3' });
    const request = shareRequest(
      lines,
      [...pledges, early],
      [shareCharge({ amountMinor: 1, basis: 'member' })],
    );
    expect(charged(request, 'freight')).toMatchObject({ amy: 1, cy: 0 });
    const roomy = { ...early, upToMg: 1000 };
    const other = shareRequest(
      lines,
      [...pledges, roomy],
      [shareCharge({ amountMinor: 1, basis: 'member' })],
    );
    expect(charged(other, 'freight')).toMatchObject({ amy: 0, cy: 1 });
  });

  it('by value counts what the shelf bears, even where it bears all', () => {
    const request = shareRequest(
      [shareLine({ costMinor: 700 }), shareLine({ id: 'k2so4', costMinor: 300 })],
      [sharePledge('amy', 1)],
      [shareCharge({ amountMinor: 1000, basis: 'value' })],
    );
    expect(charged(request, 'freight')).toEqual({ amy: 700, shelf: 300 });
  });
});

describe('tax', () => {
  test.each([
    // 119.00 at 19 % contains 19.00, by definition of the rate.
    [11_900, 0.19, 1900],
    // Half a cent rounds up: 0.03 at 20 % contains 0.005.
    [3, 0.2, 1],
    [1000, 0.077, 71],
    [1000, 0.1234567, 110],
    [1000, 0, 0],
    [0, 0.19, 0],
  ])('%i at %d contains %i', (costMinor, taxRate, tax) => {
    const line = shareLine({ availableMg: 1000, costMinor, taxRate });
    const { members } = shareOut(shareRequest([line], [sharePledge('amy', 1)]));
    expect(members[0]?.lines[0]?.taxMinor).toBe(tax);
    expect(members[0]?.totalMinor).toBe(costMinor);
  });

  it('is divided by what each pays, the shelf included, rebates with their sign', () => {
    const line = shareLine({ availableMg: 4000, costMinor: 1000, taxRate: 0.19, shelfPays: true });
    const rebate = shareCharge({ amountMinor: -100, basis: 'mass', taxRate: 0.19 });
    const { members, shelf } = shareOut(
      shareRequest([line], [sharePledge('amy', 2), sharePledge('bo', 1)], [rebate]),
    );
    expect(members.map((member) => member.lines[0]?.taxMinor)).toEqual([80, 40]);
    expect(shelf.lines[0]?.taxMinor).toBe(40);
    expect(members.map((member) => member.charges[0]?.taxMinor)).toEqual([-8, -4]);
    expect(shelf.charges[0]?.taxMinor).toBe(-4);
  });
});
