import { bareCode, hazardText } from './hazards.ts';
import {
  fractionOf,
  nitrogenFromAmmoniumNitrate,
  countFormula,
  type SaltFacts,
} from './saltFacts.ts';
import { findPrecursor, findTwin } from './sameSubstance.ts';

/** Nitrogen from ammonium nitrate at which EU and GB restrict a substance or mixture. */
export const restrictedNitrogen = 0.16;

/** Least nitrate, by mass, at which a mix counts as holding a reportable nitrate (own assumption, on the safe side). */
const reportableNitrate = 0.01;

/** Share of B, Co or Ni from which a "mix" is taken for the plain salt (own assumption; borax has 0.113 B). */
const plainSaltShare = 0.1;

const refusedClasses = new Set(['H340', 'H350', 'H360']);
const refusedElements = { B: 'Boron salts', Co: 'Cobalt salts', Ni: 'Nickel salts' } as const;

/** Hazard statements that count: those stated, and those of the shipped salt that a club's own really is. */
export function statementsOf(facts: SaltFacts): string[] {
  const twin = findTwin(facts);
  return [...new Set([...facts.statements, ...(twin?.statements ?? [])])].sort();
}

/** Whether a salt is classified as hazardous: pledging it asks for a confirmation, and its label says so. */
export function isClassified(facts: SaltFacts): boolean {
  return statementsOf(facts).length > 0;
}

/** Whether it is, or as a mix holds, a reportable explosives precursor (EU 2019/1148 Annex II, GB Poisons Act 1972). */
export function isReportable(facts: SaltFacts): boolean {
  if (facts.catalogueId !== null) return facts.list === 'reportable';
  if (isRestricted(facts)) return false;
  if (findTwin(facts)?.list === 'reportable' || findPrecursor(facts)?.list === 'reportable') {
    return true;
  }
  const metals = ['K', 'Na', 'Ca', 'Mg'].some((metal) => fractionOf(facts, metal) > 0);
  return metals && fractionOf(facts, 'NO3') >= reportableNitrate;
}

function isRestricted(facts: SaltFacts): boolean {
  return (
    facts.list === 'restricted' ||
    nitrogenFromAmmoniumNitrate(facts) >= restrictedNitrogen ||
    findPrecursor(facts)?.list === 'restricted'
  );
}

function refusedElement(facts: SaltFacts): string | null {
  for (const [element, word] of Object.entries(refusedElements)) {
    const named = (countFormula(facts.formula)?.atoms[element] ?? 0) > 0;
    if (named || fractionOf(facts, element) >= plainSaltShare) return word;
  }
  return null;
}

/**
 * Why a salt can't be a line, in plain words; null when it can.
 * Refused are ammonium nitrate (16 % nitrogen or more from it) and other restricted precursors, and what is classed
 * H340, H350 or H360 with any suffix, boron, cobalt and nickel salts among them.
 */
export function lineRefusal(facts: SaltFacts): string | null {
  const nitrogen = nitrogenFromAmmoniumNitrate(facts);
  if (nitrogen >= restrictedNitrogen) {
    const percent = (nitrogen * 100).toFixed(1);
    return `${facts.name} holds ${percent} % nitrogen from ammonium nitrate. From 16 % on it may not be supplied to the general public, so it can't be a line.`;
  }
  if (isRestricted(facts)) {
    return `${facts.name} is a restricted explosives precursor. It may not be supplied to the general public, so it can't be a line.`;
  }
  const refused = statementsOf(facts).find((code) => refusedClasses.has(bareCode(code)));
  if (refused !== undefined) {
    const words = hazardText(refused)
      .replace(/\.$/, '')
      .replace(/\. (\w)/g, (_, letter: string) => `, ${letter.toLowerCase()}`);
    return `${facts.name} is classed ${refused} (${words}), so it can't be a line. Buy it inside a ready trace mix.`;
  }
  const element = refusedElement(facts);
  if (element !== null) {
    return `${element} are commonly classed H350 or H360, so ${facts.name} can't be a line. Buy it inside a ready trace mix.`;
  }
  return null;
}
