import {
  estimateOf,
  packRequestOf,
  planInForce,
  shareRequestOf,
} from '#shared/domain/buys/requests.ts';
import type { SheetPledge } from '#shared/domain/buys/sheetTerms.ts';
import { planPacks } from '#shared/domain/packs/planPacks.ts';
import type { PackPlan } from '#shared/domain/packs/packTypes.ts';
import type { ShareRequest, ShareSheet } from '#shared/domain/shares/shareTypes.ts';
import { DomainProblem } from '../problem.ts';
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
 * @throws DomainProblem 409 `plan_infeasible`, or `wrong_state` when nobody would be left
 */
export function planWithout(
  book: OrderBook,
  memberIds: ReadonlySet<string>,
  override: Record<string, number> | null,
): Promise<NewEstimate> {
  const pledges = book.pledges.filter(({ membershipId }) => !memberIds.has(membershipId));
  if (pledges.length === 0) {
    throw new DomainProblem(
      409,
      'wrong_state',
      'Nobody would be left in this buy. Cancel it instead.',
    );
  }
  const computed = planPacks(packRequestOf(book.terms, pledges));
  const { plan } = planInForce(book.terms, pledges, computed, override);
  if (!plan.feasible) {
    throw new DomainProblem(
      409,
      'plan_infeasible',
      `Without them no order works: ${plan.reason ?? 'no packs fit.'} Vouch for them, reopen the buy or cancel it.`,
    );
  }
  return Promise.resolve({
    pledges,
    plan,
    request: shareRequestOf(book.terms, pledges, plan),
    sheet: estimateOf(book.terms, pledges, plan),
  });
}
