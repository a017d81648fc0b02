import { massOfAtoms, readFormula, type FormulaCount } from '../chemistry/readFormula.ts';
import { atomicWeights } from '../chemistry/atomicWeights.ts';
import type { PrecursorList, SaltIndexEntry } from './catalogueTypes.ts';

/** What the rules of care look at, for a salt of the shipped list and for a club's own alike. */
export type SaltFacts = {
  /** Of the shipped list, or null for a club's own. */
  catalogueId: string | null;
  kind: 'salt' | 'trace_mix';
  name: string;
  formula: string | null;
  cas: string | null;
  /** Mass fractions 0..1 by element or ion, as a label states them; empty where the formula tells. */
  composition: Readonly<Record<string, number>>;
  statements: readonly string[];
  /** The precursor list that the shipped list's regulatory flags name; null for a club's own, which is checked. */
  list: PrecursorList | null;
};

/** Facts of a salt of the shipped list. */
export function factsOfEntry(entry: SaltIndexEntry): SaltFacts {
  const { id, name, formula, cas, statements, list } = entry;
  return {
    catalogueId: id,
    kind: 'salt',
    name,
    formula,
    cas,
    composition: {},
    statements,
    list,
  };
}

/** Counts of a formula, or null where there is none or it can't be read. */
export function countFormula(formula: string | null): FormulaCount | null {
  if (formula === null) return null;
  try {
    return readFormula(formula);
  } catch {
    return null;
  }
}

const weight = (symbol: string) => atomicWeights[symbol] ?? 0;
const nitrateMass = weight('N') + 3 * weight('O');
const ammoniumMass = weight('N') + 4 * weight('H');

function fractionByFormula(formula: string | null, part: string): number {
  const count = countFormula(formula);
  if (!count) return 0;
  const mass = massOfAtoms(count.atoms);
  if (part === 'NO3') return (count.nitrate * nitrateMass) / mass;
  if (part === 'NH4') return (count.ammonium * ammoniumMass) / mass;
  return ((count.atoms[part] ?? 0) * weight(part)) / mass;
}

/** Mass fraction 0..1 of an element or of NO3 or NH4: the larger of what the label states and what the formula says. */
export function fractionOf(facts: SaltFacts, part: string): number {
  return Math.max(facts.composition[part] ?? 0, fractionByFormula(facts.formula, part));
}

/**
 * Nitrogen from ammonium nitrate as a mass fraction: two nitrogens for each pair of one ammonium and one nitrate,
 * whichever salts they came in with.
 *
 * @example nitrogenFromAmmoniumNitrate of 5Ca(NO3)2·NH4NO3·10H2O // 0.0259
 */
export function nitrogenFromAmmoniumNitrate(facts: SaltFacts): number {
  const pairs = Math.min(
    fractionOf(facts, 'NO3') / nitrateMass,
    fractionOf(facts, 'NH4') / ammoniumMass,
  );
  return 2 * weight('N') * pairs;
}
