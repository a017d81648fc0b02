import { describe, expect, it } from 'vitest';
import {
  isClassified,
  isReportable,
  lineRefusal,
  statementsOf,
} from '#shared/domain/salts/care.ts';
import { cautionsFor } from '#shared/domain/salts/cautions.ts';
import { saltIndex } from '#shared/domain/salts/data/saltIndex.ts';
import { mustNotMeet } from '#shared/domain/salts/mustNotMeet.ts';
import {
  factsOfEntry,
  nitrogenFromAmmoniumNitrate,
  type SaltFacts,
} from '#shared/domain/salts/saltFacts.ts';

const shipped = (id: string): SaltFacts => {
  const entry = saltIndex.find((one) => one.id === id);
  if (!entry) throw new Error(id);
  return factsOfEntry(entry);
};
const own = (fields: Partial<SaltFacts>): SaltFacts => ({
  catalogueId: null,
  kind: 'salt',
  name: 'Own',
  formula: null,
  cas: null,
  composition: {},
  statements: [],
  list: null,
  ...fields,
});
const idsWhere = (holds: (facts: SaltFacts) => boolean) =>
  saltIndex.filter((entry) => holds(factsOfEntry(entry))).map(({ id }) => id);

describe('the shipped list', () => {
  it('has these and no others that can’t be a line', () => {
    expect(idsWhere((facts) => lineRefusal(facts) !== null)).toEqual([
      'NH4NO3',
      'H3BO3',
      'Na2B4O7.10H2O',
      'CoSO4.7H2O',
      'CoCl2.6H2O',
      'NiSO4.6H2O',
    ]);
  });

  it('has these and no others that are reportable', () => {
    expect(idsWhere(isReportable)).toEqual([
      'KNO3',
      'Mg(NO3)2.6H2O',
      'Ca(NO3)2.4H2O',
      '5Ca(NO3)2.NH4NO3.10H2O',
      'NaNO3',
    ]);
  });

  it('finds the same by formula and CAS alone as its regulatory flags say', () => {
    for (const { id, name, formula, cas } of saltIndex) {
      for (const facts of [own({ name, formula }), own({ name, cas })]) {
        expect([id, isReportable(facts)]).toEqual([id, isReportable(shipped(id))]);
        expect([id, lineRefusal(facts) === null]).toEqual([id, lineRefusal(shipped(id)) === null]);
        expect([id, statementsOf(facts)]).toEqual([id, statementsOf(shipped(id))]);
      }
    }
  });

  it('counts the double salt’s nitrogen from ammonium nitrate', () => {
    // 2 x 14.007 / 1080.623
    expect(nitrogenFromAmmoniumNitrate(shipped('5Ca(NO3)2.NH4NO3.10H2O'))).toBeCloseTo(0.025924, 6);
    expect(nitrogenFromAmmoniumNitrate(shipped('NH4NO3'))).toBeCloseTo(0.349987, 6);
  });
});

describe('a club’s own salts', () => {
  it.each<[string, Partial<SaltFacts>]>([
    ['ammonium nitrate by CAS', { cas: '6484-52-2' }],
    ['ammonium nitrate by formula', { formula: 'NH4NO3' }],
    ['the same, atoms summed up', { formula: 'H4N2O3' }],
    ['the same, bracketed', { formula: '(NH4)(NO3)' }],
    ['the same, stated as free of nitrate', { formula: 'NH4NO3', composition: { NO3: 0, NH4: 0 } }],
    ['ammonium sulfate nitrate', { formula: '2NH4NO3·(NH4)2SO4' }],
    ['a mix with 16 % N from it', { kind: 'trace_mix', composition: { NO3: 0.3542, NH4: 0.1031 } }],
    ['potassium chlorate', { formula: 'KClO3' }],
    ['sodium perchlorate by CAS', { cas: '7601-89-0' }],
    ['hexamine', { formula: '(CH2)6N4' }],
    ['boric acid by CAS', { cas: '10043-35-3' }],
    ['borax with other crystal water', { formula: 'Na2B4O7·5H2O' }],
    ['cobalt chloride, anhydrous', { formula: 'CoCl2' }],
    ['nickel chloride', { formula: 'NiCl2·6H2O' }],
    ['a “mix” that is boric acid', { kind: 'trace_mix', composition: { B: 0.175 } }],
    ['what its sheet classes H340', { formula: 'KCl', statements: ['H340'] }],
    ['what its sheet classes H350i', { formula: 'KCl', statements: ['H350i'] }],
    [
      'what its sheet classes H360Df',
      { kind: 'trace_mix', composition: { Fe: 0.1 }, statements: ['H360Df'] },
    ],
  ])('refuses %s as a line', (_what, fields) => {
    const reason = lineRefusal(own(fields));
    expect(reason).toContain('can’t be a line'.replace('’', "'"));
    expect(reason).toContain('Own');
  });

  it.each<[string, Partial<SaltFacts>]>([
    [
      'a trace mix with boron and cobalt in it',
      { kind: 'trace_mix', composition: { Fe: 0.07, B: 0.013, Co: 0.0005 } },
    ],
    [
      'a mix with 15.9 % N from ammonium nitrate',
      { kind: 'trace_mix', composition: { NO3: 0.35, NH4: 0.103 } },
    ],
    ['urea', { formula: 'CO(NH2)2' }],
    ['what is only suspected (H341, H361)', { formula: 'KCl', statements: ['H341', 'H361fd'] }],
    ['copper sulfate', { formula: 'CuSO4' }],
  ])('takes %s as a line', (_what, fields) => {
    expect(lineRefusal(own(fields))).toBeNull();
  });

  it.each<[string, Partial<SaltFacts>, boolean]>([
    ['potassium nitrate by CAS', { cas: '7757-79-1' }, true],
    ['calcium nitrate, anhydrous', { formula: 'Ca(NO3)2' }, true],
    ['another double salt', { formula: 'KNO3·Mg(NO3)2' }, true],
    ['sulfur', { formula: 'S' }, true],
    [
      'a mix with nitrate of potassium',
      { kind: 'trace_mix', composition: { NO3: 0.08, K: 0.05 } },
      true,
    ],
    [
      'a mix with a trace of it',
      { kind: 'trace_mix', composition: { NO3: 0.004, K: 0.05 } },
      false,
    ],
    ['iron nitrate', { formula: 'Fe(NO3)3·9H2O' }, false],
    ['potassium sulfate', { formula: 'K2SO4' }, false],
    ['restricted, so not merely reportable', { formula: 'NH4NO3' }, false],
  ])('%s: reportable is %#', (_what, fields, reportable) => {
    expect(isReportable(own(fields))).toBe(reportable);
  });

  it('is classified by its own statements or by those of the shipped salt that it is', () => {
    expect(isClassified(own({ formula: 'KCl' }))).toBe(false);
    expect(isClassified(own({ formula: 'KCl', statements: ['H319'] }))).toBe(true);
    expect(statementsOf(own({ formula: 'CuSO4', statements: ['H400'] }))).toEqual([
      'H302',
      'H318',
      'H400',
      'H410',
    ]);
  });
});

describe('cautions', () => {
  const codes = (facts: SaltFacts, place: 'line' | 'bench' | 'handOver' | 'label') =>
    cautionsFor(facts, place).map(({ code }) => code);

  it.each([
    ['KNO3', 'line', ['reportable', 'feeds_fire']],
    ['KNO3', 'handOver', ['reportable']],
    ['5Ca(NO3)2.NH4NO3.10H2O', 'line', ['reportable', 'double_salt', 'feeds_fire', 'ammonium']],
    ['CuSO4.5H2O', 'line', ['copper']],
    ['CuSO4.5H2O', 'label', ['copper', 'eyes', 'swallowed', 'water_life']],
    ['CaCl2', 'bench', ['eyes', 'takes_up_water']],
    ['(NH4)2SO4', 'line', ['ammonium']],
    ['K2SO4', 'line', []],
    ['K2SO4', 'label', []],
  ] as const)('of %s at the %s', (id, place, expected) => {
    expect(codes(shipped(id), place)).toEqual(expected);
  });

  it('warns of copper in a mix as well', () => {
    expect(codes(own({ kind: 'trace_mix', composition: { Cu: 0.001 } }), 'line')).toEqual([
      'copper',
    ]);
  });

  it('says in each what can happen and what to do', () => {
    for (const entry of saltIndex) {
      for (const place of ['line', 'bench', 'handOver', 'label'] as const) {
        for (const { text } of cautionsFor(factsOfEntry(entry), place)) {
          expect(text).toMatch(/^[A-Z].+[.:] ?.+\.$/);
          expect(text).not.toContain('!');
        }
      }
    }
  });
});

describe('what must not meet', () => {
  it.each([
    ['KNO3', ['paper']],
    ['CaCl2', ['sulfates', 'a little water']],
    ['NaHCO3', ['acids', 'calcium']],
    ['(NH4)2SO4', ['carbonates and other alkaline', 'calcium']],
    ['citric-acid.H2O', ['carbonates']],
    ['KCl', []],
  ])('%s', (id, starts) => {
    const all = mustNotMeet(shipped(id)).map(({ what }) => what);
    expect(all).toHaveLength(starts.length);
    starts.forEach((start, index) => expect(all[index]).toMatch(new RegExp(`^${start}`)));
  });
});
