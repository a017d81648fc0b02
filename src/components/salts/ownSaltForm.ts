import { isReportable, lineRefusal } from '#shared/domain/salts/care.ts';
import { checkOwnSalt } from '#shared/domain/salts/checkOwnSalt.ts';
import { factsOfSalt } from '#shared/domain/salts/factsOfSalt.ts';
import { signalWordOf } from '#shared/domain/salts/hazards.ts';
import { findTwin } from '#shared/domain/salts/sameSubstance.ts';
import type { ClubSalt, OwnSaltBody } from '#shared/schemas/salts.ts';

/** A form for a club's own salt, empty or filled in from one. */
export function makeOwnSaltForm(salt: ClubSalt | null, kind: OwnSaltBody['kind']): OwnSaltBody {
  if (!salt) {
    return {
      kind,
      name: '',
      formula: '',
      cas: '',
      compositionPpm: {},
      statements: [],
      signalWord: null,
      storage: '',
      note: '',
    };
  }
  const { name, formula, cas, compositionPpm, statements, signalWord, storage, note } = salt;
  return {
    kind: salt.kind,
    name,
    formula: formula ?? '',
    cas: cas ?? '',
    compositionPpm: { ...compositionPpm },
    statements: [...statements],
    signalWord,
    storage,
    note,
  };
}

const filled = (text: string | null) => (text?.trim() ? text.trim() : null);

/** The form as it is sent: empty texts are absent, the signal word follows from the statements where it can. */
export function bodyOfForm(form: OwnSaltBody): OwnSaltBody {
  return {
    ...form,
    name: form.name.trim(),
    formula: filled(form.formula),
    cas: filled(form.cas),
    signalWord: signalWordOf(form.statements, form.signalWord),
  };
}

/** What is wrong so far, by field, as the server will see it. */
export function errorsOfForm(form: OwnSaltBody): Record<string, string> {
  const body = bodyOfForm(form);
  return checkOwnSalt({ ...body, signalWord: form.signalWord });
}

/** What the rules of care say of the salt as it is filled in. */
export function verdictOfForm(form: OwnSaltBody) {
  const body = bodyOfForm(form);
  const facts = factsOfSalt({ ...body, id: '', source: 'club', name: body.name || 'This' });
  return { refusal: lineRefusal(facts), reportable: isReportable(facts), twin: findTwin(facts) };
}
