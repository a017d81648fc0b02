import { atomicWeights } from './atomicWeights.ts';

/** Atoms by element, and the nitrate and ammonium groups that the spelling shows. */
export type FormulaCount = { atoms: Record<string, number>; nitrate: number; ammonium: number };

/** A formula that can't be read; `at` is the place in the text, from 0. */
export class FormulaError extends Error {
  constructor(
    message: string,
    readonly at: number,
  ) {
    super(message);
  }
}

const closing: Record<string, string> = { '(': ')', '[': ']', '{': '}' };
const dots = '·•∙⋅*.';
const subscripts = '₀₁₂₃₄₅₆₇₈₉';

type Token = { symbol: string; count: number };

class Reader {
  at = 0;
  constructor(readonly text: string) {}

  get next(): string {
    return this.text[this.at] ?? '';
  }

  fail(message: string): never {
    throw new FormulaError(message, this.at);
  }

  integer(): number | null {
    const digits = /^\d+/.exec(this.text.slice(this.at))?.[0];
    if (digits === undefined) return null;
    const value = Number(digits);
    if (value === 0 || digits.startsWith('0')) this.fail(`A count can't be ${digits}.`);
    if (value > 10_000) this.fail(`A count of ${digits} is too large.`);
    this.at += digits.length;
    return value;
  }
}

function add(into: FormulaCount, from: FormulaCount, times: number): void {
  for (const [element, count] of Object.entries(from.atoms)) {
    into.atoms[element] = (into.atoms[element] ?? 0) + count * times;
  }
  into.nitrate += from.nitrate * times;
  into.ammonium += from.ammonium * times;
}

/** N followed by O3 is a nitrate, N followed by H4 an ammonium. */
function countGroups(tokens: readonly Token[], into: FormulaCount): void {
  tokens.forEach(({ symbol, count }, index) => {
    const after = tokens[index + 1];
    if (symbol !== 'N' || count !== 1) return;
    if (after?.symbol === 'O' && after.count === 3) into.nitrate += 1;
    if (after?.symbol === 'H' && after.count === 4) into.ammonium += 1;
  });
}

function readGroups(reader: Reader, end: string): FormulaCount {
  const total: FormulaCount = { atoms: {}, nitrate: 0, ammonium: 0 };
  let run: Token[] = [];
  const start = reader.at;
  while (reader.next !== '' && reader.next !== end && !dots.includes(reader.next)) {
    const close = closing[reader.next];
    if (close !== undefined) {
      countGroups(run, total);
      run = [];
      reader.at += 1;
      const inner = readGroups(reader, close);
      if (reader.next !== close) reader.fail(`A bracket is not closed: "${close}" is missing.`);
      reader.at += 1;
      add(total, inner, reader.integer() ?? 1);
      continue;
    }
    const symbol = /^[A-Z][a-z]?/.exec(reader.text.slice(reader.at))?.[0];
    if (symbol === undefined) reader.fail(`"${reader.next}" can't stand here.`);
    if (!(symbol in atomicWeights)) reader.fail(`"${symbol}" is not an element known here.`);
    reader.at += symbol.length;
    const count = reader.integer() ?? 1;
    total.atoms[symbol] = (total.atoms[symbol] ?? 0) + count;
    run.push({ symbol, count });
  }
  if (reader.at === start) reader.fail('Something is missing here.');
  countGroups(run, total);
  return total;
}

/**
 * Counts the atoms of a formula: brackets, counts, and parts joined by a dot (any of · • ∙ ⋅ * .), which always means
 * "plus" and never a decimal. Unicode subscripts count as digits; spaces are ignored.
 *
 * @example readFormula('5Ca(NO3)2·NH4NO3·10H2O').nitrate // 11
 * @throws FormulaError saying what is wrong and where
 */
export function readFormula(formula: string): FormulaCount {
  const plain = formula
    .replace(/[₀-₉]/g, (digit) => String(subscripts.indexOf(digit)))
    .replace(/\s+/g, '');
  const reader = new Reader(plain);
  const total: FormulaCount = { atoms: {}, nitrate: 0, ammonium: 0 };
  for (;;) {
    const times = reader.integer() ?? 1;
    add(total, readGroups(reader, ''), times);
    if (reader.next === '') return total;
    reader.at += 1;
  }
}

/** g/mol of counted atoms. */
export function massOfAtoms(atoms: Readonly<Record<string, number>>): number {
  return Object.entries(atoms).reduce(
    (sum, [element, count]) => sum + (atomicWeights[element] ?? 0) * count,
    0,
  );
}
