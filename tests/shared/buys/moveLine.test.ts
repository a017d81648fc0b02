import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { moveLine } from '#shared/domain/buys/moveLine.ts';
import { shareOut } from '#shared/domain/shares/shareOut.ts';
import type { ShareRequest } from '#shared/domain/shares/shareTypes.ts';

const at = (minute: number) => new Date(Date.UTC(2026, 0, 1, 0, minute)).toISOString();

const request: ShareRequest = {
  currency: 'EUR',
  lines: [
    {
      id: 'a',
      availableMg: 1_000_000,
      costMinor: 1000,
      stepMg: 1000,
      surplus: 'shelf',
      shortage: 'scale',
    },
    {
      id: 'b',
      availableMg: 500_000,
      costMinor: 700,
      stepMg: 1000,
      surplus: 'shelf',
      shortage: 'scale',
    },
  ],
  pledges: [
    { memberId: 'ana', lineId: 'a', wantedMg: 600_000, at: at(1) },
    { memberId: 'ana', lineId: 'b', wantedMg: 300_000, at: at(1) },
    { memberId: 'ben', lineId: 'a', wantedMg: 400_000, at: at(2) },
    { memberId: 'cleo', lineId: 'b', wantedMg: 200_000, at: at(3) },
  ],
  charges: [
    { id: 'freight', amountMinor: 300, basis: 'mass' },
    { id: 'bags', amountMinor: 90, basis: 'member' },
  ],
};

describe('moveLine', () => {
  it('moves the cost of the line and its part of the freight; an equal charge stays', () => {
    const sheet = shareOut(request);
    const result = moveLine(request, sheet, 'a', 'ana', 'ben');
    // 600 g of 1 000 g, of 10.00; freight by mass: 600 g of the 900 g behind Ana's 1.80.
    expect(result).toMatchObject({ mg: 600_000, amountMinor: 600 + 120 });
    const ana = result?.sheet.members.find(({ memberId }) => memberId === 'ana');
    const ben = result?.sheet.members.find(({ memberId }) => memberId === 'ben');
    expect(ana?.lines.map(({ lineId }) => lineId)).toEqual(['b']);
    expect(ben?.lines).toMatchObject([{ lineId: 'a', mg: 1_000_000, costMinor: 1000 }]);
    expect(ben?.why.at(-2)).toBe('600 g handed on by agreement: 7.20');
  });

  it('takes an equal charge along when nothing is left to the giver', () => {
    const sheet = shareOut(request);
    const result = moveLine(request, sheet, 'b', 'cleo', 'dora');
    const cleo = result?.sheet.members.find(({ memberId }) => memberId === 'cleo');
    const dora = result?.sheet.members.find(({ memberId }) => memberId === 'dora');
    expect(cleo).toMatchObject({ lines: [], totalMinor: 0 });
    expect(dora?.totalMinor).toBe(
      sheet.members.find(({ memberId }) => memberId === 'cleo')?.totalMinor,
    );
  });

  it('gives null for a line that the member does not have', () => {
    expect(moveLine(request, shareOut(request), 'a', 'cleo', 'ben')).toBeNull();
    expect(moveLine(request, shareOut(request), 'a', 'ben', 'ben')).toBeNull();
  });

  it('keeps every sum: the whole, each line, each charge, and everyone else', () => {
    const wanted = fc.integer({ min: 0, max: 900 }).map((steps) => steps * 1000);
    const basis = fc.constantFrom(
      'mass' as const,
      'value' as const,
      'member' as const,
      'portion' as const,
    );
    fc.assert(
      fc.property(
        fc.array(fc.tuple(wanted, wanted), { minLength: 2, maxLength: 8 }),
        fc.integer({ min: 0, max: 9999 }),
        fc.integer({ min: -500, max: 5000 }),
        basis,
        fc.nat(7),
        (people, costMinor, amountMinor, by, taker) => {
          const pledges = people.flatMap(([a, b], index) => [
            { memberId: `m${index}`, lineId: 'a', wantedMg: a, at: at(index) },
            { memberId: `m${index}`, lineId: 'b', wantedMg: b, at: at(index) },
          ]);
          const asked: ShareRequest = {
            ...request,
            lines: request.lines.map((line) => ({ ...line, costMinor, taxRate: 0.19 })),
            pledges,
            charges: [{ id: 'c', amountMinor, basis: by, taxRate: 0.19 }],
          };
          const sheet = shareOut(asked);
          const to = `m${taker}`;
          const result = moveLine(asked, sheet, 'a', 'm0', to);
          if (!result) return;
          const totals = (of: typeof sheet) => [
            of.members.reduce((sum, { totalMinor }) => sum + totalMinor, 0),
            of.members.reduce(
              (sum, { lines }) => sum + lines.reduce((mg, line) => mg + line.mg, 0),
              0,
            ),
            of.members.reduce((sum, { charges }) => sum + (charges[0]?.minor ?? 0), 0),
            of.members.reduce((sum, { charges }) => sum + (charges[0]?.taxMinor ?? 0), 0),
          ];
          expect(totals(result.sheet)).toEqual(totals(sheet));
          const rest = (of: typeof sheet) =>
            of.members.filter(({ memberId }) => memberId !== 'm0' && memberId !== to);
          expect(rest(result.sheet)).toEqual(rest(sheet));
          const wantedOf = (list: ShareRequest['pledges']) =>
            list.reduce((sum, { wantedMg }) => sum + wantedMg, 0);
          expect(wantedOf(result.request.pledges)).toBe(wantedOf(pledges));
        },
      ),
    );
  });
});
