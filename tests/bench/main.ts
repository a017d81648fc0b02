import type { BenchResult } from './ground.ts';

type Row = Omit<BenchResult, 'figures'> & { figures: string | Record<string, number | string> };

/** Each benchmark on its own, loaded when its turn comes, so that none warms another. */
const benches: Record<string, () => Promise<{ run(): Promise<Row[]> }>> = {
  sheet: () => import('./sheet.ts'),
  pledge: () => import('./pledge.ts'),
  fanout: () => import('./fanout.ts'),
  shareOut: () => import('./shareOut.ts'),
  planPacks: () => import('./planPacks.ts'),
  firstLoad: () => import('./firstLoad.ts'),
};

function words(figures: Row['figures']): string {
  return typeof figures === 'string'
    ? figures
    : Object.entries(figures)
        .map(([name, value]) => `${name} ${value}`)
        .join(', ');
}

const asked = process.argv.slice(2);
const unknown = asked.filter((name) => !(name in benches));
if (unknown.length > 0) {
  throw new Error(
    `No benchmark ${unknown.join(', ')}; there are ${Object.keys(benches).join(', ')}.`,
  );
}

let missed = 0;
for (const [name, load] of Object.entries(benches)) {
  if (asked.length > 0 && !asked.includes(name)) continue;
  for (const row of await (await load()).run()) {
    if (!row.ok) missed += 1;
    console.log(`${row.ok ? 'ok    ' : 'MISSED'} ${row.name}`);
    console.log(`       ratio ${row.ratio.toFixed(2)} (${row.target}); ${words(row.figures)}`);
  }
}
if (missed > 0) {
  console.log(`${missed} missed`);
  process.exitCode = 1;
}
