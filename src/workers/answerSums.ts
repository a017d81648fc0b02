import type { PackPlan } from '#shared/domain/packs/packTypes.ts';
import { sumsOfPlan, type SheetSums, type SumsGround } from '#shared/domain/buys/sheetSums.ts';

/** What the sums are asked of. `known`: the server's plan when it is for exactly these pledges. */
export type SumsRequest = SumsGround & { known: PackPlan | null; budgetMs: number };

/** The sums; the search for packs is only loaded with the first pledge that needs it. */
export async function answerSums({ known, budgetMs, ...ground }: SumsRequest): Promise<SheetSums> {
  if (known) return sumsOfPlan(ground, known);
  const { planSheetSums } = await import('#shared/domain/buys/planSheetSums.ts');
  return planSheetSums(ground, budgetMs);
}
