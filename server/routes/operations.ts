import { timingSafeEqual } from 'node:crypto';
import { Router, type Request } from 'express';
import { isLoopback } from '../config/env.ts';
import { pool } from '../config/database.ts';
import { mailsQueued, metrics } from '../config/metrics.ts';
import { migrationNames } from '../config/migrate.ts';
import { env } from '../config/runtime.ts';

function mayReadMetrics(req: Request): boolean {
  const given = Buffer.from(req.headers.authorization ?? '');
  const wanted = Buffer.from(`Bearer ${env.metricsToken ?? ''}`);
  if (env.metricsToken && given.length === wanted.length && timingSafeEqual(given, wanted))
    return true;
  // Behind a proxy everyone comes from loopback, so there only the token counts.
  const address = (req.socket.remoteAddress ?? '').replace(/^::ffff:/, '');
  return isLoopback(address) && !env.publicUrl && req.headers['x-forwarded-for'] === undefined;
}

/** Liveness, readiness and metrics for whoever runs the server; no session, no log line. */
export function operationsRouter(): Router {
  const router = Router();
  router.get('/healthz', (_req, res) => {
    res.json({ status: 'ok' });
  });
  router.get('/readyz', async (_req, res) => {
    try {
      const { rows } = await pool.query<{ name: string }>('select name from schema_migrations');
      const applied = new Set(rows.map(({ name }) => name));
      const waiting = (await migrationNames()).filter((name) => !applied.has(name));
      if (waiting.length > 0) res.status(503).json({ status: 'migrating', waiting });
      else res.json({ status: 'ready' });
    } catch {
      res.status(503).json({ status: 'no database' });
    }
  });
  router.get('/metrics', async (req, res) => {
    if (!mayReadMetrics(req)) {
      res.status(404).json({ status: 'not found' });
      return;
    }
    const { rows } = await pool.query<{ state: string; count: number }>(
      'select state, count(*)::int as count from outbox group by state',
    );
    mailsQueued.reset();
    for (const { state, count } of rows) mailsQueued.set({ state }, count);
    res.type(metrics.contentType).send(await metrics.metrics());
  });
  return router;
}
