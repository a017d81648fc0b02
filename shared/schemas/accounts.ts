import { z } from 'zod';
import { ClubSlug, DisplayName, Email, Id, Roles } from './fields.ts';

const characters = (text: string) => [...text.normalize('NFC')].length;

/** 10 to 128 characters, no rules of composition; the server also refuses the commonest ones. */
export const Password = z
  .string()
  .max(1000, 'Use at most 128 characters.')
  .refine((text) => characters(text) >= 10, 'Use at least 10 characters.')
  .refine((text) => characters(text) <= 128, 'Use at most 128 characters.');

const Typed = z.string().min(1, 'Write your password.').max(1000);

export const SignUpBody = z.strictObject({
  displayName: DisplayName,
  email: Email,
  password: Password,
});
export type SignUpBody = z.infer<typeof SignUpBody>;

export const RequestResetBody = z.strictObject({ email: Email });
export type RequestResetBody = z.infer<typeof RequestResetBody>;

export const ResetBody = z.strictObject({ password: Password });
export type ResetBody = z.infer<typeof ResetBody>;

/** A secret from a link in a mail, or from a join link. */
export const TokenParams = z.strictObject({ token: z.string().min(1).max(200) });
export type TokenParams = z.infer<typeof TokenParams>;

/** What a link about an account is for: the address that it names. */
export const TokenReply = z.strictObject({ email: z.string() });
export type TokenReply = z.infer<typeof TokenReply>;

/** One's own account; `otherSessions` counts sign-ins on other devices. */
export const AccountReply = z.strictObject({
  email: z.string(),
  displayName: z.string(),
  pendingEmail: z.string().nullable(),
  otherSessions: z.int().min(0),
  clubs: z.array(
    z.strictObject({
      clubSlug: ClubSlug,
      clubName: z.string(),
      membershipId: Id,
      displayName: z.string(),
      status: z.enum(['pending', 'active', 'left', 'removed']),
      roles: Roles,
    }),
  ),
});
export type AccountReply = z.infer<typeof AccountReply>;

export const UpdateAccountBody = z.strictObject({ displayName: DisplayName });
export type UpdateAccountBody = z.infer<typeof UpdateAccountBody>;

export const ChangePasswordBody = z.strictObject({ current: Typed, password: Password });
export type ChangePasswordBody = z.infer<typeof ChangePasswordBody>;

export const ChangeEmailBody = z.strictObject({ email: Email, password: Typed });
export type ChangeEmailBody = z.infer<typeof ChangeEmailBody>;

export const DeleteAccountBody = z.strictObject({ password: Typed });
export type DeleteAccountBody = z.infer<typeof DeleteAccountBody>;
