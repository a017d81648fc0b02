import { z } from 'zod';
import { ClubSlug, Email, Id, Roles } from './fields.ts';

/** One membership as the frame of the app needs it. */
export const SessionMembership = z.strictObject({
  clubId: Id,
  clubSlug: ClubSlug,
  clubName: z.string(),
  membershipId: Id,
  status: z.enum(['pending', 'active', 'left', 'removed']),
  roles: Roles,
  currency: z.string(),
  locale: z.string(),
  timeZone: z.string(),
  units: z.enum(['metric', 'us']),
});
export type SessionMembership = z.infer<typeof SessionMembership>;

/** Who is signed in, in which clubs; `firstRun`: no account exists yet. */
export const SessionReply = z.strictObject({
  account: z.strictObject({ id: Id, email: z.string(), displayName: z.string() }).nullable(),
  memberships: z.array(SessionMembership),
  demo: z.boolean(),
  firstRun: z.boolean(),
});
export type SessionReply = z.infer<typeof SessionReply>;

export const SignInBody = z.strictObject({
  email: Email,
  password: z.string().min(1, 'Write your password.').max(1000),
});
export type SignInBody = z.infer<typeof SignInBody>;

/** One-click demo sign-in; exists only in demo mode. */
export const DemoSignInBody = z.strictObject({ email: Email });
export type DemoSignInBody = z.infer<typeof DemoSignInBody>;

/** A person of the demo club whom one click signs in, with their roles there; none: a plain member. */
export const DemoPerson = z.strictObject({
  email: z.string(),
  name: z.string(),
  clubName: z.string(),
  roles: z.array(z.enum(['organiser', 'treasurer', 'steward'])),
});
export type DemoPerson = z.infer<typeof DemoPerson>;

export const DemoPeople = z.strictObject({ people: z.array(DemoPerson) });
export type DemoPeople = z.infer<typeof DemoPeople>;
