import { lockBlocks, type LockBlock } from '#shared/domain/buys/lockRules.ts';
import { packRequestOf, planInForce, shareRequestOf } from '#shared/domain/buys/requests.ts';
import type { SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import type { PackPlan } from '#shared/domain/packs/packTypes.ts';
import { shareOut } from '#shared/domain/shares/shareOut.ts';
import type { ShareRequest, ShareSheet } from '#shared/domain/shares/shareTypes.ts';
import { notFound } from '../problem.ts';
import { planExactly } from './plannerThread.ts';
import { loadSheetRow } from './sheetRow.ts';

/** The sums a buy would lock with at one version of its sheet, or what keeps it from locking. */
export interface PreparedLock {
  readonly sheetVersion: number;
  readonly terms: SheetTerms;
  readonly plan: PackPlan;
  readonly request: ShareRequest;
  readonly sheet: ShareSheet | null;
  readonly blocks: LockBlock[];
}

/** Computes the exact plan and everybody's share before any lock is taken; the caller compares versions under it. */
export async function prepareLock(buyId: string): Promise<PreparedLock> {
  const row = await loadSheetRow(buyId);
  if (!row) throw notFound('This buy');
  const { terms, pledges, sheetVersion } = row;
  const computed = await planExactly(packRequestOf(terms, pledges));
  const { plan } = planInForce(terms, pledges, computed, row.planOverride);
  const request = shareRequestOf(terms, pledges, plan);
  const sheet = plan.feasible ? shareOut(request) : null;
  const blocks = lockBlocks(terms, pledges, plan, sheet);
  return { sheetVersion, terms, plan, request, sheet, blocks };
}
