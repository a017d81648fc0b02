import type { Parsed } from 'src/composables/useTypedValue.ts';

/** A count or per cent as typed, "7" or "0,5", in stored units: `scale` of them make one shown. */
export function parseTypedNumber(text: string, scale: number): Parsed {
  const typed = text.trim().replace(/\s*%$/, '').replace(',', '.');
  if (/^-/.test(typed)) return { ok: false, code: 'negative' };
  if (!/^\d+(\.\d*)?$/.test(typed)) return { ok: false, code: 'unreadable' };
  const value = Number(typed) * scale;
  const whole = Math.round(value);
  if (Math.abs(value - whole) > 1e-9) return { ok: false, code: 'too_precise' };
  return { ok: true, value: whole };
}
