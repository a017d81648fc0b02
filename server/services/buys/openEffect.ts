import { estimateOf, packRequestOf, planInForce } from '#shared/domain/buys/requests.ts';
import { planPacks } from '#shared/domain/packs/planPacks.ts';
import type { Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import { loadPledges, loadSheetTerms } from './loadSheetTerms.ts';

/** Long enough for nearly every plan, short enough to be waited for. */
const budgetMs = 250;

/** What everybody would pay if the buy locked now, in minor units. */
export interface OpenSums {
  readonly totalMinor: number;
  readonly byMember: ReadonlyMap<string, number>;
}

/** The sums of an open buy as its rows say now; null without pledges, or where no packs cover them. */
export async function openSums(buy: Buy, tx: Tx): Promise<OpenSums | null> {
  const terms = await loadSheetTerms(buy.id, tx);
  const pledges = await loadPledges(buy.id, tx);
  if (pledges.length === 0) return null;
  const computed = planPacks(packRequestOf(terms, pledges), budgetMs);
  const { plan } = planInForce(terms, pledges, computed, buy.planOverride);
  if (!plan.feasible) return null;
  const sheet = estimateOf(terms, pledges, plan);
  return {
    totalMinor: sheet.totalMinor,
    byMember: new Map(sheet.members.map(({ memberId, totalMinor }) => [memberId, totalMinor])),
  };
}
