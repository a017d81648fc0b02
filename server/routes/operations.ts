import { Router } from 'express';
import { pool } from '../config/database.ts';
import { migrationNames } from '../config/migrate.ts';

/** Liveness and readiness for whoever runs the server; no session, no log line. */
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
  return router;
}
