import { auditActs } from 'src/components/clubs/auditActs.ts';
import type { Format as FullFormat } from 'src/composables/useFormat.ts';

type Format = Pick<FullFormat, 'money' | 'mass' | 'percent' | 'dateTime'>;

/** Acts that are about the person who does them: their name isn't said twice. */
const ofOneself = new Set(['clubs.join', 'clubs.ask_to_join', 'clubs.leave', 'clubs.rename']);

const spaced = (name: string) =>
  name
    .replace(/([a-z0-9])([A-Z])/g, '$1 $2')
    .replace(/[_.]/g, ' ')
    .toLowerCase();

/** 'changed the roles of'; an act without words of its own is spelt out: 'buys: lock'. */
export function sayAct(action: string): string {
  const [feature, verb] = action.split('.');
  return auditActs[action] ?? (verb ? `${spaced(feature ?? '')}: ${spaced(verb)}` : spaced(action));
}

/** Whether the subject's name follows the act. */
export const namesSubject = (action: string) => !ofOneself.has(action);

const keys: Record<string, string> = {
  note: 'What the club is',
  placeAddress: 'Meetup place',
  placeNote: 'Note on the place',
  transferHow: 'How to pay by transfer',
  joinNeedsApproval: 'A steward answers who joins',
  hideReportableGrams: 'Only totals of reportable salts',
  precursorMonths: 'Months that records are kept',
  shelfLimitMinor: "The shelf's share at most",
  displayName: 'Name',
};

/** 'Wanted', 'Closes at': the key without its unit. */
export function sayKey(key: string): string {
  if (keys[key]) return keys[key];
  const words = spaced(key.replace(/(Mg|Minor|Ppm|Id)$/, ''));
  return words.charAt(0).toUpperCase() + words.slice(1);
}

const isEmpty = (value: unknown) => value === null || value === undefined || value === '';

const isInstant = (value: string) => /^\d{4}-\d\d-\d\dT[\d:.]+Z$/.test(value);

/** A value as a person reads it, by its type and by the unit that its key carries. */
export function sayValue(key: string, value: unknown, format: Format): string {
  if (isEmpty(value)) return '–';
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value === 'number') {
    if (key.endsWith('Mg')) return format.mass(value);
    if (key.endsWith('Minor')) return format.money(value);
    if (key.endsWith('Permille')) return format.percent(value);
    return String(value);
  }
  if (typeof value === 'string') return isInstant(value) ? format.dateTime(value) : value;
  if (Array.isArray(value)) return value.map((one) => sayValue(key, one, format)).join(', ') || '–';
  const entries = Object.entries(value as Record<string, unknown>);
  // A set of flags, such as roles, reads as those that are up.
  if (entries.length > 0 && entries.every(([, one]) => typeof one === 'boolean')) {
    const up = entries.filter(([, one]) => one).map(([flag]) => sayKey(flag).toLowerCase());
    return up.join(', ') || 'none';
  }
  return entries
    .map(([inner, one]) => `${sayKey(inner)}: ${sayValue(inner, one, format)}`)
    .join(', ');
}

export type AuditChange = { key: string; label: string; before: string; after: string };

type Content = Record<string, unknown> | null;

/** What an entry changed, key by key; what stayed, and ids that only the program reads, are left out. */
export function listChanges(before: Content, after: Content, format: Format): AuditChange[] {
  const keys = new Set([...Object.keys(before ?? {}), ...Object.keys(after ?? {})]);
  return [...keys]
    .filter((key) => !/(^id|Id)$/.test(key))
    .map((key) => ({
      key,
      label: sayKey(key),
      before:
        before && key in before && !isEmpty(before[key]) ? sayValue(key, before[key], format) : '',
      after: after && key in after ? sayValue(key, after[key], format) : '',
    }))
    .filter((change) => change.before !== change.after);
}
