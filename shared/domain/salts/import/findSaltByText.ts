/** A salt as far as a table can name it. */
export type NamedSalt = {
  id: string;
  name: string;
  otherNames: readonly string[];
  formula: string | null;
  cas: string | null;
};

/** Spelling without case, spaces, subscripts and the kind of dot. */
function plain(text: string): string {
  return text
    .normalize('NFKC')
    .replace(/[•∙⋅·*]/g, '.')
    .replace(/[\s_-]+/g, '')
    .toLowerCase();
}

/** Case decides in formulas: Co is cobalt, CO carbon and oxygen. */
function plainFormula(text: string): string {
  return text
    .normalize('NFKC')
    .replace(/[•∙⋅·*]/g, '.')
    .replace(/\s+/g, '');
}

/**
 * The salts that a cell may mean: by CAS number or formula anywhere in it, by its whole text as a name, or else by the
 * longest name of which all words stand in it. More than one: the cell doesn't decide.
 */
export function findSaltsByText<T extends NamedSalt>(text: string, salts: readonly T[]): T[] {
  const cas = /\b[1-9]\d{1,6}-\d{2}-\d\b/.exec(text)?.[0];
  if (cas !== undefined) return salts.filter((salt) => salt.cas === cas);
  const whole = plain(text);
  if (whole === '') return [];
  const formula = plainFormula(text);
  const named = salts.filter(
    (salt) =>
      plainFormula(salt.id) === formula ||
      [salt.name, ...salt.otherNames].some((name) => plain(name) === whole),
  );
  if (named.length > 0) return named;
  const pieces = [formula, ...text.split(/[\s,;/]+/).map(plainFormula)];
  const byFormula = salts.filter(
    (salt) => salt.formula !== null && pieces.includes(plainFormula(salt.formula)),
  );
  if (byFormula.length > 0) return byFormula;
  return longestNamed(text, salts);
}

function longestNamed<T extends NamedSalt>(text: string, salts: readonly T[]): T[] {
  const inCell = new Set(text.toLowerCase().split(/[^\p{L}\p{N}]+/u));
  let most = 1;
  let found: T[] = [];
  for (const salt of salts) {
    for (const name of [salt.name, ...salt.otherNames]) {
      const words = name
        .toLowerCase()
        .split(/[^\p{L}\p{N}]+/u)
        .filter(Boolean);
      // One word alone, like "potash", is too little to go by inside a longer text.
      if (words.length < 2 || words.length < most || !words.every((word) => inCell.has(word)))
        continue;
      if (words.length > most) found = [];
      most = words.length;
      if (!found.includes(salt)) found.push(salt);
    }
  }
  return found;
}
