import connectPgSimple from 'connect-pg-simple';
import type { RequestHandler } from 'express';
import session from 'express-session';
import { pool } from '../config/database.ts';
import { env } from '../config/runtime.ts';

const days = 30;
const PgStore = connectPgSimple(session);

declare module 'express-session' {
  interface SessionData {
    renewedAt?: number;
  }
}

/** Sessions in PostgreSQL; the cookie is HttpOnly, SameSite=Lax, and Secure behind TLS. */
export const sessions = session({
  name: 'tarewell.sid',
  secret: env.sessionSecret,
  store: new PgStore({
    pool,
    tableName: 'session',
    createTableIfMissing: false,
    disableTouch: true,
  }),
  resave: false,
  saveUninitialized: false,
  rolling: false,
  cookie: {
    httpOnly: true,
    sameSite: 'lax',
    secure: env.behindTls,
    maxAge: days * 86_400_000,
    path: '/',
  },
});

/** Lengthens a session in use at most once an hour: a read must not cost a write. */
export const renewSession: RequestHandler = (req, _res, next) => {
  const now = Date.now();
  if (req.user && now - (req.session.renewedAt ?? 0) > 3_600_000) req.session.renewedAt = now;
  next();
};
