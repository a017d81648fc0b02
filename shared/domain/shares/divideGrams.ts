import { exactSum, roughSum } from '../money/minor.ts';
import { apportion } from './apportion.ts';
import type { Turn } from './checkShareRequest.ts';
import type { ShareLine, ShareStep } from './shareTypes.ts';

/**
 * Milligrams for each pledge in the given order, what the shelf keeps, and how a pledge's came about.
 */
export type DividedGrams = {
  mg: number[];
  shelfMg: number;
  explain(index: number): ShareStep[];
};

/** `apportion` in whole portion steps, capped at what the weights can take when `capped`. */
function apportionSteps(freeMg: number, takeMg: number[], stepMg: number, capped: boolean) {
  const takes = takeMg.map((mg) => mg / stepMg);
  const all = roughSum(takes);
  const free = Math.floor(freeMg / stepMg);
  const total = all === 0 ? 0 : capped ? Math.min(free, all) : free;
  return apportion(total, takes).map((steps) => steps * stepMg);
}

/** One round of giving what is to spare. */
type Round = { code: string; takeMg: number[]; extraMg: number[]; ofMg: number; freeMg: number };

function divideEnough(line: ShareLine, pledges: Turn[], wantedMg: number): DividedGrams {
  const { id: lineId, stepMg, availableMg, spreadMaxPermille } = line;
  const mg = pledges.map((pledge) => pledge.wantedMg);
  const rounds: Round[] = [];
  let freeMg = Math.max(0, availableMg - wantedMg - (line.reserveMg ?? 0));
  freeMg -= freeMg % stepMg;

  const give = (code: string, takeMg: number[], capped: boolean) => {
    if (freeMg === 0) return;
    const extraMg = apportionSteps(freeMg, takeMg, stepMg, capped);
    rounds.push({ code, takeMg, extraMg, ofMg: roughSum(takeMg), freeMg });
    extraMg.forEach((extra, index) => {
      mg[index] = (mg[index] ?? 0) + extra;
      freeMg -= extra;
    });
  };

  give(
    'upTo',
    pledges.map((pledge) => Math.max(0, (pledge.upToMg ?? 0) - pledge.wantedMg)),
    true,
  );
  if (line.surplus === 'spread') {
    const wanted = pledges.map((pledge) => pledge.wantedMg);
    if (spreadMaxPermille === undefined) give('spread', wanted, false);
    else give('spreadCapped', capsMg(wanted, spreadMaxPermille, stepMg), true);
  }
  const explain = (index: number): ShareStep[] => {
    const values = { lineId, mg: pledges[index]?.wantedMg ?? 0 };
    const steps: ShareStep[] = [{ code: 'wanted', values }];
    for (const { code, takeMg, extraMg, ofMg, freeMg: free } of rounds) {
      const take = takeMg[index] ?? 0;
      if (take === 0) continue;
      const given = { lineId, mg: extraMg[index] ?? 0, takeMg: take, ofMg, freeMg: free };
      steps.push({ code, values: given });
    }
    return steps;
  };
  return { mg, shelfMg: availableMg - exactSum(mg, 'mg'), explain };
}

function capsMg(wantedMg: number[], permille: number, stepMg: number): number[] {
  return wantedMg.map((mg) => {
    const cap = (BigInt(mg) * BigInt(permille)) / (1000n * BigInt(stepMg));
    return Number(cap) * stepMg;
  });
}

function divideScaled(line: ShareLine, pledges: Turn[], wantedAllMg: number): DividedGrams {
  const { id: lineId, stepMg, availableMg } = line;
  const wanted = pledges.map((pledge) => pledge.wantedMg);
  const mg = apportionSteps(availableMg, wanted, stepMg, true);
  const explain = (index: number): ShareStep[] => {
    const [got, wantedMg] = [mg[index] ?? 0, wanted[index] ?? 0];
    return [{ code: 'scaled', values: { lineId, mg: got, wantedMg, wantedAllMg, availableMg } }];
  };
  return { mg, shelfMg: availableMg - exactSum(mg, 'mg'), explain };
}

function divideQueued(line: ShareLine, pledges: Turn[]): DividedGrams {
  const { id: lineId, stepMg, availableMg } = line;
  let leftMg = availableMg - (availableMg % stepMg);
  const before: number[] = [];
  const mg = pledges.map(({ wantedMg }) => {
    before.push(leftMg);
    const got = Math.min(wantedMg, leftMg);
    leftMg -= got;
    return got;
  });
  const explain = (index: number): ShareStep[] => {
    const wantedMg = pledges[index]?.wantedMg ?? 0;
    const values = { lineId, mg: mg[index] ?? 0, wantedMg, leftMg: before[index] ?? 0 };
    return [{ code: 'queued', values }];
  };
  return { mg, shelfMg: availableMg - exactSum(mg, 'mg'), explain };
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
