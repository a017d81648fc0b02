import type { Request } from 'express';
import {
  AccountReply,
  ChangeEmailBody,
  ChangePasswordBody,
  DeleteAccountBody,
  RequestResetBody,
  ResetBody,
  SignUpBody,
  TokenParams,
  TokenReply,
  UpdateAccountBody,
} from '#shared/schemas/accounts.ts';
import { Done } from '#shared/schemas/fields.ts';
import { SessionReply } from '#shared/schemas/session.ts';
import { limit } from '../middlewares/limits.ts';
import { accountRoute, visitorRoute, type RouteDef } from '../middlewares/route.ts';
import { signInAs, signOut } from '../middlewares/signIn.ts';
import {
  confirmEmailChange,
  readEmailChange,
  requestEmailChange,
} from '../services/accounts/changeEmail.ts';
import { changePassword } from '../services/accounts/changePassword.ts';
import { deleteAccount } from '../services/accounts/deleteAccount.ts';
import { readAccount } from '../services/accounts/readAccount.ts';
import { readSession } from '../services/accounts/readSession.ts';
import { requestReset } from '../services/accounts/requestReset.ts';
import { readReset, resetPassword } from '../services/accounts/resetPassword.ts';
import { signUp } from '../services/accounts/signUp.ts';
import { renameAccount, signOutEverywhere } from '../services/accounts/updateAccount.ts';

const hour = 3_600_000;
const quarterHour = 15 * 60_000;
const done = { done: true } as const;

const typedEmail = (req: Request) =>
  String((req.body as { email?: unknown } | undefined)?.email ?? '').toLowerCase();
const byAddress = (name: string, max: number, windowMs = hour) =>
  limit({ name, windowMs, max, key: (req) => req.ip ?? '' });

/** Resets are limited by account and by address, counted by what was typed: over it, too, nothing tells of an account. */
const resetLimits = [
  byAddress('reset-ip', 20),
  limit({ name: 'reset-account', windowMs: hour, max: 3, key: typedEmail }),
];

/** Whoever sits at a signed-in page can't try passwords without end. */
const ownPasswordLimit = limit({
  name: 'own-password',
  windowMs: quarterHour,
  max: 10,
  failuresOnly: true,
  key: (req) => req.user?.id ?? req.ip ?? '',
});

export const accountsRoutes: RouteDef[] = [
  visitorRoute({
    method: 'post',
    path: '/accounts',
    summary: 'Sign up; the new account is signed in and has no club yet',
    before: [byAddress('sign-up-ip', 30)],
    body: SignUpBody,
    reply: SessionReply,
    status: 201,
    run: async ({ req, body }) => readSession(await signInAs(req, await signUp(body))),
  }),
  visitorRoute({
    method: 'post',
    path: '/resets',
    summary: 'Ask for a link that sets a new password; the reply is the same for every address',
    before: resetLimits,
    body: RequestResetBody,
    reply: Done,
    run: async ({ body }) => {
      await requestReset(body.email);
      return done;
    },
  }),
  visitorRoute({
    method: 'get',
    path: '/resets/:token',
    summary: 'Whether a reset link still works, and for which address',
    before: [byAddress('reset-read-ip', 60)],
    params: TokenParams,
    reply: TokenReply,
    run: ({ params }) => readReset(params.token),
  }),
  visitorRoute({
    method: 'post',
    path: '/resets/:token',
    summary: 'Set a new password by a reset link; every session ends and a new one begins here',
    before: [byAddress('reset-use-ip', 60)],
    params: TokenParams,
    body: ResetBody,
    reply: SessionReply,
    run: async ({ req, params, body }) =>
      readSession(await signInAs(req, await resetPassword(params.token, body.password))),
  }),
  visitorRoute({
    method: 'get',
    path: '/email-confirmations/:token',
    summary: 'Which address a link confirms',
    before: [byAddress('email-read-ip', 60)],
    params: TokenParams,
    reply: TokenReply,
    run: ({ params }) => readEmailChange(params.token),
  }),
  visitorRoute({
    method: 'post',
    path: '/email-confirmations/:token',
    summary: 'Confirm a new address; the old one is told',
    before: [byAddress('email-use-ip', 60)],
    params: TokenParams,
    reply: TokenReply,
    run: ({ params }) => confirmEmailChange(params.token),
  }),
  accountRoute({
    method: 'get',
    path: '/account',
    summary: 'Your account and how you stand in your clubs',
    reply: AccountReply,
    run: ({ actor, req }) => readAccount(actor, req.sessionID),
  }),
  accountRoute({
    method: 'patch',
    path: '/account',
    summary: 'Change the name that new clubs start with',
    body: UpdateAccountBody,
    reply: Done,
    run: async ({ actor, body }) => {
      await renameAccount(actor.accountId, body.displayName);
      return done;
    },
  }),
  accountRoute({
    method: 'put',
    path: '/account/password',
    summary: 'Change your password; every other session ends',
    before: [ownPasswordLimit],
    body: ChangePasswordBody,
    reply: Done,
    run: async ({ actor, body, req }) => {
      await changePassword(actor.accountId, body, req.sessionID);
      await signInAs(req, actor.accountId);
      return done;
    },
  }),
  accountRoute({
    method: 'post',
    path: '/account/email',
    summary: 'Ask for another address; it changes once it is confirmed there',
    before: [
      ownPasswordLimit,
      limit({ name: 'email-change', windowMs: hour, max: 10, key: (req) => req.user?.id ?? '' }),
    ],
    body: ChangeEmailBody,
    reply: Done,
    run: async ({ actor, body }) => {
      await requestEmailChange(actor.accountId, body);
      return done;
    },
  }),
  accountRoute({
    method: 'delete',
    path: '/account/sessions',
    summary: 'Sign out everywhere, here too',
    reply: Done,
    run: async ({ actor, req }) => {
      await signOutEverywhere(actor.accountId);
      await signOut(req);
      return done;
    },
  }),
  accountRoute({
    method: 'delete',
    path: '/account',
    summary: 'Delete your account; memberships are left',
    before: [ownPasswordLimit],
    body: DeleteAccountBody,
    reply: Done,
    run: async ({ actor, body, req }) => {
      await deleteAccount(actor, body.password);
      await signOut(req);
      return done;
    },
  }),
];
