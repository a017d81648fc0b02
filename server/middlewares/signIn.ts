import type { Request } from 'express';
import type { SignInBody } from '#shared/schemas/session.ts';
import { passport } from '../config/passport.ts';
import { findAccountActor, type AccountActor } from '../services/actors.ts';
import { DomainProblem } from '../services/problem.ts';
import { disconnectSession } from '../sockets/publish.ts';

function authenticate(req: Request, body: SignInBody): Promise<Express.User | false> {
  return new Promise((resolve, reject) => {
    const check = passport.authenticate('local', (error: unknown, user: Express.User | false) => {
      if (error) reject(error as Error);
      else resolve(user);
    }) as (req: Request, res: unknown, next: (error?: unknown) => void) => void;
    req.body = body;
    check(req, undefined, (error) => reject(error as Error));
  });
}

/** Begins a session under a new id for an account. */
export async function signInAs(req: Request, accountId: string): Promise<AccountActor> {
  await new Promise<void>((resolve, reject) => {
    req.logIn({ id: accountId }, (error?: Error) => (error ? reject(error) : resolve()));
  });
  req.session.renewedAt = Date.now();
  const actor = await findAccountActor(accountId, String(req.id));
  if (!actor) throw new DomainProblem(401, 'signed_out', 'Sign in first.');
  return actor;
}

/**
 * Signs in with address and password.
 * @throws DomainProblem 401 `wrong_password`, the same whether the account exists or not
 */
export async function signIn(req: Request, body: SignInBody): Promise<AccountActor> {
  const user = await authenticate(req, body);
  if (!user) {
    throw new DomainProblem(401, 'wrong_password', 'That address and password do not go together.');
  }
  return signInAs(req, user.id);
}

/** Ends this session, here and in the database, with its sockets. */
export async function signOut(req: Request): Promise<void> {
  const { sessionID } = req;
  await new Promise<void>((resolve, reject) => {
    req.session.destroy((error?: Error) => (error ? reject(error) : resolve()));
  });
  disconnectSession(sessionID);
}
