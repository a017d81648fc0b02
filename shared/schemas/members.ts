import { z } from 'zod';
import { roleNames } from '../domain/clubs/roles.ts';
import { DisplayName, Id, Instant, Roles, Text, Version } from './fields.ts';

export const MembershipStatus = z.enum(['pending', 'active', 'left', 'removed']);
export type MembershipStatus = z.infer<typeof MembershipStatus>;

/**
 * Somebody in a club. `email`, `contact` and `balanceMinor` are null for those who may not see them. A positive balance
 * is asked for, a negative one is free credit. `lastOf`: roles that nobody else holds.
 */
export const Member = z.strictObject({
  id: Id,
  displayName: z.string(),
  status: MembershipStatus,
  roles: Roles,
  isGuest: z.boolean(),
  you: z.boolean(),
  joinedAt: Instant,
  endedAt: Instant.nullable(),
  email: z.string().nullable(),
  contact: z.string().nullable(),
  vouchedBy: z.strictObject({ id: Id, name: z.string() }).nullable(),
  balanceMinor: z.int().nullable(),
  lastOf: z.array(z.enum(roleNames)),
  version: Version,
});
export type Member = z.infer<typeof Member>;

/** Everyone in a club whom the reader may know of: those who ask to join, and former members, for stewards only. */
export const MembersReply = z.strictObject({
  members: z.array(Member),
  may: z.strictObject({ manage: z.boolean(), seeEmails: z.boolean(), seeBalances: z.boolean() }),
});
export type MembersReply = z.infer<typeof MembersReply>;

export const ChangeRolesBody = z.strictObject({ roles: Roles, version: Version });
export type ChangeRolesBody = z.infer<typeof ChangeRolesBody>;

export const RenameSelfBody = z.strictObject({ displayName: DisplayName });
export type RenameSelfBody = z.infer<typeof RenameSelfBody>;

export const GuestBody = z.strictObject({
  displayName: DisplayName,
  contact: Text(200),
  vouchedById: Id,
});
export type GuestBody = z.infer<typeof GuestBody>;

export const UpdateGuestBody = z.strictObject({ ...GuestBody.shape, version: Version });
export type UpdateGuestBody = z.infer<typeof UpdateGuestBody>;

export const MemberParams = z.strictObject({ club: z.string(), member: Id });
