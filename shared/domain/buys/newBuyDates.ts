/** A calendar day as a zone sees it, and the instant of a time of day on it. */
export interface ZoneClock {
  /** Year, month 1..12 and day of an instant in the zone. */
  dayOf(at: Date): { year: number; month: number; day: number };
  /** The instant of a wall-clock hour; day may run past the month's end. */
  instantOf(day: { year: number; month: number; day: number }, hour: number): Date;
}

export interface NewBuyDates {
  readonly name: string;
  readonly closesAt: Date;
  readonly splitsAt: Date;
  readonly splitEndsAt: Date;
}

const months = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
];

const closesInDays = 10;
const splitsInDays = 21;
const saturday = 6;

/**
 * Sensible times for a new buy: it closes in 10 days at 20:00 and is split on the first Saturday at least 3 weeks from
 * now, 14:00 to 16:00, all in the club's zone. It is named after the month of the split.
 */
export function newBuyDates(now: Date, clock: ZoneClock): NewBuyDates {
  const today = clock.dayOf(now);
  const later = (days: number) => ({ ...today, day: today.day + days });
  const weekday = new Date(
    Date.UTC(today.year, today.month - 1, today.day + splitsInDays),
  ).getUTCDay();
  const splitDay = later(splitsInDays + ((saturday - weekday + 7) % 7));
  const split = new Date(Date.UTC(splitDay.year, splitDay.month - 1, splitDay.day));
  return {
    name: `${months[split.getUTCMonth()]} salts ${split.getUTCFullYear()}`,
    closesAt: clock.instantOf(later(closesInDays), 20),
    splitsAt: clock.instantOf(splitDay, 14),
    splitEndsAt: clock.instantOf(splitDay, 16),
  };
}
