import { FormulaError, readFormula } from '../chemistry/readFormula.ts';
import { atomicWeights } from '../chemistry/atomicWeights.ts';
import { casProblem } from './cas.ts';
import type { SignalWord } from './catalogueTypes.ts';
import { statedPpm, type CompositionPpm } from './compositionParts.ts';
import { isHazardCode, leavesWordOpen } from './hazards.ts';

/** A club's own salt or mix as somebody fills it in. */
export type OwnSaltFields = {
  kind: 'salt' | 'trace_mix';
  formula: string | null;
  cas: string | null;
  compositionPpm: CompositionPpm;
  statements: readonly string[];
  signalWord: SignalWord | null;
};

const whole = 1_000_000;
/** Labels round to a tenth of a per cent. */
const labelRounding = 1_000;

const nitrogenIn = {
  NO3: (atomicWeights.N ?? 0) / ((atomicWeights.N ?? 0) + 3 * (atomicWeights.O ?? 0)),
  NH4: (atomicWeights.N ?? 0) / ((atomicWeights.N ?? 0) + 4 * (atomicWeights.H ?? 0)),
};

function formulaError(formula: string): string | null {
  try {
    readFormula(formula);
    return null;
  } catch (error) {
    if (error instanceof FormulaError) return `${error.message} (at character ${error.at + 1})`;
    throw error;
  }
}

function compositionErrors(composition: CompositionPpm): Record<string, string> {
  const errors: Record<string, string> = {};
  for (const [part, ppm] of Object.entries(composition)) {
    if (ppm > whole) errors[`compositionPpm.${part}`] = 'At most 100 %.';
  }
  if (Object.keys(errors).length === 0 && statedPpm(composition) > whole) {
    errors.compositionPpm = 'Together this is more than 100 %.';
  }
  const { N = 0, NO3, NH4 } = composition;
  const forms = (NO3 ?? 0) * nitrogenIn.NO3 + (NH4 ?? 0) * nitrogenIn.NH4;
  if (N >= whole / 100 && (NO3 === undefined || NH4 === undefined)) {
    const missing = NO3 === undefined ? 'NO3' : 'NH4';
    errors[`compositionPpm.${missing}`] =
      'Say how much of the nitrogen comes as nitrate (NO3) and as ammonium (NH4); 0 if none.';
  } else if (composition.N !== undefined && forms > N + labelRounding) {
    errors['compositionPpm.N'] = 'The nitrate and ammonium hold more nitrogen than this.';
  }
  return errors;
}

/**
 * What is wrong with a club's own salt, by field; empty when all is well. A salt needs a formula or a CAS number, a
 * trace mix a composition: the rules of care can't look at a name alone.
 */
export function checkOwnSalt(salt: OwnSaltFields): Record<string, string> {
  const errors = compositionErrors(salt.compositionPpm);
  if (salt.formula !== null) {
    const problem = formulaError(salt.formula);
    if (problem) errors.formula = problem;
  }
  const cas = salt.cas === null ? null : casProblem(salt.cas);
  if (cas === 'shape') errors.cas = 'A CAS number looks like 7757-79-1.';
  if (cas === 'check_digit')
    errors.cas = 'The last digit doesn’t fit the others: check for a slip.';
  if (salt.kind === 'salt' && salt.formula === null && salt.cas === null) {
    errors.formula = 'Give the formula or the CAS number.';
  }
  if (salt.kind === 'trace_mix' && statedPpm(salt.compositionPpm) === 0) {
    errors.compositionPpm = 'Give at least one element, as the label states it.';
  }
  const unknown = salt.statements.filter((code) => !isHazardCode(code));
  if (unknown.length > 0) errors.statements = `Not a hazard statement: ${unknown.join(', ')}.`;
  else if (leavesWordOpen(salt.statements) && salt.signalWord === null) {
    errors.signalWord = 'Choose the signal word on the supplier’s sheet.';
  }
  return errors;
}
