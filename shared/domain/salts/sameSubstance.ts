import { readFormula } from '../chemistry/readFormula.ts';
import { precursors, type Precursor } from './data/precursors.ts';
import { saltIndex } from './data/saltIndex.ts';
import type { SaltIndexEntry } from './catalogueTypes.ts';
import type { SaltFacts } from './saltFacts.ts';

function commonDivisor(a: number, b: number): number {
  return b === 0 ? a : commonDivisor(b, a % b);
}

/** A formula's atoms without crystal water, in lowest terms: the same text for every spelling of one substance. */
function fingerprint(formula: string): string | null {
  const parts = formula
    .replace(/[₀-₉]/g, (digit) => String(digit.charCodeAt(0) - 0x2080))
    .split(/[·•∙⋅*.]/)
    .map((part) => part.replace(/\s/g, ''))
    .filter((part) => !/^\d*\(?H2O\)?$/.test(part))
    .map((part) => part.replace(/\(H2O\)\d*$/, ''));
  if (parts.length === 0) return null;
  try {
    const { atoms } = readFormula(parts.join('·'));
    const divisor = Object.values(atoms).reduce(commonDivisor, 0);
    return Object.keys(atoms)
      .sort()
      .map((element) => `${element}${(atoms[element] ?? 0) / divisor}`)
      .join(' ');
  } catch {
    return null;
  }
}

function same(facts: SaltFacts, cas: readonly string[], formula: string | null): boolean {
  if (facts.cas !== null && cas.includes(facts.cas)) return true;
  if (facts.formula === null || formula === null) return false;
  const print = fingerprint(facts.formula);
  return print !== null && print === fingerprint(formula);
}

/** The listed precursor that a salt is, by CAS number or by formula whatever its crystal water; or null. */
export function findPrecursor(facts: SaltFacts): Precursor | null {
  return precursors.find(({ cas, formula }) => same(facts, cas, formula)) ?? null;
}

/** The salt of the shipped list that a club's own really is, by CAS number or by formula; or null. */
export function findTwin(facts: SaltFacts): SaltIndexEntry | null {
  if (facts.catalogueId !== null) return null;
  const byCas = saltIndex.find(({ cas }) => cas === facts.cas);
  return byCas ?? saltIndex.find(({ formula }) => same(facts, [], formula)) ?? null;
}
