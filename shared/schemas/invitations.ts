import { z } from 'zod';
import { ClubSlug, DisplayName, Email, Id, Instant } from './fields.ts';

export const InviteByLinkBody = z.strictObject({ kind: z.literal('link') });

/** To one address; for a guest, whose history goes on under the account that accepts. */
export const InviteByEmailBody = z.strictObject({
  kind: z.literal('email'),
  email: Email,
  name: z.string().trim().max(80).default(''),
  guestId: Id.optional(),
});

export const InviteBody = z.discriminatedUnion('kind', [InviteByLinkBody, InviteByEmailBody]);
export type InviteBody = z.infer<typeof InviteBody>;

/** An invitation that can still be used, or has run out. The link itself is never told again. */
export const Invitation = z.strictObject({
  id: Id,
  kind: z.enum(['link', 'email']),
  email: z.string().nullable(),
  name: z.string(),
  guestName: z.string().nullable(),
  createdBy: z.string(),
  sentAt: Instant,
  expiresAt: Instant,
  expired: z.boolean(),
});
export type Invitation = z.infer<typeof Invitation>;

export const InvitationList = z.strictObject({
  invitations: z.array(Invitation),
  joinNeedsApproval: z.boolean(),
});
export type InvitationList = z.infer<typeof InvitationList>;

/** `path` is the join link's, told this once; null for one that went by e-mail. */
export const InvitedReply = z.strictObject({ invitation: Invitation, path: z.string().nullable() });
export type InvitedReply = z.infer<typeof InvitedReply>;

export const InvitationParams = z.strictObject({ club: z.string(), invitation: Id });

/** What the page behind an invitation shows. `already`: how the reader stands in that club, if at all. */
export const InvitationCard = z.strictObject({
  club: z.strictObject({ slug: ClubSlug, name: z.string(), note: z.string() }),
  kind: z.enum(['link', 'email']),
  email: z.string().nullable(),
  name: z.string(),
  invitedBy: z.string(),
  needsApproval: z.boolean(),
  expiresAt: Instant,
  already: z.enum(['pending', 'active']).nullable(),
});
export type InvitationCard = z.infer<typeof InvitationCard>;

export const AcceptInvitationBody = z.strictObject({ displayName: DisplayName });
export type AcceptInvitationBody = z.infer<typeof AcceptInvitationBody>;

export const AcceptedReply = z.strictObject({
  clubSlug: ClubSlug,
  clubName: z.string(),
  status: z.enum(['pending', 'active']),
});
export type AcceptedReply = z.infer<typeof AcceptedReply>;
