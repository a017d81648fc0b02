import { z } from 'zod';

/** What this viewer may do with a buy now: role and state together. Each feature adds its acts here and in the presenter. */
export const BuyMay = z.strictObject({
  edit: z.boolean(),
  /** Terms that stay changeable after the lock: split day, place, pickup rules, note. */
  editMeeting: z.boolean(),
  open: z.boolean(),
  discard: z.boolean(),
  restore: z.boolean(),
  cancel: z.boolean(),
  copy: z.boolean(),
  namePeople: z.boolean(),
  offerResponsibility: z.boolean(),
  answerResponsibility: z.boolean(),
  passResponsibility: z.boolean(),
  /** Arrivals and the bags' weights. */
  countBags: z.boolean(),
  weigh: z.boolean(),
  /** Targets, moving the split on, taking portions out. */
  runSplit: z.boolean(),
  /** Whether the club bears what was lost above 2 %. */
  takeLoss: z.boolean(),
  /** Who collects what, and whether it is paid. */
  seeDesk: z.boolean(),
  handOver: z.boolean(),
  /** Times of hand-over, notices, reminders, what nobody fetched. */
  runPickup: z.boolean(),
  /** Who received reportable salts. */
  seeRecords: z.boolean(),
  handOn: z.boolean(),
  seePayments: z.boolean(),
  /** Quotes, orders with suppliers, bills. */
  order: z.boolean(),
  settle: z.boolean(),
  seeNotices: z.boolean(),
  writeNotices: z.boolean(),
});
export type BuyMay = z.infer<typeof BuyMay>;
