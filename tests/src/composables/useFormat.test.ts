import { mount } from '@vue/test-utils';
import { describe, expect, it } from 'vitest';
import { defineComponent, h } from 'vue';
import {
  provideFormat,
  useFormat,
  type Format,
  type FormatChoices,
} from 'src/composables/useFormat.ts';

function formatOf(choices: Partial<FormatChoices>): Format {
  let format: Format | undefined;
  const Below = defineComponent(() => {
    format = useFormat().value;
    return () => null;
  });
  mount(
    defineComponent(() => {
      provideFormat(() => ({
        currency: 'EUR',
        locale: 'en-IE',
        timeZone: 'Europe/Dublin',
        units: 'metric',
        ...choices,
      }));
      return () => h(Below);
    }),
  );
  if (!format) throw new Error('nothing was provided');
  return format;
}

const plain = (text: string) => text.replace(/[\u00a0\u202f]/g, ' ');

describe('useFormat', () => {
  it('parts thousands by a narrow gap in every locale', () => {
    expect(formatOf({}).money(1_234_567)).toBe('€12\u202f345.67');
    expect(formatOf({ locale: 'de-DE' }).amount(-1_234_567)).toBe('−12\u202f345,67');
    expect(formatOf({ currency: 'JPY', locale: 'en' }).amount(1_234_567)).toBe(
      '1\u202f234\u202f567',
    );
    expect(formatOf({ currency: 'KWD', locale: 'en' }).amount(1_234_567)).toBe('1\u202f234.567');
  });

  it('writes masses in grams, packs as they are sold, and pounds beside where the club wants them', () => {
    expect(plain(formatOf({}).mass(1_200_000))).toBe('1 200 g');
    expect(plain(formatOf({}).grams(23_650_500))).toBe('23 650.5');
    expect(plain(formatOf({}).pack(25_000_000))).toBe('25 kg');
    expect(plain(formatOf({ units: 'us' }).mass(453_592))).toBe('453.592 g (1 lb)');
  });

  it('writes the price of 100 g from minor units a gram', () => {
    expect(formatOf({}).per100g(0.3921)).toBe('0.39');
    expect(formatOf({ currency: 'JPY' }).per100g(0.3921)).toBe('39');
  });

  it('writes times in the club’s zone, whatever the device’s', () => {
    const at = '2027-07-01T23:30:00.000Z';
    expect(formatOf({}).dateTime(at)).toContain('00:30');
    expect(formatOf({}).date(at)).toContain('2 Jul');
    expect(formatOf({ timeZone: 'America/New_York' }).dateTime(at)).toContain('19:30');
    expect(formatOf({ timeZone: 'America/New_York' }).day('2026-12-12')).toContain('12');
  });

  it('says how long ago', () => {
    const now = '2026-12-12T12:00:00Z';
    expect(formatOf({}).ago('2026-12-12T09:00:00Z', now)).toBe('3 hours ago');
    expect(formatOf({}).ago('2026-12-14T12:00:00Z', now)).toBe('in 2 days');
    expect(formatOf({}).ago(now, now)).toBe('now');
  });
});
