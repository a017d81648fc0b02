import { describe, expect, it } from 'vitest';
import { newBuyDates, type ZoneClock } from '#shared/domain/buys/newBuyDates.ts';
import { termsBlocks, type DraftedTerms } from '#shared/domain/buys/termsBlocks.ts';
import { mayChangeField, mayChangeStep } from '#shared/domain/buys/editableTerms.ts';

const utc: ZoneClock = {
  dayOf: (at) => ({ year: at.getUTCFullYear(), month: at.getUTCMonth() + 1, day: at.getUTCDate() }),
  instantOf: ({ year, month, day }, hour) => new Date(Date.UTC(year, month - 1, day, hour)),
};

describe('newBuyDates', () => {
  it('closes in 10 days at 20:00 and splits on the first Saturday three weeks on', () => {
    const dates = newBuyDates(new Date('2026-12-01T09:00:00Z'), utc);
    expect(dates).toEqual({
      name: 'December salts 2026',
      closesAt: new Date('2026-12-11T20:00:00Z'),
      splitsAt: new Date('2026-12-26T14:00:00Z'),
      splitEndsAt: new Date('2026-12-26T16:00:00Z'),
    });
  });

  it('is a Saturday at least 21 days away on every day of a year, over its end too', () => {
    for (let day = 0; day < 366; day += 1) {
      const now = new Date(Date.UTC(2026, 0, 1 + day, 12));
      const { splitsAt, name } = newBuyDates(now, utc);
      const away = (splitsAt.getTime() - now.getTime()) / 86_400_000;
      expect(splitsAt.getUTCDay()).toBe(6);
      expect(away).toBeGreaterThan(21);
      expect(away).toBeLessThan(28);
      expect(name).toContain(String(splitsAt.getUTCFullYear()));
    }
  });
});

describe('termsBlocks', () => {
  const fine: DraftedTerms = {
    nowMs: 0,
    closesAtMs: 10,
    splitsAtMs: 20,
    splitEndsAtMs: 30,
    minimumKind: 'none',
    minimumAmount: 0,
    leftOverPayer: 'members',
    shelfLimitMinor: 0,
    clubShelfLimitMinor: 0,
    lines: [{ id: 'a', name: 'A salt', livingOffers: 1, refusal: null }],
  };

  it.each<[string, Partial<DraftedTerms>, string[]]>([
    ['nothing', {}, []],
    ['no closing', { closesAtMs: null }, ['closesAt']],
    ['closing now', { nowMs: 10 }, ['closesAt']],
    ['split day before the closing', { splitsAtMs: 10, splitEndsAtMs: 30 }, ['splitsAt']],
    ['no split day', { splitsAtMs: null }, ['splitsAt']],
    ['ends as it starts', { splitEndsAtMs: 20 }, ['splitEndsAt']],
    ['no end', { splitEndsAtMs: null }, []],
    ['no lines', { lines: [] }, ['lines']],
    ['a minimum of nothing', { minimumKind: 'members' }, ['minimumAmount']],
    [
      'more than the shelf may pay',
      { leftOverPayer: 'shelf', shelfLimitMinor: 1 },
      ['shelfLimitMinor'],
    ],
    [
      'a line without an offer',
      { lines: [{ id: 'a', name: 'A salt', livingOffers: 0, refusal: null }] },
      ['lines.a.offers'],
    ],
    [
      'a salt that may not be a line any more',
      { lines: [{ id: 'a', name: 'A salt', livingOffers: 1, refusal: 'No.' }] },
      ['lines.a.saltId'],
    ],
  ])('%s', (_name, change, fields) => {
    expect(Object.keys(termsBlocks({ ...fine, ...change }))).toEqual(fields);
  });
});

describe('what may still change', () => {
  it('is all until the lock, then what is about meeting, then nothing', () => {
    expect(mayChangeField('open', 'dueDays')).toBe(true);
    expect(mayChangeField('locked', 'dueDays')).toBe(false);
    expect(mayChangeField('pickup', 'place')).toBe(true);
    expect(mayChangeField('settled', 'place')).toBe(false);
    expect(mayChangeField('cancelled', 'note')).toBe(false);
  });

  it('keeps pledges whole numbers of steps', () => {
    expect(mayChangeStep(5000, 2500, true)).toBe(true);
    expect(mayChangeStep(5000, 2000, true)).toBe(false);
    expect(mayChangeStep(5000, 10_000, true)).toBe(false);
    expect(mayChangeStep(5000, 2000, false)).toBe(true);
  });
});
