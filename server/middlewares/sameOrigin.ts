import type { IncomingMessage } from 'node:http';
import type { RequestHandler } from 'express';
import { env } from '../config/runtime.ts';
import { DomainProblem } from '../services/problem.ts';

const safe = new Set(['GET', 'HEAD', 'OPTIONS']);
const exempt = [/^\/api\/v1\/webhooks\//, /^\/api\/v1\/unsubscribe\//];

/** Whether a request was made by a page of this very origin, by Fetch metadata and Origin. */
export function isSameOrigin(req: IncomingMessage): boolean {
  const site = req.headers['sec-fetch-site'];
  if (site !== undefined && site !== 'same-origin') return false;
  const origin = req.headers.origin;
  if (origin === undefined) return site === 'same-origin';
  try {
    const allowed = env.publicUrl ? new URL(env.publicUrl).host : undefined;
    const { host } = new URL(origin);
    return host === req.headers.host || host === allowed;
  } catch {
    return false;
  }
}

/** Refuses every write that another site's page could have sent; signed webhooks and one-click unsubscribes are exempt. */
export const sameOrigin: RequestHandler = (req, _res, next) => {
  if (
    safe.has(req.method) ||
    exempt.some((path) => path.test(req.originalUrl)) ||
    isSameOrigin(req)
  ) {
    next();
    return;
  }
  throw new DomainProblem(
    403,
    'foreign_origin',
    'This request did not come from a page of Tarewell.',
  );
};
