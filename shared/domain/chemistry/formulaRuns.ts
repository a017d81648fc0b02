/** A piece of a formula as it is written, low or on the line. */
export type FormulaRun = { text: string; sub: boolean };

/**
 * A formula in pieces for setting: counts low, leading numbers on the line, a middle dot before crystal water.
 *
 * @example formulaRuns('MgSO4.7H2O') // MgSO, low 4, ·7H, low 2, O
 */
export function formulaRuns(formula: string): FormulaRun[] {
  const runs: FormulaRun[] = [];
  let afterAtom = false;
  for (const piece of formula.replace(/[•∙⋅*.]/g, '·').match(/\d+|[^\d]/g) ?? []) {
    const sub = /^\d/.test(piece) && afterAtom;
    const last = runs[runs.length - 1];
    if (last && last.sub === sub) last.text += piece;
    else runs.push({ text: piece, sub });
    afterAtom = /^[A-Za-z)\]}]/.test(piece);
  }
  return runs;
}

/**
 * A formula as text with Unicode subscripts, for places that can't set digits low.
 *
 * @example formatFormula('Ca(NO3)2.4H2O') // 'Ca(NO₃)₂·4H₂O'
 */
export function formatFormula(formula: string): string {
  return formulaRuns(formula)
    .map(({ text, sub }) =>
      sub ? text.replace(/\d/g, (digit) => '₀₁₂₃₄₅₆₇₈₉'.charAt(Number(digit))) : text,
    )
    .join('');
}
