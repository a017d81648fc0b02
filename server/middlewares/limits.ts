import type { Request, RequestHandler } from 'express';
import { rateLimit, type ClientRateLimitInfo, type Store } from 'express-rate-limit';
import { pool } from '../config/database.ts';
import { DomainProblem } from '../services/problem.ts';

/** Counts in PostgreSQL, so that several processes limit together. */
class DatabaseStore implements Store {
  localKeys = false;
  private readonly windowSeconds: number;

  constructor(
    readonly prefix: string,
    windowMs: number,
  ) {
    this.windowSeconds = windowMs / 1000;
  }

  async increment(key: string): Promise<ClientRateLimitInfo> {
    const { rows } = await pool.query<{ hits: number; resets_at: Date }>(
      `insert into rate_limits as r (key, hits, resets_at)
        values ($1, 1, now() + make_interval(secs => $2))
        on conflict (key) do update set
          hits = case when r.resets_at <= now() then 1 else r.hits + 1 end,
          resets_at = case when r.resets_at <= now() then excluded.resets_at else r.resets_at end
        returning hits, resets_at`,
      [`${this.prefix}${key}`, this.windowSeconds],
    );
    const row = rows[0];
    if (!row) throw new Error('rate limit row missing');
    return { totalHits: row.hits, resetTime: row.resets_at };
  }

  async decrement(key: string): Promise<void> {
    await pool.query('update rate_limits set hits = greatest(hits - 1, 0) where key = $1', [
      `${this.prefix}${key}`,
    ]);
  }

  async resetKey(key: string): Promise<void> {
    await pool.query('delete from rate_limits where key = $1', [`${this.prefix}${key}`]);
  }
}

/** A limit on how often one key may call; over it the reply is 429 with Retry-After. */
export function limit(options: {
  name: string;
  windowMs: number;
  max: number;
  key: (req: Request) => string;
  /** Count only calls that were refused, e.g. wrong passwords. */
  failuresOnly?: boolean;
}): RequestHandler {
  return rateLimit({
    windowMs: options.windowMs,
    limit: options.max,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    skipSuccessfulRequests: options.failuresOnly ?? false,
    keyGenerator: options.key,
    store: new DatabaseStore(`${options.name}:`, options.windowMs),
    validate: { keyGeneratorIpFallback: false },
    handler: (_req, _res, next) => {
      next(
        new DomainProblem(429, 'too_many', 'Too many tries. Wait a few minutes, then try again.'),
      );
    },
  });
}
