import type { LineSalt } from '#shared/domain/buys/sheetTerms.ts';
import { cautionsFor } from '#shared/domain/salts/cautions.ts';
import { factsOfSalt } from '#shared/domain/salts/factsOfSalt.ts';
import { findCatalogueSalt } from '#shared/domain/salts/findCatalogueSalt.ts';
import { hazardText } from '#shared/domain/salts/hazards.ts';
import type { ClubSalt } from '#shared/schemas/salts.ts';
import { presentCatalogueSalt, presentOwnSalt, type OwnSaltRow } from '../../presenters/salts.ts';

function asLineSalt(salt: ClubSalt): LineSalt {
  return {
    name: salt.name,
    formula: salt.formula,
    classified: salt.classified,
    reportable: salt.reportable,
    signalWord: salt.signalWord,
    hazards: salt.statements.map(hazardText),
    pictograms: salt.pictograms,
    cautions: cautionsFor(factsOfSalt(salt), 'line'),
    storage: salt.storage,
    note: salt.note,
  };
}

const unknown = (name: string): LineSalt => ({
  name,
  formula: null,
  classified: false,
  reportable: false,
  signalWord: null,
  hazards: [],
  pictograms: [],
  cautions: [],
  storage: '',
  note: '',
});

// The shipped list doesn't change while the process runs.
const shipped = new Map<string, LineSalt>();

/** What a line shows of its salt: from the shipped list, else from the club's own row. */
export function describeLineSalt(saltId: string, own: OwnSaltRow | null): LineSalt {
  const known = shipped.get(saltId);
  if (known) return known;
  const listed = findCatalogueSalt(saltId);
  if (listed) {
    const salt = asLineSalt(presentCatalogueSalt(listed, false));
    shipped.set(saltId, salt);
    return salt;
  }
  return own ? asLineSalt(presentOwnSalt(own, false)) : unknown(saltId);
}
