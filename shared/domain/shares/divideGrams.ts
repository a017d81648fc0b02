import { exactSum, roughSum } from '../money/minor.ts';
import { apportion } from './apportion.ts';
import type { Turn } from './checkShareRequest.ts';
import type { ShareLine, ShareStep } from './shareTypes.ts';

/** Milligrams for each pledge in the given order, what the shelf keeps, and how it came about. */
export type DividedGrams = { mg: number[]; shelfMg: number; steps: ShareStep[][] };

/** `apportion` in whole portion steps, capped at what the weights can take when `capped`. */
function apportionSteps(freeMg: number, takeMg: number[], stepMg: number, capped: boolean) {
  const takes = takeMg.map((mg) => mg / stepMg);
  const all = roughSum(takes);
  const free = Math.floor(freeMg / stepMg);
  const total = all === 0 ? 0 : capped ? Math.min(free, all) : free;
  return apportion(total, takes).map((steps) => steps * stepMg);
}

function divideEnough(line: ShareLine, pledges: Turn[], wantedMg: number): DividedGrams {
  const { stepMg, availableMg, spreadMaxPermille } = line;
  const mg = pledges.map((pledge) => pledge.wantedMg);
  const steps: ShareStep[][] = pledges.map((pledge) => [
    { code: 'wanted', values: { lineId: line.id, mg: pledge.wantedMg } },
  ]);
  let freeMg = Math.max(0, availableMg - wantedMg - (line.reserveMg ?? 0));
  freeMg -= freeMg % stepMg;

  const give = (code: string, takeMg: number[], capped: boolean) => {
    const extra = apportionSteps(freeMg, takeMg, stepMg, capped);
    const ofMg = roughSum(takeMg);
    extra.forEach((extraMg, index) => {
      const take = takeMg[index] ?? 0;
      if (take === 0 || freeMg === 0) return;
      mg[index] = (mg[index] ?? 0) + extraMg;
      const values = { lineId: line.id, mg: extraMg, takeMg: take, ofMg, freeMg };
      steps[index]?.push({ code, values });
    });
    freeMg -= exactSum(extra, 'extra');
  };

  const rooms = pledges.map((p) => Math.max(0, (p.upToMg ?? 0) - p.wantedMg));
  give('upTo', rooms, true);
  if (line.surplus === 'spread') {
    const wanted = pledges.map((pledge) => pledge.wantedMg);
    if (spreadMaxPermille === undefined) give('spread', wanted, false);
    else give('spreadCapped', capsMg(wanted, spreadMaxPermille, stepMg), true);
  }
  return { mg, shelfMg: availableMg - exactSum(mg, 'mg'), steps };
}

function capsMg(wantedMg: number[], permille: number, stepMg: number): number[] {
  return wantedMg.map((mg) => {
    const cap = (BigInt(mg) * BigInt(permille)) / (1000n * BigInt(stepMg));
    return Number(cap) * stepMg;
  });
}

function divideScaled(line: ShareLine, pledges: Turn[], wantedAllMg: number): DividedGrams {
  const { stepMg, availableMg } = line;
  const wanted = pledges.map((pledge) => pledge.wantedMg);
  const mg = apportionSteps(availableMg, wanted, stepMg, true);
  const steps = pledges.map(({ wantedMg }, index): ShareStep[] => {
    const values = { lineId: line.id, mg: mg[index] ?? 0, wantedMg, wantedAllMg, availableMg };
    return [{ code: 'scaled', values }];
  });
  return { mg, shelfMg: availableMg - exactSum(mg, 'mg'), steps };
}

function divideQueued(line: ShareLine, pledges: Turn[]): DividedGrams {
  const { stepMg, availableMg } = line;
  let leftMg = availableMg - (availableMg % stepMg);
  const steps: ShareStep[][] = [];
  const mg = pledges.map(({ wantedMg }) => {
    const got = Math.min(wantedMg, leftMg);
    steps.push([{ code: 'queued', values: { lineId: line.id, mg: got, wantedMg, leftMg } }]);
    leftMg -= got;
    return got;
  });
  return { mg, shelfMg: availableMg - exactSum(mg, 'mg'), steps };
}

/**
 * Divides a line's grams among its pledges: `wanted` first, then room up to `upTo`, then the spread;
 * in a shortage scaled or by the queue. What is left over is the shelf's, the reserve included.
 *
 * @param pledges in their order, see `compareTurns`
 */
export function divideGrams(line: ShareLine, pledges: Turn[]): DividedGrams {
  const wantedMg = roughSum(pledges.map((pledge) => pledge.wantedMg));
  if (wantedMg <= line.availableMg) return divideEnough(line, pledges, wantedMg);
  return line.shortage === 'scale'
    ? divideScaled(line, pledges, wantedMg)
    : divideQueued(line, pledges);
}
