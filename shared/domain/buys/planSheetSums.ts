import { planPacks } from '../packs/planPacks.ts';
import { packRequestOf } from './requests.ts';
import { sumsOfPlan, type SheetSums, type SumsGround } from './sheetSums.ts';

/** Plans within so many milliseconds, then shares out: the sums of pledges whose plan the server hasn't told yet. */
export function planSheetSums(ground: SumsGround, budgetMs: number): SheetSums {
  return sumsOfPlan(ground, planPacks(packRequestOf(ground.terms, ground.pledges), budgetMs));
}
