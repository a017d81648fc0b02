import { lockBlocks } from '#shared/domain/buys/lockRules.ts';
import { packRequestOf, planInForce, shareRequestOf } from '#shared/domain/buys/requests.ts';
import type { SheetPledge } from '#shared/domain/buys/sheetTerms.ts';
import type { PackPlan } from '#shared/domain/packs/packTypes.ts';
import { shareOut } from '#shared/domain/shares/shareOut.ts';
import type { ShareRequest, ShareSheet } from '#shared/domain/shares/shareTypes.ts';
import { DomainProblem, wrongState } from '../problem.ts';
import { planExactly } from '../sheet/plannerThread.ts';
import type { OrderBook } from './orderBook.ts';

/** A new estimate, for those who stay. */
export interface NewEstimate {
  readonly pledges: readonly SheetPledge[];
  readonly plan: PackPlan;
  readonly request: ShareRequest;
  readonly sheet: ShareSheet;
}

/**
 * The plan and the shares anew without some members, at the locked terms. Runs to the end: call it outside of a
 * transaction.
 * @throws DomainProblem 409 `plan_infeasible` or `shelf_limit`, or `wrong_state` when nobody would be left
 */
export async function planWithout(
  book: OrderBook,
  memberIds: ReadonlySet<string>,
  override: Record<string, number> | null,
): Promise<NewEstimate> {
  const pledges = book.pledges.filter(({ membershipId }) => !memberIds.has(membershipId));
  if (pledges.length === 0) {
    throw wrongState('Nobody would be left in this buy. Cancel it instead.');
  }
  const computed = await planExactly(packRequestOf(book.terms, pledges));
  const { plan } = planInForce(book.terms, pledges, computed, override);
  const request = shareRequestOf(book.terms, pledges, plan);
  const sheet = plan.feasible ? shareOut(request) : null;
  // The minimum was met at the lock and is not asked for again.
  const block = lockBlocks(book.terms, pledges, plan, sheet).find(
    ({ code }) => code !== 'minimum_unmet',
  );
  if (block || !sheet) {
    throw new DomainProblem(
      409,
      block?.code ?? 'plan_infeasible',
      `Without them the order doesn't work: ${block?.text ?? 'no packs fit.'} Vouch for them, reopen the buy or cancel it.`,
    );
  }
  return { pledges, plan, request, sheet };
}
