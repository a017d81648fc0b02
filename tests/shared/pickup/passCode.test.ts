import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readPass, writePass } from '#shared/domain/pickup/passCode.ts';

const tenBytes = fc.uint8Array({ minLength: 10, maxLength: 10 });
const alphabet = '0123456789ABCDEFGHJKMNPQRSTVWXYZ';

describe('passCode', () => {
  it('is written in groups and read back however it is typed', () => {
    fc.assert(
      fc.property(tenBytes, (bytes) => {
        const pass = writePass(bytes);
        expect(pass).toMatch(/^([0-9A-HJKMNP-TV-Z]{4}-){4}[0-9A-HJKMNP-TV-Z]$/);
        expect(readPass(pass.toLowerCase().replace(/-/g, ' '))).toBe(pass);
        expect(readPass(pass.replace(/0/g, 'o').replace(/1/g, 'l'))).toBe(pass);
      }),
    );
  });

  it('finds every single wrong mark', () => {
    fc.assert(
      fc.property(tenBytes, fc.nat(16), fc.nat(31), (bytes, at, other) => {
        const marks = [...writePass(bytes).replace(/-/g, '')];
        const wrong = alphabet.charAt(other);
        fc.pre(marks[at] !== wrong);
        marks[at] = wrong;
        expect(readPass(marks.join(''))).toBeNull();
      }),
    );
  });

  it('refuses what has the wrong length', () => {
    expect(readPass('')).toBeNull();
    expect(readPass('ABCD')).toBeNull();
    expect(() => writePass(new Uint8Array(9))).toThrow(RangeError);
  });
});
