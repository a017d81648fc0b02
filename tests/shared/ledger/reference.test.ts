import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  creditorReference,
  groupReference,
  isCreditorReference,
  paymentReference,
} from '#shared/domain/ledger/reference.ts';

describe('payment references', () => {
  it('has the check digits of the worked example of ISO 11649', () => {
    expect(creditorReference('539007547034')).toBe('RF18539007547034');
    expect(isCreditorReference('RF18 5390 0754 7034')).toBe(true);
    expect(isCreditorReference('RF18 5390 0754 7043')).toBe(false);
    expect(isCreditorReference('18 5390')).toBe(false);
  });

  it('is valid for any two ids and fits 25 characters', () => {
    fc.assert(
      fc.property(fc.uuid(), fc.uuid(), (buy, member) => {
        const reference = paymentReference(buy, member);
        expect(reference.length).toBe(20);
        expect(isCreditorReference(groupReference(reference))).toBe(true);
        expect(reference).toBe(paymentReference(buy, member));
      }),
    );
  });

  // A letter counts as two digits, so a digit in its place may go unseen: ISO 7064 MOD 97-10 is on digits.
  it('tells any single wrong digit for a digit, and letter for a letter', () => {
    const digits = '0123456789';
    const letters = 'ABCDEFGHIJKLMNOPQRSTUVWXYZ';
    fc.assert(
      fc.property(fc.uuid(), fc.uuid(), fc.nat(15), fc.nat(25), (buy, member, place, mark) => {
        const reference = paymentReference(buy, member);
        const at = 4 + place;
        const right = reference.charAt(at);
        const kind = digits.includes(right) ? digits : letters;
        const wrong = kind.charAt(mark % kind.length);
        fc.pre(right !== wrong);
        expect(isCreditorReference(reference.slice(0, at) + wrong + reference.slice(at + 1))).toBe(
          false,
        );
      }),
    );
  });
});
