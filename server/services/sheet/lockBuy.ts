import type { BuyHeader } from '#shared/schemas/buys.ts';
import type { Tx } from '../../config/database.ts';
import { transact } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { readBuyHeaderAgain } from '../buys/readBuys.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { DomainProblem, wrongState } from '../problem.ts';
import { prepareLock, type PreparedLock } from './prepareLock.ts';
import { writeLock } from './writeLock.ts';

/** A sheet under many hands may change while its exact plan is computed: it is computed again this often. */
export const mostTries = 20;

/**
 * Runs `act` under the buy's lock with sums prepared for exactly the version found there, preparing them anew as often
 * as somebody was quicker.
 * @param look a first look under the lock; false ends it without an act
 */
export async function withPreparedLock(
  buyId: string,
  look: (buy: Buy, tx: Tx) => Promise<boolean>,
  act: (buy: Buy, prepared: PreparedLock, tx: Tx) => Promise<void>,
): Promise<'done' | 'left' | 'restless'> {
  for (let tries = 0; tries < mostTries; tries += 1) {
    const prepared = await prepareLock(buyId);
    const outcome = await transact(async (tx) => {
      const buy = await Buy.lock(buyId, tx);
      if (!(await look(buy, tx))) return 'left';
      if (buy.sheetVersion !== prepared.sheetVersion) return 'again';
      await act(buy, prepared, tx);
      return 'done';
    });
    if (outcome !== 'again') return outcome;
  }
  return 'restless';
}

/**
 * Locks an open buy now, once: minimum met, exact plan feasible, the shelf's part within its limit.
 * @throws DomainProblem 409 `stale`, `wrong_state`, `minimum_unmet`, `plan_infeasible` or `shelf_limit`
 */
export async function lockBuy(actor: BuyActor, termsVersion: number): Promise<BuyHeader> {
  const buyId = actor.buy.id;
  // Refuses what is stale before anything is computed.
  await withBuy(buyId, { states: ['open'], termsVersion }, () => Promise.resolve());
  const outcome = await withPreparedLock(
    buyId,
    (buy) => {
      if (buy.state !== 'open') {
        throw wrongState(`This can't be done while the buy is ${buy.state}.`, { state: buy.state });
      }
      return Promise.resolve(true);
    },
    async (buy, prepared, tx) => {
      const [block] = prepared.blocks;
      const { sheet } = prepared;
      if (block || !sheet) {
        const text = prepared.blocks.map((one) => one.text).join(' ');
        throw new DomainProblem(409, block?.code ?? 'plan_infeasible', text);
      }
      await writeLock(buy, { ...prepared, sheet }, byActor(actor), tx);
    },
  );
  if (outcome === 'restless') {
    throw wrongState(
      'Pledges kept changing while the plan was made. Nothing was locked; try again.',
    );
  }
  return readBuyHeaderAgain(actor, buyId);
}
