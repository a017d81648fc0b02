import {
  isClassified,
  isReportable,
  lineRefusal,
  statementsOf,
} from '#shared/domain/salts/care.ts';
import type { CatalogueSalt, SignalWord } from '#shared/domain/salts/catalogueTypes.ts';
import type { CompositionPpm } from '#shared/domain/salts/compositionParts.ts';
import { saltIndex } from '#shared/domain/salts/data/saltIndex.ts';
import { pictogramsOf, signalWordOf } from '#shared/domain/salts/hazards.ts';
import { factsOfEntry, type SaltFacts } from '#shared/domain/salts/saltFacts.ts';
import { findTwin } from '#shared/domain/salts/sameSubstance.ts';
import type { ClubSalt } from '#shared/schemas/salts.ts';

/** A row of the club's own salts, as models hold it. */
export interface OwnSaltRow {
  id: string;
  kind: 'salt' | 'trace_mix';
  name: string;
  formula: string | null;
  cas: string | null;
  composition: CompositionPpm;
  hazardStatements: string[];
  signalWord: SignalWord | null;
  storage: string;
  note: string;
  archivedAt: Date | null;
  version: number;
}

const entries = new Map(saltIndex.map((entry) => [entry.id, entry]));

/** A club's own salt as the rules of care look at it. */
export function factsOfOwn(row: OwnSaltRow): SaltFacts {
  return {
    catalogueId: null,
    kind: row.kind,
    name: row.name,
    formula: row.formula,
    cas: row.cas,
    composition: Object.fromEntries(
      Object.entries(row.composition).map(([part, ppm]) => [part, ppm / 1_000_000]),
    ),
    statements: row.hazardStatements,
    list: null,
  };
}

/** A salt of the shipped list for the wire. */
export function presentCatalogueSalt(salt: CatalogueSalt, hidden: boolean): ClubSalt {
  const entry = entries.get(salt.id);
  if (!entry) throw new Error(`salt ${salt.id} is not in the index`);
  const facts = factsOfEntry(entry);
  return {
    id: salt.id,
    source: 'catalogue',
    kind: 'salt',
    name: salt.name,
    otherNames: salt.commonNames.filter((name) => name.toLowerCase() !== salt.name.toLowerCase()),
    formula: salt.formula,
    cas: salt.cas.value,
    compositionPpm: {},
    statements: [...salt.ghs.statements],
    signalWord: salt.ghs.signalWord,
    pictograms: pictogramsOf(salt.ghs.statements),
    checkSheet: salt.ghs.source.includes('memory'),
    classified: isClassified(facts),
    reportable: isReportable(facts),
    lineRefusal: lineRefusal(facts),
    twinId: null,
    hidden,
    storage: salt.storage.value,
    note: '',
    archivedAt: null,
    version: 0,
  };
}

/** One of the club's own salts for the wire. */
export function presentOwnSalt(row: OwnSaltRow, hidden: boolean): ClubSalt {
  const facts = factsOfOwn(row);
  const twin = findTwin(facts);
  const statements = statementsOf(facts);
  return {
    id: row.id,
    source: 'club',
    kind: row.kind,
    name: row.name,
    otherNames: [],
    formula: row.formula,
    cas: row.cas,
    compositionPpm: row.composition,
    statements,
    signalWord: signalWordOf(statements, row.signalWord ?? twin?.signalWord ?? null),
    pictograms: pictogramsOf(statements),
    checkSheet: true,
    classified: isClassified(facts),
    reportable: isReportable(facts),
    lineRefusal: lineRefusal(facts),
    twinId: twin?.id ?? null,
    hidden,
    storage: row.storage,
    note: row.note,
    archivedAt: row.archivedAt?.toISOString() ?? null,
    version: row.version,
  };
}
