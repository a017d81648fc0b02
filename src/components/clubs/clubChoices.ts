import { currencyCodes } from '#shared/domain/money/currencies.ts';

export type Choice = { value: string; label: string };

/** Languages and regions by which a club may write numbers and dates. */
const localeTags = [
  'en-GB',
  'en-US',
  'en-IE',
  'en-AU',
  'en-CA',
  'en-NZ',
  'en-IN',
  'en-ZA',
  'de-DE',
  'de-AT',
  'de-CH',
  'nl-NL',
  'nl-BE',
  'fr-FR',
  'fr-BE',
  'fr-CH',
  'fr-CA',
  'es-ES',
  'es-MX',
  'it-IT',
  'pt-PT',
  'pt-BR',
  'da-DK',
  'sv-SE',
  'nb-NO',
  'fi-FI',
  'et-EE',
  'lv-LV',
  'lt-LT',
  'pl-PL',
  'cs-CZ',
  'sk-SK',
  'hu-HU',
  'sl-SI',
  'hr-HR',
  'ro-RO',
  'bg-BG',
  'el-GR',
  'tr-TR',
  'uk-UA',
  'he-IL',
  'ja-JP',
  'ko-KR',
  'zh-CN',
  'zh-TW',
  'th-TH',
  'id-ID',
  'ms-MY',
  'vi-VN',
];

const euroRegions = 'AT BE CY DE EE ES FI FR GR HR IE IT LT LU LV MT NL PT SI SK'.split(' ');
const currencyOfRegion: Record<string, string> = {
  ...Object.fromEntries(euroRegions.map((region) => [region, 'EUR'])),
  AU: 'AUD',
  BG: 'EUR',
  BR: 'BRL',
  CA: 'CAD',
  CH: 'CHF',
  CN: 'CNY',
  CZ: 'CZK',
  DK: 'DKK',
  GB: 'GBP',
  HU: 'HUF',
  ID: 'IDR',
  IL: 'ILS',
  IN: 'INR',
  JP: 'JPY',
  KR: 'KRW',
  MX: 'MXN',
  MY: 'MYR',
  NO: 'NOK',
  NZ: 'NZD',
  PL: 'PLN',
  RO: 'RON',
  SE: 'SEK',
  TH: 'THB',
  TR: 'TRY',
  TW: 'TWD',
  UA: 'UAH',
  US: 'USD',
  VN: 'VND',
  ZA: 'ZAR',
};

/** Currencies by code and name in the reader's language. */
export function currencyChoices(language: string): Choice[] {
  const names = new Intl.DisplayNames([language], { type: 'currency' });
  return currencyCodes.map((code) => ({
    value: code,
    label: `${code} · ${names.of(code) ?? code}`,
  }));
}

/** Languages and regions by name; one that a club has already stays in the list. */
export function localeChoices(language: string, present: string): Choice[] {
  const names = new Intl.DisplayNames([language], {
    type: 'language',
    languageDisplay: 'standard',
  });
  const tags = localeTags.includes(present) || !present ? localeTags : [present, ...localeTags];
  return tags
    .map((tag) => ({ value: tag, label: names.of(tag) ?? tag }))
    .sort((one, two) => one.label.localeCompare(two.label, language));
}

/** Time zones of the IANA data base that the browser knows. */
export function timeZoneChoices(present: string): Choice[] {
  const zones = Intl.supportedValuesOf('timeZone');
  const all = zones.includes(present) || !present ? zones : [present, ...zones];
  return all.map((zone) => ({ value: zone, label: zone.replaceAll('_', ' ') }));
}

/** What a new club starts with, as the device has it. */
export function deviceDefaults(): {
  currency: string;
  locale: string;
  timeZone: string;
  units: 'metric' | 'us';
} {
  const { locale: tag, timeZone } = Intl.DateTimeFormat().resolvedOptions();
  const locale = new Intl.Locale(navigator.language || tag);
  const region = locale.region ?? locale.maximize().region ?? '';
  const full = `${locale.language}-${region}`;
  return {
    currency: currencyOfRegion[region] ?? 'EUR',
    locale: localeTags.includes(full) ? full : 'en-GB',
    timeZone: timeZone === 'UTC' ? 'Europe/London' : timeZone,
    units: region === 'US' ? 'us' : 'metric',
  };
}
