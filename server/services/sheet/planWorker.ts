import { parentPort } from 'node:worker_threads';
import { planPacks } from '#shared/domain/packs/planPacks.ts';
import type { PackPlan, PackRequest } from '#shared/domain/packs/packTypes.ts';

export interface PlanTask {
  readonly id: number;
  readonly request: PackRequest;
  readonly budgetMs: number | undefined;
}

export type PlanAnswer =
  | { readonly id: number; readonly plan: PackPlan }
  | { readonly id: number; readonly error: string };

parentPort?.on('message', ({ id, request, budgetMs }: PlanTask) => {
  let answer: PlanAnswer;
  try {
    answer = { id, plan: planPacks(request, budgetMs) };
  } catch (error) {
    answer = { id, error: error instanceof Error ? error.message : String(error) };
  }
  parentPort?.postMessage(answer);
});
