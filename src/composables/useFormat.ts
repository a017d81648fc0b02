import { computed, inject, provide, type ComputedRef, type InjectionKey } from 'vue';
import { formatMass } from '#shared/domain/mass/formatMass.ts';
import { formatMoney, minorToDecimal } from '#shared/domain/money/formatMoney.ts';

/** What a club says about how it writes sums, masses and times. */
export type FormatChoices = {
  currency: string;
  locale: string;
  timeZone: string;
  units: 'metric' | 'us';
};

const KEY: InjectionKey<ComputedRef<FormatChoices>> = Symbol('format');

const device = (): FormatChoices => ({
  currency: 'EUR',
  locale: navigator.language || 'en',
  timeZone: Intl.DateTimeFormat().resolvedOptions().timeZone,
  units: 'metric',
});

/** Named by a layout: everything below writes as this club does; without a club, as the device. */
export function provideFormat(read: () => FormatChoices | null) {
  provide(
    KEY,
    computed(() => read() ?? device()),
  );
}

type Instant = string | number | Date;

const makeFormat = (choices: FormatChoices) => {
  const { currency, locale, timeZone, units } = choices;
  const dates = (options: Intl.DateTimeFormatOptions, zone = timeZone) =>
    new Intl.DateTimeFormat(locale, { ...options, timeZone: zone });
  const dayParts = { weekday: 'short', day: 'numeric', month: 'short' } as const;
  const timeParts = { hour: '2-digit', minute: '2-digit' } as const;
  const yearOf = new Intl.DateTimeFormat('en', { year: 'numeric', timeZone });
  const withYear = (at: Date) =>
    yearOf.format(at) === yearOf.format() ? {} : ({ year: 'numeric' } as const);
  const read = (at: Instant) => new Date(at);
  const groupMark =
    new Intl.NumberFormat(locale).formatToParts(1234567).find(({ type }) => type === 'group')
      ?.value ?? '';
  // Thousands are parted by a narrow gap, whatever mark the locale would put there.
  const narrow = (text: string) =>
    text.replace(/(?<=\d)(\D)(?=\d{3}(?!\d))/g, (mark) => (mark === groupMark ? '\u202f' : mark));
  const decimals = minorToDecimal(0, currency).split('.')[1]?.length ?? 0;
  const decimal = (exact: string) =>
    narrow(
      new Intl.NumberFormat(locale, {
        minimumFractionDigits: exact.split('.')[1]?.length ?? 0,
        maximumFractionDigits: exact.split('.')[1]?.length ?? 0,
      }).format(exact as `${number}`),
    ).replace('-', '−');
  const grams = (mg: number) => formatMass(mg, { locale }).replace(/\u00a0g$/, '');

  return {
    ...choices,
    /** '€ 14.96' in the club's manner. */
    money: (minor: number) => narrow(formatMoney(minor, currency, locale)),
    /** The same without the currency's sign, for columns that name it once. */
    amount: (minor: number) => decimal(minorToDecimal(minor, currency)),
    /** '1 200 g', and what it is in the club's other unit when that is US. */
    mass: (mg: number) =>
      units === 'us'
        ? `${formatMass(mg, { locale })} (${formatMass(mg, { unit: mg >= 453_592 ? 'lb' : 'oz', locale })})`
        : formatMass(mg, { locale }),
    /** '1 200', for columns that name the gram once. */
    grams,
    /** '25 kg', '250 g': a pack's size in the unit it is sold by. */
    pack: (mg: number) => formatMass(mg, { unit: 'auto', locale }),
    /** The price of 100 g from minor units a gram. */
    per100g: (minorPerGram: number) =>
      decimal(((minorPerGram * 100) / 10 ** decimals).toFixed(decimals)),
    number: (value: number, places = 0) => decimal(value.toFixed(places)),
    percent: (permille: number) =>
      new Intl.NumberFormat(locale, { style: 'percent', maximumFractionDigits: 1 }).format(
        permille / 1000,
      ),
    /** 'Sat 12 Dec', with the year when it isn't this one. */
    date: (at: Instant) => dates({ ...dayParts, ...withYear(read(at)) }).format(read(at)),
    time: (at: Instant) => dates(timeParts).format(read(at)),
    dateTime: (at: Instant) =>
      dates({ ...dayParts, ...withYear(read(at)), ...timeParts }).format(read(at)),
    /** A calendar day, which has no zone. */
    day: (day: string) =>
      dates({ ...dayParts, year: 'numeric' }, 'UTC').format(new Date(`${day}T00:00:00Z`)),
    /** '3 hours ago', 'in 2 days'. */
    ago: (at: Instant, now: Instant = Date.now()) => formatAgo(read(at), read(now), locale),
  };
};

const spans = [
  ['day', 86_400_000],
  ['hour', 3_600_000],
  ['minute', 60_000],
] as const;

function formatAgo(at: Date, now: Date, locale: string): string {
  const words = new Intl.RelativeTimeFormat(locale, { numeric: 'auto' });
  const gap = at.getTime() - now.getTime();
  for (const [unit, ms] of spans) {
    if (Math.abs(gap) >= ms) return words.format(Math.round(gap / ms), unit);
  }
  return words.format(0, 'second');
}

export type Format = ReturnType<typeof makeFormat>;

/** How this club writes money, mass and time; one object, made anew when the club changes. */
export function useFormat(): ComputedRef<Format> {
  const choices = inject(KEY, undefined);
  return computed(() => makeFormat(choices?.value ?? device()));
}
