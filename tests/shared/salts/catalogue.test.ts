import { describe, expect, it } from 'vitest';
import { casProblem } from '#shared/domain/salts/cas.ts';
import { catalogue } from '#shared/domain/salts/data/catalogue.ts';
import { precursors } from '#shared/domain/salts/data/precursors.ts';
import { saltIndex } from '#shared/domain/salts/data/saltIndex.ts';
import { storageClasses } from '#shared/domain/salts/data/storageClasses.ts';
import { findCatalogueSalt } from '#shared/domain/salts/findCatalogueSalt.ts';
import { grossPriceMinor } from '#shared/domain/salts/grossPrice.ts';
import {
  hazardText,
  isHazardCode,
  leavesWordOpen,
  pictogramsOf,
  signalWordOf,
} from '#shared/domain/salts/hazards.ts';

describe('the shipped list', () => {
  it('says the same in brief as in full', () => {
    expect(saltIndex).toEqual(
      catalogue.map((salt) => {
        const lists = salt.regulatoryFlags.map(({ list }) => list);
        return {
          id: salt.id,
          name: salt.name,
          formula: salt.formula,
          cas: salt.cas.value,
          statements: salt.ghs.statements,
          signalWord: salt.ghs.signalWord,
          list: lists.includes('restricted') ? 'restricted' : (lists[0] ?? null),
        };
      }),
    );
  });

  it('names a source for every value', () => {
    const look = (value: unknown, path: string): void => {
      if (Array.isArray(value)) value.forEach((one, index) => look(one, `${path}.${index}`));
      else if (value !== null && typeof value === 'object') {
        const thing = value as Record<string, unknown>;
        if ('value' in thing || 'values' in thing || 'statements' in thing) {
          expect([path, typeof thing.source]).toEqual([path, 'string']);
          expect((thing.source as string).length).toBeGreaterThan(4);
        }
        Object.entries(thing).forEach(([key, one]) => look(one, `${path}.${key}`));
      }
    };
    catalogue.forEach((salt) => look(salt, salt.id));
  });

  it('finds each by its id, and nothing else', () => {
    for (const salt of catalogue) expect(findCatalogueSalt(salt.id)).toBe(salt);
    expect(findCatalogueSalt('KNO4')).toBeNull();
  });

  it('has only ids that exist in its storage classes', () => {
    const ids = new Set(catalogue.map(({ id }) => id));
    for (const id of Object.values(storageClasses).flat())
      expect([id, ids.has(id)]).toEqual([id, true]);
  });
});

describe('CAS numbers', () => {
  it.each([
    ['7732-18-5', null],
    ['7757-79-1', null],
    ['58-08-2', null],
    ['7757-79-2', 'check_digit'],
    ['7577-79-1', 'check_digit'],
    ['7757791', 'shape'],
    ['0757-79-1', 'shape'],
    ['7757-79-1 ', 'shape'],
    ['', 'shape'],
  ])('%j', (cas, problem) => {
    expect(casProblem(cas)).toBe(problem);
  });

  it.each([...catalogue.map(({ cas }) => cas.value), ...precursors.flatMap(({ cas }) => cas)])(
    '%s has a right check digit',
    (cas) => {
      expect(casProblem(cas)).toBeNull();
    },
  );
});

describe('hazards', () => {
  it('knows the words of every statement of the list', () => {
    for (const { ghs } of catalogue) {
      for (const code of ghs.statements) expect([code, isHazardCode(code)]).toEqual([code, true]);
    }
    expect(hazardText('H272')).toBe('May intensify fire; oxidiser.');
    expect(hazardText('H360FD')).toBe('May damage fertility. May damage the unborn child.');
  });

  it('computes the signal words that the list states', () => {
    for (const { ghs } of catalogue)
      expect(signalWordOf(ghs.statements, ghs.signalWord)).toBe(ghs.signalWord);
  });

  it.each([
    [['H272'], ['GHS03']],
    [
      ['H302', 'H318'],
      ['GHS05', 'GHS07'],
    ],
    [['H318', 'H319', 'H315'], ['GHS05']],
    [['H301', 'H302', 'H319'], ['GHS06']],
    [['H334', 'H317'], ['GHS08']],
    [
      ['H334', 'H302'],
      ['GHS07', 'GHS08'],
    ],
    [['H411'], ['GHS09']],
    [['H412'], []],
    [['H241'], ['GHS01', 'GHS02']],
    [[], []],
  ])('%j shows %j', (statements, expected) => {
    expect(pictogramsOf(statements)).toEqual(expected);
  });

  it.each([
    [['H272'], null, null, true],
    [['H272'], 'Danger', 'Danger', true],
    [['H272', 'H318'], null, 'Danger', false],
    [['H272', 'H319'], null, 'Warning', true],
    [['H411'], null, null, false],
  ] as const)('%j with %s: %s', (statements, stated, word, open) => {
    expect(signalWordOf(statements, stated)).toBe(word);
    expect(leavesWordOpen(statements)).toBe(open);
  });
});

describe('prices without tax', () => {
  it.each([
    [7059, false, 190_000, 8400],
    [8400, true, 190_000, 8400],
    [1, false, 500_000, 2],
    [1, false, 499_999, 1],
    [0, false, 190_000, 0],
    [Number.MAX_SAFE_INTEGER, true, 0, Number.MAX_SAFE_INTEGER],
  ])('%d, included %s, %d ppm: %d', (priceMinor, priceIncludesTax, taxRatePpm, gross) => {
    expect(grossPriceMinor({ priceMinor, priceIncludesTax, taxRatePpm })).toBe(gross);
  });

  it('throws past the safe integers', () => {
    const huge = {
      priceMinor: Number.MAX_SAFE_INTEGER,
      priceIncludesTax: false,
      taxRatePpm: 190_000,
    };
    expect(() => grossPriceMinor(huge)).toThrow(RangeError);
  });
});
