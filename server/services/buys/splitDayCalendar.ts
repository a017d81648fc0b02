import { createEvent, type DateArray } from 'ics';
import { publicUrl } from '../../config/runtime.ts';
import type { Attachment } from '../notices/queueNotice.ts';

export interface SplitDay {
  readonly buyId: string;
  readonly buyName: string;
  readonly clubName: string;
  readonly startsAt: Date;
  readonly endsAt: Date | null;
  readonly place: string;
  readonly description: string;
  /** Counts up with each change, so that a calendar replaces what it has. */
  readonly sequence: number;
  readonly path: string;
}

const hour = 3_600_000;

function utc(at: Date): DateArray {
  return [
    at.getUTCFullYear(),
    at.getUTCMonth() + 1,
    at.getUTCDate(),
    at.getUTCHours(),
    at.getUTCMinutes(),
  ];
}

/** The split day as a calendar file (RFC 5545); the same buy keeps its event, two hours long unless told. */
export function splitDayCalendar(day: SplitDay): Attachment {
  const endsAt = day.endsAt ?? new Date(day.startsAt.getTime() + 2 * hour);
  const { error, value } = createEvent({
    uid: `split-${day.buyId}@tarewell`,
    productId: '-//Tarewell//EN',
    method: 'PUBLISH',
    sequence: day.sequence,
    title: `${day.buyName}: split day`,
    description: day.description,
    location: day.place,
    url: `${publicUrl()}${day.path}`,
    organizer: { name: day.clubName },
    start: utc(day.startsAt),
    startInputType: 'utc',
    startOutputType: 'utc',
    end: utc(endsAt),
    endInputType: 'utc',
    endOutputType: 'utc',
  });
  if (error || !value) throw error ?? new Error('no calendar');
  return { fileName: 'split-day.ics', contentType: 'text/calendar; method=PUBLISH', text: value };
}
