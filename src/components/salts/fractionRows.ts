import type { CatalogueSalt } from '#shared/domain/salts/catalogueTypes.ts';

/** One part of a salt in per cent by mass. */
export type FractionRow = { label: string; percent: number };

const labels: Record<string, string> = {
  NO3: 'nitrate, NO₃',
  NH4: 'ammonium, NH₄',
  PO4: 'phosphate, PO₄',
  SO4: 'sulfate, SO₄',
  K2O: 'as K₂O',
  MgO: 'as MgO',
  CaO: 'as CaO',
  P2O5: 'as P₂O₅',
  N_as_nitrate: 'nitrogen as nitrate',
  N_as_ammonium: 'nitrogen as ammonium',
  N_as_urea: 'nitrogen as urea',
};

/** Parts of a salt for its page: elements, then ions and what labels count in; oxygen and hydrogen are left out. */
export function fractionRows(salt: CatalogueSalt): FractionRow[] {
  const elements = Object.entries(salt.elements.values)
    .filter(([part]) => part !== 'O' && part !== 'H')
    .sort(([, a], [, b]) => b - a)
    .map(([part, value]) => ({ label: part, percent: value * 100 }));
  const equivalents = Object.entries(salt.equivalents.values).flatMap(([part, value]) => {
    const label = labels[part];
    return label ? [{ label, percent: value * 100 }] : [];
  });
  const water = salt.crystalWater.value;
  const crystal = water > 0 ? [{ label: 'crystal water', percent: water * 100 }] : [];
  return [...elements, ...equivalents, ...crystal];
}
