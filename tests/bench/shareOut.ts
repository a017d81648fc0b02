import { pathToFileURL } from 'node:url';
import { shareOut, type ChargeBasis, type ShareRequest } from '#shared/index.ts';
import { Dice } from '#tests/support/packRequests.ts';

/** One line of the benchmark report. */
export type ShareBench = {
  name: string;
  figures: Record<string, number | string>;
  ratio: number;
  target: string;
  ok: boolean;
};

const lines = 20;
const sizes = [50, 100, 200, 400, 800, 1600];
const target = 2.3;
const bases: ChargeBasis[] = ['mass', 'value', 'member', 'portion'];

/** Every member on about half the lines; one line in four has too little. */
function requestOf(members: number): ShareRequest {
  const dice = new Dice(members);
  const pledges = Array.from({ length: members }, (_, member) =>
    Array.from({ length: lines }, (_, line) => ({ member, line }))
      .filter(() => dice.chance(0.5))
      .map(({ line }) => {
        const wantedMg = dice.whole(1, 40) * 25_000;
        return {
          memberId: `member-${member}`,
          lineId: `line-${line}`,
          wantedMg,
          upToMg: wantedMg + dice.whole(0, 4) * 25_000,
          at: new Date(Date.UTC(2026, 2, 1) + dice.whole(0, 1e9)).toISOString(),
        };
      }),
  ).flat();
  return {
    currency: 'EUR',
    lines: Array.from({ length: lines }, (_, line) => ({
      id: `line-${line}`,
      availableMg: members * (line % 4 === 0 ? 180 : 300) * 1000,
      costMinor: members * (200 + 35 * line),
      taxRate: 0.19,
      stepMg: 1000,
      reserveMg: 1000,
      surplus: 'spread' as const,
      spreadMaxPermille: 100,
      shortage: line % 8 === 0 ? ('scale' as const) : ('queue' as const),
      shelfPays: false,
    })),
    pledges,
    charges: bases.map((basis) => ({ id: basis, amountMinor: members * 70, basis, taxRate: 0.19 })),
  };
}

/** Processor time, since a busy machine stretches the clock's and hits long runs harder. */
function bestMs(request: ShareRequest, runs: number): number {
  let best = Infinity;
  for (let i = 0; i < runs; i++) {
    const before = process.cpuUsage();
    shareOut(request);
    const { user, system } = process.cpuUsage(before);
    best = Math.min(best, (user + system) / 1000);
  }
  return best;
}

/** Processor time of `shareOut` as the club doubles, 20 lines: growth a doubling, best of many runs. */
export async function run(): Promise<ShareBench[]> {
  const requests = sizes.map(requestOf);
  for (const request of requests) bestMs(request, 5);
  const times = requests.map((request) => bestMs(request, 25));
  const steps = times.slice(1).map((ms, i) => ms / (times[i] ?? NaN));
  const ratio = ((times.at(-1) ?? NaN) / (times[0] ?? NaN)) ** (1 / steps.length);
  const hundredths = (value: number) => Math.round(value * 100) / 100;
  const figures = Object.fromEntries(
    sizes.map((members, i) => [`${members} members, ms`, hundredths(times[i] ?? NaN)]),
  );
  return [
    {
      name: 'shareOut, time when the members double',
      figures: { ...figures, 'steepest doubling': hundredths(Math.max(...steps)) },
      ratio,
      target: `at most ${target}`,
      ok: ratio <= target,
    },
  ];
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) {
  for (const line of await run()) console.log(JSON.stringify(line));
}
