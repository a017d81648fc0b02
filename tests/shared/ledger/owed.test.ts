import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { allocatePayment, allocateRefund } from '#shared/domain/ledger/allocate.ts';
import { computeOwed, type BuyAccount } from '#shared/domain/ledger/owed.ts';

const buy = (buyId: string, fields: Partial<BuyAccount> = {}): BuyAccount => ({
  buyId,
  dueMinor: 0,
  balanceMinor: 0,
  finalMinor: null,
  heldAsDeposit: false,
  dueAtMs: null,
  ...fields,
});

describe('computeOwed', () => {
  it('asks for the due less what was paid', () => {
    const owed = computeOwed(0, [buy('a', { dueMinor: 1500, balanceMinor: -500 })], 'EUR');
    expect(owed).toMatchObject({ openMinor: 1000, creditMinor: 0, balanceMinor: -500 });
    expect(owed.buys[0]).toMatchObject({ paidMinor: 500, openMinor: 1000 });
  });

  it('uses credit of one buy for the oldest due', () => {
    const owed = computeOwed(
      0,
      [
        buy('cancelled', { balanceMinor: -700 }),
        buy('newer', { dueMinor: 500, dueAtMs: 2 }),
        buy('older', { dueMinor: 400, dueAtMs: 1 }),
      ],
      'EUR',
    );
    expect(owed.buys.map(({ openMinor }) => openMinor)).toEqual([0, 200, 0]);
    expect(owed).toMatchObject({ openMinor: 200, creditMinor: 0 });
  });

  it('carries a final difference below one whole unit, in yen and dinars too', () => {
    const final = (balanceMinor: number, currency: string) =>
      computeOwed(0, [buy('a', { finalMinor: 5000, balanceMinor })], currency);
    expect(final(99, 'EUR')).toMatchObject({ openMinor: 0, carriedMinor: 99 });
    expect(final(100, 'EUR')).toMatchObject({ openMinor: 100, carriedMinor: 0 });
    expect(final(1, 'JPY')).toMatchObject({ openMinor: 1 });
    expect(final(999, 'KWD')).toMatchObject({ openMinor: 0, carriedMinor: 999 });
    expect(final(-40, 'EUR')).toMatchObject({ openMinor: 0, creditMinor: 40 });
  });

  it('asks for a whole share below one unit, and not for a rise below it', () => {
    expect(computeOwed(0, [buy('a', { dueMinor: 80 })], 'EUR').openMinor).toBe(80);
    const risen = computeOwed(0, [buy('a', { dueMinor: 540, balanceMinor: -500 })], 'EUR');
    expect(risen).toMatchObject({ openMinor: 0, carriedMinor: 40 });
  });

  it('keeps the deposit of a reopened buy, and frees it for who left', () => {
    const held = buy('a', { balanceMinor: -300, heldAsDeposit: true });
    expect(computeOwed(0, [held], 'EUR').creditMinor).toBe(0);
    expect(computeOwed(0, [{ ...held, heldAsDeposit: false }], 'EUR').creditMinor).toBe(300);
  });
});

const accounts = fc.array(
  fc.record({
    dueMinor: fc.nat(5000),
    balanceMinor: fc.integer({ min: -5000, max: 5000 }),
    finalMinor: fc.option(fc.nat(5000)),
    heldAsDeposit: fc.constant(false),
    dueAtMs: fc.option(fc.nat(9)),
  }),
  { maxLength: 6 },
);

describe('owed and its allocation, for any books', () => {
  it('neither makes nor loses money', () => {
    fc.assert(
      fc.property(fc.integer({ min: -3000, max: 3000 }), accounts, (general, list) => {
        const buys = list.map((entry, index) => ({ ...entry, buyId: `b${index}` }));
        const owed = computeOwed(general, buys, 'EUR');
        const dues = buys.reduce((sum, { dueMinor }) => sum + dueMinor, 0);
        expect(owed.openMinor + owed.carriedMinor - owed.creditMinor).toBe(
          owed.balanceMinor + dues,
        );
        // Whoever has credit left owes nothing, not even what is carried.
        if (owed.creditMinor > 0) expect(owed.openMinor + owed.carriedMinor).toBe(0);
      }),
    );
  });

  it('pays exactly what was paid in, and pays off what is open when it is enough', () => {
    fc.assert(
      fc.property(accounts, fc.integer({ min: 1, max: 20000 }), (list, amount) => {
        const buys = list.map((entry, index) => ({ ...entry, buyId: `b${index}` }));
        const owed = computeOwed(0, buys, 'EUR');
        const parts = allocatePayment(amount, null, owed);
        expect(parts.reduce((sum, part) => sum + part.amountMinor, 0)).toBe(amount);
        const after = computeOwed(
          -parts.filter(({ buyId }) => buyId === null).reduce((s, p) => s + p.amountMinor, 0),
          buys.map((account) => ({
            ...account,
            balanceMinor:
              account.balanceMinor -
              (parts
                .filter(({ buyId }) => buyId === account.buyId)
                .reduce((sum, part) => sum + part.amountMinor, 0) || 0),
          })),
          'EUR',
        );
        if (amount >= owed.openMinor) expect(after.openMinor).toBe(0);
        else expect(after.openMinor).toBeLessThanOrEqual(owed.openMinor - amount);
      }),
    );
  });

  it('refunds no more than the credit', () => {
    const owed = computeOwed(-200, [buy('a', { balanceMinor: -300 })], 'EUR');
    expect(allocateRefund(400, owed)).toEqual([
      { buyId: 'a', amountMinor: 300 },
      { buyId: null, amountMinor: 100 },
    ]);
    expect(() => allocateRefund(501, owed)).toThrow(RangeError);
  });
});
