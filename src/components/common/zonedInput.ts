import { TZDate } from '@date-fns/tz';

const two = (value: number) => String(value).padStart(2, '0');

/** An instant as a `datetime-local` field of a zone holds it: `2026-12-12T14:00`. */
export function toZonedInput(iso: string | null | undefined, timeZone: string): string {
  if (!iso) return '';
  const at = new TZDate(Date.parse(iso), timeZone);
  if (Number.isNaN(at.getTime())) return '';
  const day = `${String(at.getFullYear()).padStart(4, '0')}-${two(at.getMonth() + 1)}-${two(at.getDate())}`;
  return `${day}T${two(at.getHours())}:${two(at.getMinutes())}`;
}

/** The instant a field of a zone means, in UTC with Z; `null` while it isn't complete. */
export function fromZonedInput(text: string, timeZone: string): string | null {
  const parts = /^(\d{4})-(\d\d)-(\d\d)T(\d\d):(\d\d)/.exec(text);
  if (!parts) return null;
  const [year = 0, month = 1, day = 1, hour = 0, minute = 0] = parts.slice(1).map(Number);
  const at = new TZDate(year, month - 1, day, hour, minute, 0, 0, timeZone);
  return new Date(at.getTime()).toISOString();
}
