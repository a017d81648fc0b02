import passport from 'passport';
import { Strategy } from 'passport-local';
import { verifyPassword } from '../services/accounts/passwords.ts';
import { Account } from '../models/Account.ts';

declare global {
  // eslint-disable-next-line @typescript-eslint/no-namespace -- the one way to type passport's user
  namespace Express {
    interface User {
      id: string;
    }
    interface Request {
      id: string;
    }
  }
}

passport.use(
  new Strategy({ usernameField: 'email' }, (email, password, done) => {
    Account.findByEmail(email)
      .then(async (account) => {
        const right = await verifyPassword(account?.passwordHash, password);
        done(null, account && right ? { id: account.id } : false);
      })
      .catch(done);
  }),
);

// The session holds the id alone; who that is gets read with the route's own lookup.
passport.serializeUser((user, done) => done(null, user.id));
passport.deserializeUser((id: string, done) => done(null, { id }));

export { passport };
