/** What a label's composition may name: elements, ions and the oxides that labels count in. */
export const compositionParts = [
  'N',
  'NO3',
  'NH4',
  'P',
  'P2O5',
  'PO4',
  'K',
  'K2O',
  'Ca',
  'CaO',
  'Mg',
  'MgO',
  'S',
  'SO4',
  'Cl',
  'Na',
  'Fe',
  'Mn',
  'B',
  'Zn',
  'Cu',
  'Mo',
  'Co',
  'Ni',
  'I',
] as const;
export type CompositionPart = (typeof compositionParts)[number];

/** A label's composition in parts per million by mass: 71 000 is 7.1 %. */
export type CompositionPpm = Partial<Record<CompositionPart, number>>;

/** Ways to state the same atoms; of each group the largest counts towards the whole. */
const oneOf: readonly (readonly CompositionPart[])[] = [
  ['P', 'P2O5', 'PO4'],
  ['K', 'K2O'],
  ['Ca', 'CaO'],
  ['Mg', 'MgO'],
  ['S', 'SO4'],
];

/** The least mass that a composition speaks of, in ppm, counting atoms stated in two ways once. */
export function statedPpm(composition: CompositionPpm): number {
  const value = (part: CompositionPart) => composition[part] ?? 0;
  const nitrogen = Math.max(value('N'), value('NO3') + value('NH4'));
  const grouped = oneOf.reduce((sum, group) => sum + Math.max(...group.map(value)), nitrogen);
  const single = ['Cl', 'Na', 'Fe', 'Mn', 'B', 'Zn', 'Cu', 'Mo', 'Co', 'Ni', 'I'] as const;
  return single.reduce((sum, part) => sum + value(part), grouped);
}
