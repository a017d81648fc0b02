import type { ClubReply } from '#shared/schemas/clubs.ts';
import type { Club } from '../models/Club.ts';

/** A club's row as its members see it. */
export function presentClub(
  club: Club,
  facts: { currencyFixed: boolean; may: ClubReply['may'] },
): ClubReply {
  return {
    slug: club.slug,
    name: club.name,
    note: club.note,
    contact: club.contact,
    currency: club.currency,
    locale: club.locale,
    timeZone: club.timeZone,
    units: club.units,
    placeAddress: club.placeAddress,
    placeNote: club.placeNote,
    transferHow: club.transferHow,
    joinNeedsApproval: club.joinNeedsApproval,
    hideReportableGrams: club.hideReportableGrams,
    precursorMonths: club.precursorMonths,
    shelfLimitMinor: club.shelfLimitMinor,
    version: club.version,
    ...facts,
  };
}
