import { packRequestOf, planInForce } from '#shared/domain/buys/requests.ts';
import type { PackPlan } from '#shared/domain/packs/packTypes.ts';
import { pool } from '../../config/database.ts';
import { logger } from '../../config/logger.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import { dropChosenPacks } from './choosePacks.ts';
import { planWithin } from './plannerThread.ts';
import { loadPlanGround } from './planGround.ts';

const budgetMs = 2_000;
const gatherMs = 25;
const mostRestMs = 500;
const mostRounds = 50;

const rest = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));

/** Buys being planned by this process; `true`: something changed meanwhile. */
const planning = new Map<string, boolean>();

async function store(buyId: string, forVersion: number, plan: PackPlan): Promise<boolean> {
  const { rowCount } = await pool.query({
    name: 'store-plan',
    text: `update buys set plan = $2, plan_version = $3
      where id = $1 and state in ('draft', 'open') and coalesce(plan_version, -1) < $3`,
    values: [buyId, JSON.stringify(plan), forVersion],
  });
  return rowCount === 1;
}

/** Plans for the newest version; false when there was nothing to plan. */
async function planNewest(buyId: string): Promise<boolean> {
  const ground = await loadPlanGround(buyId);
  if (!ground || !['draft', 'open'].includes(ground.terms.state)) return false;
  const { sheetVersion: forVersion, terms, pooled, chosen } = ground;
  if (ground.planVersion === forVersion) return false;
  const plan = await planWithin(packRequestOf(terms, pooled), budgetMs);
  if (chosen && !planInForce(terms, pooled, plan, chosen).overridden) {
    await dropChosenPacks(buyId, forVersion);
  }
  if (await store(buyId, forVersion, plan)) {
    publishToBuy(buyId, 'buy:plan', { buyId, forVersion, plan });
  }
  return true;
}

/** Holds the buy's advisory lock, so that one process plans it, and goes on until the newest version has its plan. */
async function planUntilNewest(buyId: string): Promise<void> {
  const client = await pool.connect();
  const key = `plan:${buyId}`;
  try {
    const { rows } = await client.query<{ got: boolean }>(
      'select pg_try_advisory_lock(hashtextextended($1, 0)) as got',
      [key],
    );
    // Whoever plans it now may have looked before this change: the sweep comes by each second.
    if (!rows[0]?.got) return;
    try {
      for (let round = 0; round < mostRounds; round += 1) {
        planning.set(buyId, false);
        const began = performance.now();
        const planned = await planNewest(buyId);
        if (!planned && !planning.get(buyId)) return;
        // Half of the time is left to whoever pledges; what comes meanwhile is planned together.
        await rest(Math.min(performance.now() - began, mostRestMs));
      }
    } finally {
      await client.query('select pg_advisory_unlock(hashtextextended($1, 0))', [key]);
    }
  } finally {
    client.release();
  }
}

/**
 * Asks for a new plan of a buy, after the commit that made the old one stale. Changes that come close together are
 * planned once; nobody waits for it.
 */
export function requestPlan(buyId: string): void {
  if (planning.has(buyId)) {
    planning.set(buyId, true);
    return;
  }
  planning.set(buyId, true);
  setTimeout(() => {
    planUntilNewest(buyId)
      .catch((error: unknown) => logger.error({ err: error, buyId }, 'planning failed'))
      .finally(() => planning.delete(buyId));
  }, gatherMs);
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
  while (planning.size > 0) await new Promise((resolve) => setTimeout(resolve, 10));
}
