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
  handOn: z.boolean(),
});
export type BuyMay = z.infer<typeof BuyMay>;
