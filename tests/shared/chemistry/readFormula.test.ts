import { describe, expect, it } from 'vitest';
import { formatFormula, formulaRuns } from '#shared/domain/chemistry/formulaRuns.ts';
import { FormulaError, massOfAtoms, readFormula } from '#shared/domain/chemistry/readFormula.ts';
import { catalogue } from '#shared/domain/salts/data/catalogue.ts';

describe('readFormula', () => {
  it.each([
    ['MgSO4·7H2O', { Mg: 1, S: 1, O: 11, H: 14 }],
    ['MgSO4.7H2O', { Mg: 1, S: 1, O: 11, H: 14 }],
    ['Ca(NO₃)₂ · 4 H₂O', { Ca: 1, N: 2, O: 10, H: 8 }],
    ['CO(NH2)2', { C: 1, O: 1, N: 2, H: 4 }],
    ['Co(NH2)2', { Co: 1, N: 2, H: 4 }],
    ['[Fe{C2(H3)2}]3', { Fe: 3, C: 6, H: 18 }],
    ['2CaSO4·H2O', { Ca: 2, S: 2, O: 9, H: 2 }],
  ])('counts %s', (formula, atoms) => {
    expect(readFormula(formula).atoms).toEqual(atoms);
  });

  it.each([
    ['5Ca(NO3)2·NH4NO3·10H2O', 11, 1],
    ['NH4NO3', 1, 1],
    ['(NH4)6Mo7O24·4H2O', 0, 6],
    ['NH4H2PO4', 0, 1],
    ['CO(NH2)2', 0, 0],
    ['KNO2', 0, 0],
  ])('sees nitrate and ammonium in %s', (formula, nitrate, ammonium) => {
    expect(readFormula(formula)).toMatchObject({ nitrate, ammonium });
  });

  it.each([
    ['', 0],
    ['MgSO4·', 6],
    ['Mg(SO4', 6],
    ['Mg(SO4]', 6],
    ['MgSO4)', 5],
    ['Xx2', 0],
    ['kno3', 0],
    ['K0', 1],
    ['CaSO4·0.5H2O', 6],
    ['epsom salt', 0],
    ['()', 1],
  ])('refuses %j and says where', (formula, at) => {
    expect(() => readFormula(formula)).toThrow(FormulaError);
    try {
      readFormula(formula);
    } catch (error) {
      expect((error as FormulaError).at).toBe(at);
    }
  });

  // Molar masses computed by two other programs from the same weights.
  it.each(catalogue.map(({ id, formula, molarMass }) => [id, formula, molarMass.value] as const))(
    'weighs %s',
    (_id, formula, mass) => {
      expect(massOfAtoms(readFormula(formula).atoms)).toBeCloseTo(mass, 2);
    },
  );
});

describe('formulas on a page', () => {
  it('sets counts low, and nothing else', () => {
    expect(formatFormula('5Ca(NO3)2.NH4NO3.10H2O')).toBe('5Ca(NO₃)₂·NH₄NO₃·10H₂O');
    expect(formulaRuns('MgSO4·7H2O')).toEqual([
      { text: 'MgSO', sub: false },
      { text: '4', sub: true },
      { text: '·7H', sub: false },
      { text: '2', sub: true },
      { text: 'O', sub: false },
    ]);
  });
});
