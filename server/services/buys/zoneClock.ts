import { TZDate } from '@date-fns/tz';
import type { ZoneClock } from '#shared/domain/buys/newBuyDates.ts';

/** Calendar and wall clock of a time zone. */
export function zoneClock(timeZone: string): ZoneClock {
  return {
    dayOf: (at) => {
      const day = new TZDate(at, timeZone);
      return { year: day.getFullYear(), month: day.getMonth() + 1, day: day.getDate() };
    },
    instantOf: ({ year, month, day }, hour) =>
      new Date(new TZDate(year, month - 1, day, hour, 0, 0, timeZone).getTime()),
  };
}
