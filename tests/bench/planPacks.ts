import { pathToFileURL } from 'node:url';
import { planPacks } from '#shared/index.ts';
import { glpsol, packModelLp } from '#tests/support/glpsol.ts';
import { clubRequest, Dice } from '#tests/support/packRequests.ts';

/** One line of the benchmark report. */
export type PlanBench = {
  name: string;
  figures: Record<string, number | string>;
  ratio: number;
  target: string;
  ok: boolean;
};

const size = { lines: 20, offersPerLine: 6, suppliers: 3 };
const requests = 100;
const p95TargetMs = 300;
const stopMs = 2000;
const timesFaster = 5;
const glpsolSeconds = 10;

function quantile(sorted: number[], share: number): number {
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? NaN;
}

function timed(work: () => void): number {
  const started = performance.now();
  work();
  return performance.now() - started;
}

const rounded = (ms: number) => Math.round(ms * 10) / 10;

/** What glpsol needs to start and end, on a model of one variable. */
function startUpMs(): number {
  const trivial = 'Minimize\n cost: x\nSubject To\n r: x >= 1\nEnd\n';
  const runs = Array.from({ length: 9 }, () => glpsol(trivial, 'lp').ms);
  return quantile(
    runs.sort((a, b) => a - b),
    0.5,
  );
}

/**
 * Plans with their next step at 20 lines x 6 offers x 3 suppliers over 100 random club requests, and
 * the same models' cost alone by `glpsol --cuts`, its start-up taken off.
 */
export async function run(): Promise<PlanBench[]> {
  const asked = Array.from({ length: requests }, (_, seed) => clubRequest(new Dice(seed), size));
  for (let seed = 1000; seed < 1010; seed++) planPacks(clubRequest(new Dice(seed), size), stopMs);

  let inexact = 0;
  const plans = asked.map((request) =>
    timed(() => {
      if (!planPacks(request, stopMs).exact) inexact++;
    }),
  );
  const startUp = startUpMs();
  let unproven = 0;
  const solves = asked.map((request) => {
    const solved = glpsol(packModelLp(request), 'lp', { seconds: glpsolSeconds });
    if (solved.status !== 'INTEGER OPTIMAL') unproven++;
    return Math.max(0, solved.ms - startUp);
  });
  const [ours, theirs] = [plans, solves].map((times) => times.sort((a, b) => a - b)) as [
    number[],
    number[],
  ];
  const p95 = quantile(ours, 0.95);
  const ratio = quantile(theirs, 0.5) / quantile(ours, 0.5);
  return [
    {
      name: 'planPacks with next step, 20 x 6 x 3',
      figures: {
        'p50 ms': rounded(quantile(ours, 0.5)),
        'p95 ms': rounded(p95),
        'worst ms': rounded(quantile(ours, 1)),
        inexact,
      },
      ratio: p95 / p95TargetMs,
      target: `p95 under ${p95TargetMs} ms`,
      ok: p95 < p95TargetMs,
    },
    {
      name: 'glpsol --cuts against planPacks, median',
      figures: {
        'p50 ms': rounded(quantile(theirs, 0.5)),
        'p95 ms': rounded(quantile(theirs, 0.95)),
        'worst ms': rounded(quantile(theirs, 1)),
        [`unproven in ${glpsolSeconds} s`]: unproven,
        'start-up taken off, ms': rounded(startUp),
      },
      ratio,
      target: `at least ${timesFaster} times`,
      ok: ratio >= timesFaster,
    },
  ];
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) {
  for (const line of await run()) console.log(JSON.stringify(line));
}
