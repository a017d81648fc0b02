import { Worker } from 'node:worker_threads';
import type { PackPlan, PackRequest } from '#shared/domain/packs/packTypes.ts';
import type { PlanAnswer, PlanTask } from './planWorker.ts';

interface Waiting {
  resolve(plan: PackPlan): void;
  reject(error: Error): void;
}

/** One thread that plans, begun with the first task; it never keeps the process alive. */
class PlannerThread {
  #worker: Worker | undefined;
  #next = 1;
  readonly #waiting = new Map<number, Waiting>();

  #start(): Worker {
    const worker = new Worker(new URL('./planThread.mjs', import.meta.url), { execArgv: [] });
    worker.on('message', (answer: PlanAnswer) => {
      const waiting = this.#waiting.get(answer.id);
      this.#waiting.delete(answer.id);
      if (this.#waiting.size === 0) worker.unref();
      if ('plan' in answer) waiting?.resolve(answer.plan);
      else waiting?.reject(new Error(answer.error));
    });
    const failed = (error: Error) => {
      if (this.#worker === worker) this.#worker = undefined;
      for (const { reject } of this.#waiting.values()) reject(error);
      this.#waiting.clear();
    };
    worker.on('error', failed);
    worker.on('exit', (code) => failed(new Error(`the planning thread ended (${code})`)));
    this.#worker = worker;
    return worker;
  }

  plan(request: PackRequest, budgetMs?: number): Promise<PackPlan> {
    const worker = this.#worker ?? this.#start();
    const task: PlanTask = { id: this.#next, request, budgetMs };
    this.#next += 1;
    return new Promise((resolve, reject) => {
      this.#waiting.set(task.id, { resolve, reject });
      worker.ref();
      worker.postMessage(task);
    });
  }
}

// A search without a budget must not hold up the sheets that wait for theirs.
const forSheets = new PlannerThread();
const forLocks = new PlannerThread();

/** The best plan found within a budget, off the main thread. */
export const planWithin = (request: PackRequest, budgetMs: number): Promise<PackPlan> =>
  forSheets.plan(request, budgetMs);

/** The exact plan, however long it takes, off the main thread. */
export const planExactly = (request: PackRequest): Promise<PackPlan> => forLocks.plan(request);
