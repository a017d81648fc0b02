import connectPgSimple from 'connect-pg-simple';
import type { RequestHandler } from 'express';
import session from 'express-session';
import { pool } from '../config/database.ts';
import { env } from '../config/runtime.ts';

const lifeMs = 30 * 86_400_000;
const PgStore = connectPgSimple(session);

declare module 'express-session' {
  interface SessionData {
    renewedAt?: number;
  }
}

/** A store in which a request that was on its way can't bring back a session that was ended meanwhile. */
class LastingStore extends PgStore {
  /** The one query that every request makes: prepared, so that it is planned once a connection. */
  override get(
    sid: string,
    done: (error: unknown, data?: session.SessionData | null) => void,
  ): void {
    pool
      .query<{ sess: session.SessionData }>({
        name: 'session-get',
        text: 'select sess from session where sid = $1 and expire >= to_timestamp($2)',
        values: [sid, Math.floor(Date.now() / 1000)],
      })
      .then(
        ({ rows }) => done(null, rows[0]?.sess ?? null),
        (error: unknown) => done(error),
      );
  }

  override set(sid: string, data: session.SessionData, done?: (error?: unknown) => void): void {
    // Signing in writes the row first and names `renewedAt` after: from then on there is only an update.
    if (data.renewedAt === undefined) {
      super.set(sid, data, done);
      return;
    }
    pool
      .query('update session set sess = $2, expire = to_timestamp($3) where sid = $1', [
        sid,
        JSON.stringify(data),
        Math.ceil(new Date(data.cookie.expires ?? Date.now() + lifeMs).getTime() / 1000),
      ])
      .then(
        () => done?.(),
        (error: unknown) => done?.(error),
      );
  }
}

/** Sessions in PostgreSQL; the cookie is HttpOnly, SameSite=Lax, and Secure behind TLS. */
export const sessions = session({
  name: 'tarewell.sid',
  secret: env.sessionSecret,
  store: new LastingStore({
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
    maxAge: lifeMs,
    path: '/',
  },
});

/** Lengthens a session in use at most once an hour: a read must not cost a write. */
export const renewSession: RequestHandler = (req, _res, next) => {
  const now = Date.now();
  if (req.user && now - (req.session.renewedAt ?? 0) > 3_600_000) req.session.renewedAt = now;
  next();
};
