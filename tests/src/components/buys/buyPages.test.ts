import { describe, expect, it } from 'vitest';
import type { BuyHeader } from '#shared/schemas/buys.ts';
import { canLookAt, landingPages } from 'src/components/buys/buyPages.ts';
import { parseTypedNumber } from 'src/components/buys/typedCount.ts';

const head = (
  state: BuyHeader['state'],
  given: { organises?: boolean; openedAt?: string | null; lockedAt?: string | null } = {},
) =>
  ({
    state,
    openedAt: given.openedAt ?? (state === 'draft' ? null : '2026-01-01T00:00:00.000Z'),
    lockedAt: given.lockedAt ?? null,
    mine: { organises: given.organises ?? false },
  }) as BuyHeader;

describe('which pages of a buy a reader can look at', () => {
  it('shows a member the steps reached, and never the draft', () => {
    const ordered = head('ordered');
    expect(canLookAt('draft', ordered, false)).toBe(false);
    expect(canLookAt('open', ordered, false)).toBe(true);
    expect(canLookAt('ordered', ordered, false)).toBe(true);
    expect(canLookAt('arrived', ordered, false)).toBe(false);
  });

  it('lets who prepares a step in one state early', () => {
    expect(canLookAt('ordered', head('locked', { organises: true }), false)).toBe(true);
    expect(canLookAt('ordered', head('locked'), false)).toBe(false);
    expect(canLookAt('settled', head('pickup'), true)).toBe(true);
    expect(canLookAt('settled', head('splitting'), true)).toBe(false);
  });

  it('lands where the buy stands, else on the last page there is', () => {
    expect(landingPages(head('locked'), false)).toEqual(['buy-locked', 'buy-sheet']);
    expect(landingPages(head('draft', { organises: true }), false)).toEqual(['buy-draft']);
    expect(landingPages(head('cancelled'), false)).toEqual(['buy-sheet']);
    const lockedOnce = head('cancelled', { lockedAt: '2026-01-02T00:00:00.000Z' });
    expect(landingPages(lockedOnce, false)).toEqual(['buy-locked', 'buy-sheet']);
  });
});

describe('parseTypedNumber', () => {
  it.each([
    ['7', 1, 7],
    ['0,5', 10, 5],
    ['0.5 %', 100, 50],
    ['19', 10_000, 190_000],
  ])('%s in %d-ths is %d', (text, scale, value) => {
    expect(parseTypedNumber(text, scale)).toEqual({ ok: true, value });
  });

  it.each([
    ['', 1, 'unreadable'],
    ['many', 1, 'unreadable'],
    ['-3', 1, 'negative'],
    ['0.05', 10, 'too_precise'],
  ])('refuses %s', (text, scale, code) => {
    expect(parseTypedNumber(text, scale)).toEqual({ ok: false, code });
  });
});
