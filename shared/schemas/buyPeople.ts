import { z } from 'zod';
import { Id, Text } from './fields.ts';

/** Members of the club who may be named in a buy or be handed something on. */
export const BuyCandidates = z.strictObject({
  people: z.array(
    z.strictObject({
      membershipId: Id,
      name: z.string(),
      organiser: z.boolean(),
      guest: z.boolean(),
    }),
  ),
});
export type BuyCandidates = z.infer<typeof BuyCandidates>;

export const MemberParams = z.object({ member: Id });
export const HelperBody = z.strictObject({ takesCash: z.boolean() });
export type HelperBody = z.infer<typeof HelperBody>;

export const OfferResponsibilityBody = z.strictObject({ toId: Id });
export const AnswerResponsibilityBody = z.strictObject({ accept: z.boolean() });
export const PassResponsibilityBody = z.strictObject({
  toId: Id,
  reason: Text(500).min(3, 'Say why, for the audit log.'),
});
export type PassResponsibilityBody = z.infer<typeof PassResponsibilityBody>;
