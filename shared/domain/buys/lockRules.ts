import { formatMass } from '../mass/formatMass.ts';
import { minorToDecimal } from '../money/formatMoney.ts';
import { exactSum } from '../money/minor.ts';
import type { PackPlan } from '../packs/packTypes.ts';
import type { ShareSheet } from '../shares/shareTypes.ts';
import type { SheetPledge, SheetTerms } from './sheetTerms.ts';

/** Why a buy can't lock. */
export type LockBlock = {
  code: 'minimum_unmet' | 'plan_infeasible' | 'shelf_limit';
  text: string;
};

/** How far a buy is towards its minimum, in its own unit (mg, minor units or members). */
export function minimumReached(
  terms: Pick<SheetTerms, 'minimum'>,
  pledges: readonly SheetPledge[],
  goodsMinor: number,
): number {
  const wanted = pledges.filter(({ wantedMg }) => wantedMg > 0);
  switch (terms.minimum.kind) {
    case 'mass':
      return exactSum(
        wanted.map(({ wantedMg }) => wantedMg),
        'pledged',
      );
    case 'value':
      return goodsMinor;
    default:
      return new Set(wanted.map(({ membershipId }) => membershipId)).size;
  }
}

function sayAmount({ currency, minimum: { kind } }: SheetTerms, amount: number): string {
  if (kind === 'mass') return formatMass(amount);
  if (kind === 'value') return `${minorToDecimal(amount, currency)} ${currency} of goods`;
  return amount === 1 ? '1 member' : `${amount} members`;
}

/**
 * What keeps a buy from locking: nobody pledged, the minimum is not met, no plan covers the pledges, or the shelf's
 * part is above the limit. Empty: it may lock.
 */
export function lockBlocks(
  terms: SheetTerms,
  pledges: readonly SheetPledge[],
  plan: PackPlan,
  sheet: ShareSheet | null,
): LockBlock[] {
  if (!pledges.some(({ wantedMg }) => wantedMg > 0)) {
    return [{ code: 'minimum_unmet', text: 'Nobody has pledged anything yet.' }];
  }
  const blocks: LockBlock[] = [];
  const { kind, amount } = terms.minimum;
  const reached = minimumReached(terms, pledges, plan.goodsMinor);
  if (kind !== 'none' && reached < amount && (kind !== 'value' || plan.feasible)) {
    const text = `The minimum is ${sayAmount(terms, amount)}; so far it is ${sayAmount(terms, reached)}.`;
    blocks.push({ code: 'minimum_unmet', text });
  }
  if (!plan.feasible) {
    blocks.push({ code: 'plan_infeasible', text: plan.reason ?? 'No packs cover the pledges.' });
  }
  const shelfMinor = sheet?.shelf.totalMinor ?? 0;
  if (terms.leftOverPayer === 'shelf' && shelfMinor > terms.shelfLimitMinor) {
    const money = (minor: number) => `${minorToDecimal(minor, terms.currency)} ${terms.currency}`;
    blocks.push({
      code: 'shelf_limit',
      text: `The club would pay ${money(shelfMinor)} for what is left over; its limit is ${money(terms.shelfLimitMinor)}.`,
    });
  }
  return blocks;
}
