import { Done } from '#shared/schemas/fields.ts';
import { DemoPeople, DemoSignInBody, SessionReply, SignInBody } from '#shared/schemas/session.ts';
import { env } from '../config/runtime.ts';
import { limit } from '../middlewares/limits.ts';
import { visitorRoute, type RouteDef } from '../middlewares/route.ts';
import { findDemoAccount } from '../services/accounts/findDemoAccount.ts';
import { findDemoPeople } from '../services/accounts/findDemoPeople.ts';
import { signIn, signInAs, signOut } from '../middlewares/signIn.ts';
import { readSession } from '../services/accounts/readSession.ts';

const quarterHour = 15 * 60_000;

/** Signing in is limited by address and by account together and apart, whether or not the account exists. */
export const signInLimits = [
  limit({
    name: 'sign-in-ip',
    windowMs: quarterHour,
    max: 60,
    failuresOnly: true,
    key: (req) => req.ip ?? '',
  }),
  limit({
    name: 'sign-in-account',
    windowMs: quarterHour,
    max: 10,
    failuresOnly: true,
    key: (req) => String((req.body as { email?: unknown } | undefined)?.email ?? '').toLowerCase(),
  }),
];

export const sessionRoutes: RouteDef[] = [
  visitorRoute({
    method: 'get',
    path: '/session',
    summary: 'Who is signed in, and in which clubs',
    reply: SessionReply,
    run: ({ actor }) => readSession(actor),
  }),
  visitorRoute({
    method: 'post',
    path: '/session',
    summary: 'Sign in',
    before: signInLimits,
    body: SignInBody,
    reply: SessionReply,
    run: async ({ req, body }) => readSession(await signIn(req, body)),
  }),
  visitorRoute({
    method: 'delete',
    path: '/session',
    summary: 'Sign out',
    reply: Done,
    run: async ({ req }) => {
      await signOut(req);
      return { done: true as const };
    },
  }),
  ...(env.demo
    ? [
        visitorRoute({
          method: 'get',
          path: '/session/demo',
          summary: 'People of the demo club who can be signed in with one click (demo mode only)',
          reply: DemoPeople,
          run: async () => ({ people: await findDemoPeople() }),
        }),
        visitorRoute({
          method: 'post',
          path: '/session/demo',
          summary: 'Sign in as a person of the demo club (demo mode only)',
          body: DemoSignInBody,
          reply: SessionReply,
          run: async ({ req, body }) =>
            readSession(await signInAs(req, await findDemoAccount(body.email))),
        }),
      ]
    : []),
];
