import type { Attachment } from '../notices/queueNotice.ts';
import { splitDayCalendar, type SplitDay } from '../buys/splitDayCalendar.ts';

/** A pickup slot as a calendar file: an event of its own beside the split day. */
export function calendarOfSlot(slot: Omit<SplitDay, 'description'>): Attachment {
  const calendar = splitDayCalendar({ ...slot, description: 'Bring your pass.' });
  return {
    ...calendar,
    fileName: 'pickup.ics',
    text: calendar.text
      .replace(/^UID:split-/m, 'UID:pickup-')
      .replace(/^(SUMMARY:.*): split day/m, '$1: pickup'),
  };
}
