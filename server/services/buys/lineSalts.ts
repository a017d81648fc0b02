import type { LineSalt } from '#shared/domain/buys/sheetTerms.ts';
import { findCatalogueSalt } from '#shared/domain/salts/findCatalogueSalt.ts';
import { hazardText, pictogramsOf, signalWordOf } from '#shared/domain/salts/hazards.ts';

/** A salt of the club's own, as its row says. */
export interface OwnSaltRow {
  readonly name: string;
  readonly formula: string | null;
  readonly hazard_statements: string[];
  readonly signal_word: 'Danger' | 'Warning' | null;
  readonly storage: string;
  readonly note: string;
}

function described(
  facts: Pick<LineSalt, 'name' | 'formula' | 'storage' | 'note' | 'reportable'>,
  statements: readonly string[],
  word: 'Danger' | 'Warning' | null,
): LineSalt {
  return {
    ...facts,
    classified: statements.length > 0,
    signalWord: signalWordOf(statements, word),
    hazards: statements.map(hazardText),
    pictograms: pictogramsOf(statements),
  };
}

/** What a line shows of its salt: from the shipped list, else from the club's own. */
export function describeLineSalt(saltId: string, own: OwnSaltRow | null): LineSalt {
  const listed = findCatalogueSalt(saltId);
  if (listed) {
    return described(
      {
        name: listed.name,
        formula: listed.formula,
        storage: listed.storage.value,
        note: listed.notes[0]?.value ?? '',
        reportable: listed.regulatoryFlags.some(({ list }) => list === 'reportable'),
      },
      listed.ghs.statements,
      listed.ghs.signalWord,
    );
  }
  return described(
    {
      name: own?.name ?? saltId,
      formula: own?.formula ?? null,
      storage: own?.storage ?? '',
      note: own?.note ?? '',
      reportable: false,
    },
    own?.hazard_statements ?? [],
    own?.signal_word ?? null,
  );
}
