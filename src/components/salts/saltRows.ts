import { hazardText } from '#shared/domain/salts/hazards.ts';
import type { ClubSalt } from '#shared/schemas/salts.ts';

/** One row of the list of salts: what its search looks through, beside the salt itself. */
export type SaltRow = {
  id: string;
  salt: ClubSalt;
  words: string;
  formula: string;
  cas: string;
  hazardWords: string;
  flags: string;
};

export const saltFilters = [
  { value: 'shown', label: 'The club’s list' },
  { value: 'own', label: 'Your own' },
  { value: 'reportable', label: 'Reportable' },
  { value: 'refused', label: 'Not for a buy' },
  { value: 'hidden', label: 'Hidden' },
  { value: 'archived', label: 'Archived' },
] as const;
export type SaltFilter = (typeof saltFilters)[number]['value'];

const holds: Record<SaltFilter, (salt: ClubSalt) => boolean> = {
  shown: (salt) => !salt.hidden && !salt.archivedAt,
  own: (salt) => salt.source === 'club' && !salt.archivedAt,
  reportable: (salt) => salt.reportable && !salt.archivedAt,
  refused: (salt) => salt.lineRefusal !== null && !salt.archivedAt,
  hidden: (salt) => salt.hidden && !salt.archivedAt,
  archived: (salt) => salt.archivedAt !== null,
};

export const filterSalts = (salts: readonly ClubSalt[], filter: SaltFilter) =>
  salts.filter(holds[filter]);

export const toSaltRow = (salt: ClubSalt): SaltRow => ({
  id: salt.id,
  salt,
  words: [salt.name, ...salt.otherNames].join(' '),
  // Found by "MgSO4.7H2O" as by "MgSO4·7H2O".
  formula: salt.formula ? `${salt.formula} ${salt.formula.replace(/·/g, '.')}` : '',
  cas: salt.cas ?? '',
  hazardWords: salt.statements.map((code) => `${code} ${hazardText(code)}`).join(' '),
  flags: [salt.reportable ? 'reportable' : '', salt.lineRefusal ? 'not for a buy' : ''].join(' '),
});
