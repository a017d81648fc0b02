import { describe, expect, it } from 'vitest';
import { OwnSaltBody, type ClubSalt } from '#shared/schemas/salts.ts';
import { catalogue } from '#shared/domain/salts/data/catalogue.ts';
import { fractionRows } from 'src/components/salts/fractionRows.ts';
import {
  bodyOfForm,
  errorsOfForm,
  makeOwnSaltForm,
  verdictOfForm,
} from 'src/components/salts/ownSaltForm.ts';
import { filterSalts, toSaltRow } from 'src/components/salts/saltRows.ts';

const salt: ClubSalt = {
  id: 'KNO3',
  source: 'catalogue',
  kind: 'salt',
  name: 'Potassium nitrate',
  otherNames: ['saltpetre'],
  formula: 'MgSO4·7H2O',
  cas: '7757-79-1',
  compositionPpm: {},
  statements: ['H272'],
  signalWord: 'Warning',
  pictograms: ['GHS03'],
  checkSheet: false,
  classified: true,
  reportable: true,
  lineRefusal: null,
  twinId: null,
  hidden: false,
  storage: '',
  note: '',
  archivedAt: null,
  version: 0,
};

describe('the form of an own salt', () => {
  it('says what is missing as the server would, and sends empty texts as absent', () => {
    const form = makeOwnSaltForm(null, 'salt');
    expect(Object.keys(errorsOfForm(form))).toEqual(['formula']);
    Object.assign(form, { name: ' Own ', formula: ' KCl ', cas: '' });
    expect(errorsOfForm(form)).toEqual({});
    expect(OwnSaltBody.parse(bodyOfForm(form))).toMatchObject({
      name: 'Own',
      formula: 'KCl',
      cas: null,
      signalWord: null,
    });
  });

  it('asks for the signal word only where the statements leave it open', () => {
    const form = makeOwnSaltForm(null, 'salt');
    Object.assign(form, { formula: 'KNO3', statements: ['H272'] });
    expect(Object.keys(errorsOfForm(form))).toEqual(['signalWord']);
    form.signalWord = 'Warning';
    expect(errorsOfForm(form)).toEqual({});
    form.statements = ['H319'];
    form.signalWord = null;
    expect(bodyOfForm(form).signalWord).toBe('Warning');
  });

  it('shows while it is typed what the rules of care will say', () => {
    const form = makeOwnSaltForm(null, 'salt');
    form.cas = '6484-52-2';
    expect(verdictOfForm(form)).toMatchObject({
      refusal: expect.stringContaining('restricted'),
      twin: { id: 'NH4NO3' },
    });
    form.cas = '7757-79-1';
    expect(verdictOfForm(form)).toMatchObject({
      refusal: null,
      reportable: true,
      twin: { id: 'KNO3' },
    });
  });
});

describe('the list of salts', () => {
  it('is searched by every name, formula with either dot, CAS number and hazard', () => {
    const row = toSaltRow(salt);
    const text = Object.values(row)
      .filter((value) => typeof value === 'string')
      .join(' ');
    for (const word of [
      'saltpetre',
      'MgSO4.7H2O',
      'MgSO4·7H2O',
      '7757-79-1',
      'H272',
      'oxidiser',
      'reportable',
    ]) {
      expect(text).toContain(word);
    }
  });

  it('keeps hidden and archived ones apart', () => {
    const hidden = { ...salt, id: 'a', hidden: true };
    const archived = { ...salt, id: 'b', archivedAt: '2026-01-01T00:00:00.000Z' };
    const ids = (filter: Parameters<typeof filterSalts>[1]) =>
      filterSalts([salt, hidden, archived], filter).map(({ id }) => id);
    expect(ids('shown')).toEqual(['KNO3']);
    expect(ids('hidden')).toEqual(['a']);
    expect(ids('archived')).toEqual(['b']);
    expect(ids('reportable')).toEqual(['KNO3', 'a']);
  });
});

describe('what is in a salt', () => {
  it('names elements, then ions, oxides and crystal water', () => {
    const epsom = catalogue.find(({ id }) => id === 'MgSO4.7H2O');
    expect(
      epsom && fractionRows(epsom).map(({ label, percent }) => `${label} ${percent.toFixed(1)}`),
    ).toEqual(['S 13.0', 'Mg 9.9', 'as MgO 16.4', 'sulfate, SO₄ 39.0', 'crystal water 51.2']);
  });
});
