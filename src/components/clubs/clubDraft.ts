import type { ClubReply, UpdateClubBody } from '#shared/schemas/clubs.ts';

/** The settings that a steward edits together. */
export type ClubDraft = Required<Omit<UpdateClubBody, 'version'>>;

const keys: readonly (keyof ClubDraft)[] = [
  'name',
  'note',
  'contact',
  'currency',
  'locale',
  'timeZone',
  'units',
  'placeAddress',
  'placeNote',
  'transferHow',
  'joinNeedsApproval',
  'hideReportableGrams',
  'precursorMonths',
];

/** What the form starts with. */
export function toDraft(club: ClubReply): ClubDraft {
  return Object.fromEntries(keys.map((key) => [key, club[key]])) as ClubDraft;
}

/** Only what differs from the club as it was loaded; empty when nothing does. */
export function changesOf(draft: ClubDraft, club: ClubReply): Partial<ClubDraft> {
  return Object.fromEntries(
    keys.filter((key) => draft[key] !== club[key]).map((key) => [key, draft[key]]),
  );
}
