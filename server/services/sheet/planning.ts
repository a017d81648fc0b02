import { packRequestOf, planInForce } from '#shared/domain/buys/requests.ts';
import type pg from 'pg';
import { pool } from '../../config/database.ts';
import { logger } from '../../config/logger.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import { dropChosenPacks } from './choosePacks.ts';
import { loadPlanGround } from './planGround.ts';
import { planWithin } from './plannerThread.ts';

const budgetMs = 2_000;
const gatherMs = 60;
const mostRestMs = 1_000;

const rest = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));

/** Buys of this process that wait for a plan, one at a time, in turn. */
const waiting = new Set<string>();
let busy = false;

/** Plans for the newest version and stores it, unless it has its plan or a newer one came meanwhile. */
async function planNewest(buyId: string, client: pg.ClientBase): Promise<void> {
  const ground = await loadPlanGround(buyId, client);
  if (!ground || !['draft', 'open'].includes(ground.terms.state)) return;
  const { sheetVersion: forVersion, terms, pooled, chosen } = ground;
  if (ground.planVersion === forVersion) return;
  const plan = await planWithin(packRequestOf(terms, pooled), budgetMs);
  const { rowCount } = await client.query({
    name: 'store-plan',
    text: `update buys set plan = $2, plan_version = $3
      where id = $1 and state in ('draft', 'open') and coalesce(plan_version, -1) < $3`,
    values: [buyId, JSON.stringify(plan), forVersion],
  });
  if (rowCount === 1) publishToBuy(buyId, 'buy:plan', { buyId, forVersion, plan });
  if (chosen && !planInForce(terms, pooled, plan, chosen).overridden) {
    await dropChosenPacks(buyId, forVersion);
  }
}

/** Under the buy's advisory lock, so that one process plans it. The connection is the only one that planning takes. */
async function planOnce(buyId: string): Promise<void> {
  const client = await pool.connect();
  const key = [`plan:${buyId}`];
  try {
    const { rows } = await client.query<{ got: boolean }>(
      'select pg_try_advisory_lock(hashtextextended($1, 0)) as got',
      key,
    );
    // Whoever plans it now may have looked before this change: the sweep comes by each second.
    if (!rows[0]?.got) return;
    try {
      await planNewest(buyId, client);
    } finally {
      await client.query('select pg_advisory_unlock(hashtextextended($1, 0))', key);
    }
  } finally {
    client.release();
  }
}

async function planAll(): Promise<void> {
  for (const buyId of waiting) {
    // What comes in one go is planned once.
    await rest(gatherMs);
    waiting.delete(buyId);
    const began = performance.now();
    try {
      await planOnce(buyId);
    } catch (error) {
      logger.error({ err: error, buyId }, 'planning failed');
    }
    // Three quarters of the time are left to whoever pledges.
    await rest(Math.min(3 * (performance.now() - began), mostRestMs));
  }
}

/**
 * Asks for a new plan of a buy, after the commit that made the old one stale. Changes that come close together are
 * planned once; nobody waits for it.
 */
export function requestPlan(buyId: string): void {
  waiting.add(buyId);
  if (busy) return;
  busy = true;
  void planAll().finally(() => {
    busy = false;
  });
}

/** Asks for a plan wherever the newest version has none: what another process or a crash left behind. */
export async function requestMissingPlans(): Promise<void> {
  const { rows } = await pool.query<{ id: string }>({
    name: 'missing-plans',
    text: `select id from buys where state = 'open' and plan_version is distinct from sheet_version`,
  });
  rows.forEach(({ id }) => requestPlan(id));
}

/** Settles when this process plans nothing; for tests and for an orderly stop. */
export async function plansSettled(): Promise<void> {
  while (busy) await rest(5);
}
