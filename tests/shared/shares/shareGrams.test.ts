import { describe, expect, it, test } from 'vitest';
import { shareOut, type ShareLine, type SharePledge } from '#shared/index.ts';
import { shareLine, sharePledge, shareRequest } from '#tests/support/shareRequests.ts';

function grams(line: Partial<ShareLine>, pledges: SharePledge[]): Record<string, number> {
  const { members, shelf } = shareOut(shareRequest([shareLine(line)], pledges));
  const got = members.map(({ memberId, lines }) => [memberId, (lines[0]?.mg ?? NaN) / 1000]);
  return { ...Object.fromEntries(got), shelf: (shelf.lines[0]?.mg ?? NaN) / 1000 };
}

const upTo = (memberId: string, wanted: number, most: number, minute = 0) =>
  sharePledge(memberId, wanted, minute, { upToMg: most * 1000 });

describe('enough', () => {
  it('gives what was wanted and keeps the rest on the shelf', () => {
    const pledges = [sharePledge('amy', 600), sharePledge('bo', 400)];
    expect(grams({ availableMg: 1_200_500 }, pledges)).toEqual({ amy: 600, bo: 400, shelf: 200.5 });
  });

  it('fills room in proportion and never beyond it', () => {
    const pledges = [upTo('amy', 100, 400), upTo('bo', 100, 200), sharePledge('cy', 100)];
    expect(grams({ availableMg: 500_000 }, pledges)).toEqual({
      amy: 250,
      bo: 150,
      cy: 100,
      shelf: 0,
    });
    expect(grams({ availableMg: 900_000 }, pledges)).toEqual({
      amy: 400,
      bo: 200,
      cy: 100,
      shelf: 200,
    });
  });

  it('gives to those who want nothing, but would take some', () => {
    expect(grams({ availableMg: 50_000 }, [upTo('amy', 0, 80)])).toEqual({ amy: 50, shelf: 0 });
  });

  it('reads an upTo below wanted as no room', () => {
    expect(grams({ availableMg: 200_000 }, [upTo('amy', 100, 50)])).toEqual({
      amy: 100,
      shelf: 100,
    });
  });

  it('holds the reserve back, even from the spread', () => {
    const line = { availableMg: 1_100_000, reserveMg: 60_000, surplus: 'spread' } as const;
    expect(grams(line, [sharePledge('amy', 1000)])).toEqual({ amy: 1040, shelf: 60 });
    expect(grams({ ...line, reserveMg: 200_000 }, [sharePledge('amy', 1000)])).toEqual({
      amy: 1000,
      shelf: 100,
    });
  });

  it('spreads by what was wanted, whole steps, after the room is filled', () => {
    const pledges = [upTo('amy', 100, 120), sharePledge('bo', 300), sharePledge('cy', 0)];
    const line = { availableMg: 460_700, surplus: 'spread' } as const;
    expect(grams(line, pledges)).toEqual({ amy: 130, bo: 330, cy: 0, shelf: 0.7 });
  });

  it('caps the spread at so many per mille of what each wanted, floored to steps', () => {
    const pledges = [sharePledge('amy', 105), sharePledge('bo', 9)];
    const line = { availableMg: 500_000, surplus: 'spread', spreadMaxPermille: 100 } as const;
    expect(grams(line, pledges)).toEqual({ amy: 115, bo: 9, shelf: 376 });
    expect(grams({ ...line, availableMg: 119_000 }, pledges)).toEqual({
      amy: 110,
      bo: 9,
      shelf: 0,
    });
  });

  it('spreads nothing where nobody wanted any', () => {
    const line = { availableMg: 5000, surplus: 'spread' } as const;
    expect(grams(line, [sharePledge('amy', 0)])).toEqual({ amy: 0, shelf: 5 });
  });

  it('counts exactly enough as enough', () => {
    const line = { availableMg: 500_000, shortage: 'queue' } as const;
    expect(grams(line, [sharePledge('amy', 200), sharePledge('bo', 300)])).toEqual({
      amy: 200,
      bo: 300,
      shelf: 0,
    });
  });
});

describe('too little', () => {
  const pledges = [
    sharePledge('amy', 500, 5),
    sharePledge('bo', 300, 1),
    sharePledge('cy', 200, 9),
  ];

  it('scales by what was wanted, in whole steps; ties to the earlier pledge', () => {
    expect(grams({ availableMg: 501_900 }, pledges)).toEqual({
      amy: 251,
      bo: 150,
      cy: 100,
      shelf: 0.9,
    });
    expect(
      grams({ availableMg: 1000 }, [sharePledge('amy', 1, 5), sharePledge('bo', 1, 1)]),
    ).toEqual({ amy: 0, bo: 1, shelf: 0 });
  });

  it('serves the queue in order, the last of it in part', () => {
    const line = { availableMg: 600_900, shortage: 'queue' } as const;
    expect(grams(line, pledges)).toEqual({ amy: 300, bo: 300, cy: 0, shelf: 0.9 });
  });

  it('gives nothing of nothing', () => {
    expect(grams({ availableMg: 0 }, pledges)).toEqual({ amy: 0, bo: 0, cy: 0, shelf: 0 });
    expect(grams({ availableMg: 999 }, pledges)).toMatchObject({ amy: 0, shelf: 0.999 });
  });
});

describe('the order of pledges', () => {
  test.each([
    ['the earlier instant', '2026-03-01T19:00:00.001Z', '2026-03-01T19:00:00.000Z', 'bo'],
    ['an instant, not its spelling', '2026-03-01T19:30:00Z', '2026-03-01T20:00:00+01:00', 'bo'],
    [
      'the lower id when they are the same',
      '2026-03-01T19:00:00Z',
      '2026-03-01T19:00:00.000Z',
      'amy',
    ],
  ])('goes by %s', (_, amy, bo, first) => {
    const pledges = [sharePledge('amy', 1, 0, { at: amy }), sharePledge('bo', 1, 0, { at: bo })];
    const got = grams({ availableMg: 1000, shortage: 'queue' }, pledges);
    expect(got[first]).toBe(1);
    const { members } = shareOut(shareRequest([shareLine()], pledges));
    expect(members[0]?.memberId).toBe(first);
  });

  it('compares ids by code unit, not by alphabet', () => {
    const pledges = [sharePledge('amy', 1), sharePledge('Zoe', 1)];
    expect(grams({ availableMg: 1000 }, pledges)).toMatchObject({ Zoe: 1, amy: 0 });
  });
});
