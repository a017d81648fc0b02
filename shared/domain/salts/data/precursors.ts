import type { PrecursorList } from '../catalogueTypes.ts';

/** A substance on a list of explosives precursors; `formula` as far as it identifies it. */
export type Precursor = {
  name: string;
  cas: readonly string[];
  formula: string | null;
  list: PrecursorList;
};

/**
 * Explosives precursors by Regulation (EU) 2019/1148, Annexes I and II, and the GB Poisons Act 1972, Schedule 1A as
 * amended from 1 October 2023. Substances of both lists that a club might come across as a dry or dissolved chemical;
 * the official lists are the law. CAS numbers from memory, check digits tested.
 */
export const precursors: readonly Precursor[] = [
  { name: 'ammonium nitrate', cas: ['6484-52-2'], formula: 'NH4NO3', list: 'restricted' },
  { name: 'nitric acid', cas: ['7697-37-2'], formula: 'HNO3', list: 'restricted' },
  { name: 'sulfuric acid', cas: ['7664-93-9'], formula: 'H2SO4', list: 'restricted' },
  { name: 'hydrogen peroxide', cas: ['7722-84-1'], formula: 'H2O2', list: 'restricted' },
  { name: 'nitromethane', cas: ['75-52-5'], formula: 'CH3NO2', list: 'restricted' },
  { name: 'potassium chlorate', cas: ['3811-04-9'], formula: 'KClO3', list: 'restricted' },
  { name: 'potassium perchlorate', cas: ['7778-74-7'], formula: 'KClO4', list: 'restricted' },
  { name: 'sodium chlorate', cas: ['7775-09-9'], formula: 'NaClO3', list: 'restricted' },
  { name: 'sodium perchlorate', cas: ['7601-89-0'], formula: 'NaClO4', list: 'restricted' },
  { name: 'hexamine', cas: ['100-97-0'], formula: 'C6H12N4', list: 'restricted' },
  { name: 'phosphoric acid', cas: ['7664-38-2'], formula: 'H3PO4', list: 'restricted' },
  { name: 'hydrochloric acid', cas: ['7647-01-0'], formula: 'HCl', list: 'restricted' },
  { name: 'potassium nitrate', cas: ['7757-79-1'], formula: 'KNO3', list: 'reportable' },
  { name: 'sodium nitrate', cas: ['7631-99-4'], formula: 'NaNO3', list: 'reportable' },
  {
    name: 'calcium nitrate',
    cas: ['10124-37-5', '13477-34-4'],
    formula: 'Ca(NO3)2',
    list: 'reportable',
  },
  {
    name: 'calcium ammonium nitrate',
    cas: ['15245-12-2'],
    formula: '5Ca(NO3)2·NH4NO3',
    list: 'reportable',
  },
  {
    name: 'magnesium nitrate',
    cas: ['10377-60-3', '13446-18-9'],
    formula: 'Mg(NO3)2',
    list: 'reportable',
  },
  { name: 'acetone', cas: ['67-64-1'], formula: 'C3H6O', list: 'reportable' },
  { name: 'sulfur', cas: ['7704-34-9'], formula: 'S', list: 'reportable' },
  { name: 'aluminium powder', cas: ['7429-90-5'], formula: 'Al', list: 'reportable' },
  { name: 'magnesium powder', cas: ['7439-95-4'], formula: 'Mg', list: 'reportable' },
];
