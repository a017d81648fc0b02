import { formatMass } from '#shared/domain/mass/formatMass.ts';
import { formatMoney } from '#shared/domain/money/formatMoney.ts';

/** How a club's notices write sums, masses and times. */
export interface Say {
  money(minor: number): string;
  mass(mg: number): string;
  pack(mg: number): string;
  percent(permille: number): string;
  at(at: Date | null): string;
}

/** Words in a club's currency, locale and zone, for notices and the list of changes. */
export function sayFor(club: { currency: string; locale: string; timeZone: string }): Say {
  const when = new Intl.DateTimeFormat(club.locale, {
    weekday: 'short',
    day: 'numeric',
    month: 'short',
    hour: '2-digit',
    minute: '2-digit',
    timeZone: club.timeZone,
  });
  return {
    money: (minor) => formatMoney(minor, club.currency, club.locale),
    mass: (mg) => formatMass(mg, { locale: club.locale }),
    pack: (mg) => formatMass(mg, { unit: 'auto', locale: club.locale }),
    percent: (permille) => `${permille / 10} %`,
    at: (at) => (at ? when.format(at) : 'not set'),
  };
}
