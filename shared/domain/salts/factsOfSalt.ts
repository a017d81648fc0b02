import { saltIndex } from './data/saltIndex.ts';
import { factsOfEntry, type SaltFacts } from './saltFacts.ts';

/** A salt as it comes over the wire, as far as the rules of care need it. */
export type SaltOnTheWire = {
  id: string;
  source: 'catalogue' | 'club';
  kind: 'salt' | 'trace_mix';
  name: string;
  formula: string | null;
  cas: string | null;
  compositionPpm: Readonly<Partial<Record<string, number>>>;
  statements: readonly string[];
};

/** Facts for the rules of care from a salt that the server sent. */
export function factsOfSalt(salt: SaltOnTheWire): SaltFacts {
  const entry =
    salt.source === 'catalogue' ? saltIndex.find(({ id }) => id === salt.id) : undefined;
  if (entry) return factsOfEntry(entry);
  return {
    catalogueId: null,
    kind: salt.kind,
    name: salt.name,
    formula: salt.formula,
    cas: salt.cas,
    composition: Object.fromEntries(
      Object.entries(salt.compositionPpm).map(([part, ppm]) => [part, (ppm ?? 0) / 1_000_000]),
    ),
    statements: salt.statements,
    list: null,
  };
}
