import type { Bag, Portion, SplitChange, SplitLine, SplitSheet } from '#shared/schemas/splits.ts';

/** A bag of 25 kg net, weighed, of line `a`. */
export const bagWith = (changes: Partial<Bag> = {}): Bag => ({
  id: 'bag-1',
  lineId: 'a',
  supplierId: 's',
  supplier: 'Grainmoor Salts',
  offerId: 'o',
  number: 1,
  nominalMg: 25_000_000,
  grossMg: 25_100_000,
  tareMg: 100_000,
  tareAssumed: false,
  netMg: 25_000_000,
  lot: 'KN-1',
  missing: false,
  extra: false,
  damage: '',
  note: '',
  countedBy: null,
  countedAt: null,
  portionsMg: 0,
  spilledMg: 0,
  spills: [],
  shelfMg: null,
  closedAt: null,
  closedBy: null,
  unaccountedNote: '',
  files: 0,
  version: 1,
  ...changes,
});

/** Imke's 1 200 g of line `a`, waiting. */
export const portionWith = (changes: Partial<Portion> = {}): Portion => ({
  id: 'p-1',
  lineId: 'a',
  member: { membershipId: 'imke', name: 'Imke Sørland' },
  code: '0016',
  part: 1,
  parts: 1,
  targetMg: 1_200_000,
  targetVersion: 1,
  state: 'waiting',
  chargedMg: null,
  weighedMg: null,
  bagId: null,
  claimedBy: null,
  claimedAt: null,
  station: '',
  weighing: null,
  voidReason: '',
  handedOverAt: null,
  version: 1,
  ...changes,
});

/** Potassium nitrate in steps of 1 g. */
export const lineWith = (changes: Partial<SplitLine> = {}): SplitLine => ({
  id: 'a',
  saltId: 'KNO3',
  name: 'Potassium nitrate',
  formula: 'KNO3',
  signalWord: null,
  pictograms: [],
  hazards: [],
  cautions: [],
  storage: '',
  stepMg: 1000,
  shortage: 'scale',
  surplus: 'spread',
  hidden: false,
  progress: { portions: 1, done: 0 },
  unaccountedNote: '',
  ...changes,
});

/** A buy at splitting with one line, one bag and one portion unless told otherwise. */
export const sheetWith = (changes: Partial<SplitSheet> = {}): SplitSheet => ({
  buyId: 'buy',
  state: 'splitting',
  termsVersion: 1,
  splitVersion: 7,
  targetVersion: 1,
  bandPermille: 5,
  clubTakesExcess: false,
  lines: [lineWith()],
  orders: [],
  bags: [bagWith()],
  portions: [portionWith()],
  ...changes,
});

/** What an act replies that changed nothing that matters here. */
export const noChange: SplitChange = {
  buyId: 'buy',
  splitVersion: 8,
  bags: [],
  portions: [],
  partly: false,
};
