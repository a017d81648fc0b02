import { pathToFileURL } from 'node:url';
import autocannon from 'autocannon';
import pg from 'pg';
import { median, withGround, type BenchResult } from './ground.ts';

const size = { members: 200, lines: 20 };
const rounds = 5;
const seconds = 3;
const connections = 20;
const target = 0.6;

async function perSecond(url: string, headers: Record<string, string> = {}): Promise<number> {
  const result = await autocannon({ url, connections, duration: seconds, headers });
  if (result.non2xx > 0 || result.errors > 0) throw new Error(`${url}: ${result.non2xx} refused`);
  return result.requests.average;
}

async function keepBytes(databaseUrl: string, body: string): Promise<void> {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  await client.query('create table bench_sheet (id integer primary key, body text not null)');
  await client.query('insert into bench_sheet values (1, $1)', [body]);
  await client.end();
}

/**
 * Reading a sheet of 200 members and 20 lines, session and policy included, against a bare Express handler that sends
 * the same bytes from one query; rounds take turns.
 */
export async function run(): Promise<BenchResult[]> {
  return withGround(size, async ({ seeded, databaseUrl, origin, bare, signIn }) => {
    const cookie = await signIn(seeded.members[1]?.email ?? '');
    const ours = `${origin}/api/v1/clubs/${seeded.slug}/buys/${seeded.buyId}/sheet`;
    // The plan comes by itself; afterwards the sheet stays as it is.
    const read = async () => (await fetch(ours, { headers: { Cookie: cookie } })).text();
    for (let tries = 0; tries < 50 && (await read()).includes('"plan":null'); tries += 1) {
      await new Promise((resolve) => setTimeout(resolve, 200));
    }
    const body = await read();
    await keepBytes(databaseUrl, body);
    const theirs = `${await bare('bareServer.ts')}/sheet`;
    const speeds = { ours: [] as number[], theirs: [] as number[] };
    await perSecond(ours, { Cookie: cookie });
    await perSecond(theirs);
    for (let round = 0; round < rounds; round += 1) {
      speeds.theirs.push(await perSecond(theirs));
      speeds.ours.push(await perSecond(ours, { Cookie: cookie }));
    }
    const [mine, bareSpeed] = [median(speeds.ours), median(speeds.theirs)];
    const ratio = mine / bareSpeed;
    const kilobytes = Math.round(Buffer.byteLength(body) / 1024);
    return [
      {
        name: 'Reading the sheet, 200 members x 20 lines',
        figures: `${Math.round(mine)} requests a second of ${kilobytes} KB, bare ${Math.round(bareSpeed)}`,
        ratio,
        target: `at least ${target} of a bare Express handler with one query`,
        ok: ratio >= target,
      },
    ];
  });
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) console.log(await run());
