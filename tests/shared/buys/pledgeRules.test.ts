import { describe, expect, it } from 'vitest';
import {
  decidePledge,
  loweringFrozen,
  plainWish,
  type PledgeFacts,
} from '#shared/domain/buys/pledgeRules.ts';

const hour = 3_600_000;
const facts = (more: Partial<PledgeFacts> = {}): PledgeFacts => ({
  state: 'open',
  frozen: false,
  nowMs: 0,
  closesAtMs: 100 * hour,
  loweringFreezeHours: 24,
  stepMg: 1000,
  before: { wantedMg: 500_000, upToMg: null },
  who: 'member',
  unconfirmed: false,
  overdueIn: null,
  ...more,
});
const to = (grams: number, upTo: number | null = null) => ({
  wantedMg: grams * 1000,
  upToMg: upTo === null ? null : upTo * 1000,
});
const codeOf = (verdict: ReturnType<typeof decidePledge>) =>
  verdict.ok ? verdict.act : verdict.code;

describe('a change of a pledge', () => {
  it.each<[string, Partial<PledgeFacts>, ReturnType<typeof to>, string]>([
    ['raised', {}, to(600), 'save'],
    ['lowered', {}, to(400), 'save'],
    ['withdrawn', {}, to(0), 'save'],
    ['as it stands', {}, to(500), 'keep'],
    ['nothing where nothing was', { before: null }, to(0), 'keep'],
    ['in a draft', { state: 'draft' }, to(600), 'wrong_state'],
    ['in a cancelled buy', { state: 'cancelled' }, to(600), 'wrong_state'],
    ['once locked', { state: 'locked' }, to(600), 'buy_locked'],
    ['while frozen', { frozen: true }, to(600), 'buy_frozen'],
    ['a millisecond early', { nowMs: 100 * hour - 1 }, to(600), 'save'],
    ['at the closing time', { nowMs: 100 * hour }, to(600), 'buy_locked'],
    ['between steps', { stepMg: 10_000 }, to(605), 'invalid'],
    ['up to between steps', { stepMg: 10_000 }, to(600, 705), 'invalid'],
    ['lowered late', { nowMs: 76 * hour }, to(499), 'closing_soon'],
    ['lowered just before that', { nowMs: 76 * hour - 1 }, to(499), 'save'],
    ['raised late', { nowMs: 99 * hour }, to(501), 'save'],
    ['less flexible late', { nowMs: 99 * hour, before: to(500, 900) }, to(500, 600), 'save'],
    ['lowered late by the organiser', { nowMs: 99 * hour, who: 'organiser' }, to(499), 'save'],
    ['raised while overdue', { overdueIn: 'Autumn' }, to(501), 'overdue_elsewhere'],
    ['more flexible while overdue', { overdueIn: 'Autumn' }, to(500, 600), 'overdue_elsewhere'],
    ['lowered while overdue', { overdueIn: 'Autumn' }, to(400), 'save'],
    [
      'raised for who is overdue',
      { overdueIn: 'Autumn', who: 'organiser' },
      to(501),
      'overdue_elsewhere',
    ],
    ['raised unread', { unconfirmed: true }, to(501), 'hazard_unconfirmed'],
    ['lowered unread', { unconfirmed: true }, to(400), 'save'],
    [
      'raised unread for somebody',
      { unconfirmed: true, before: null, who: 'organiser' },
      to(501),
      'save',
    ],
    ['raised for somebody', { who: 'organiser' }, to(501), 'propose'],
    ['made more flexible for somebody', { who: 'organiser' }, to(500, 600), 'propose'],
    ['entered for somebody', { who: 'organiser', before: null }, to(500, 600), 'save'],
    ['raised for a guest', { who: 'organiserForGuest' }, to(501), 'save'],
  ])('%s', (_name, more, wish, code) => {
    expect(codeOf(decidePledge(facts(more), wish))).toBe(code);
  });

  it('keeps its turn unless wanted rises', () => {
    const keeps = (wish: ReturnType<typeof to>) => {
      const verdict = decidePledge(facts(), wish);
      return verdict.ok && verdict.act === 'save' && verdict.keepsTurn;
    };
    expect([keeps(to(501)), keeps(to(499)), keeps(to(500, 800))]).toEqual([false, true, true]);
  });

  it('names the steps to either side', () => {
    const verdict = decidePledge(facts({ stepMg: 50_000 }), to(120));
    expect(verdict).toMatchObject({
      errors: { wantedMg: 'This line goes in steps of 50\u00a0g: 100\u00a0g or 150\u00a0g.' },
    });
  });

  it('takes an up to without room for none', () => {
    expect(plainWish(to(500, 500))).toEqual(to(500));
    expect(plainWish(to(500, 400))).toEqual(to(500));
    expect(plainWish(to(0, 400))).toEqual(to(0, 400));
  });

  it('has no late hours without them or without a closing time', () => {
    const at = { nowMs: 99 * hour, closesAtMs: 100 * hour, loweringFreezeHours: 0 };
    expect(loweringFrozen(at)).toBe(false);
    expect(loweringFrozen({ ...at, closesAtMs: null, loweringFreezeHours: 24 })).toBe(false);
  });
});
