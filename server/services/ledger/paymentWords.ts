import { formatMoney } from '#shared/domain/money/formatMoney.ts';
import type { ActorClub } from '../actors.ts';

/** A sum as this club writes it, for notices and audit words. */
export function clubMoney(club: Pick<ActorClub, 'currency' | 'locale'>, minor: number): string {
  return formatMoney(minor, club.currency, club.locale);
}

/** A calendar day as this club writes it. */
export function clubDay(club: Pick<ActorClub, 'locale'>, day: string): string {
  return new Intl.DateTimeFormat(club.locale, { dateStyle: 'long', timeZone: 'UTC' }).format(
    new Date(`${day}T00:00:00Z`),
  );
}

/** The path of a member's own page of the books. */
export const ledgerPath = (club: Pick<ActorClub, 'slug'>) => `/c/${club.slug}/ledger`;
