import { Agent, request } from 'node:http';
import { pathToFileURL } from 'node:url';
import pg from 'pg';
import { median, withGround, type BenchResult } from './ground.ts';

const size = { members: 40, lines: 12 };
const rounds = 5;
const seconds = 3;
const connections = 10;
const target = 0.4;

/** Somebody who changes one pledge again and again, each time with the version it has by then. */
interface Writer {
  readonly url: string;
  readonly headers: Record<string, string>;
  version: number;
}

const bodyOf = ({ version }: Writer) =>
  JSON.stringify({ wantedMg: version % 2 ? 303_000 : 451_000, upToMg: null, version });

/** One change, over a kept connection; the reply's status. */
function put(agent: Agent, origin: string, writer: Writer): Promise<number> {
  return new Promise((resolve, reject) => {
    const body = bodyOf(writer);
    const length = { 'Content-Type': 'application/json', 'Content-Length': body.length };
    const asked = request(
      origin + writer.url,
      { method: 'PUT', agent, headers: { ...length, ...writer.headers } },
      (reply) => {
        reply.resume();
        reply.once('end', () => resolve(reply.statusCode ?? 0));
      },
    );
    asked.once('error', reject);
    asked.end(body);
  });
}

/** Changes a second, each writer making one after the other. */
async function perSecond(origin: string, writers: readonly Writer[]): Promise<number> {
  const agent = new Agent({ keepAlive: true, maxSockets: writers.length });
  const started = performance.now();
  const until = started + seconds * 1000;
  let changes = 0;
  await Promise.all(
    writers.map(async (writer) => {
      while (performance.now() < until) {
        const status = await put(agent, origin, writer);
        if (status !== 200) throw new Error(`${writer.url}: ${status}`);
        writer.version += 1;
        changes += 1;
      }
    }),
  );
  const took = performance.now() - started;
  agent.destroy();
  return (changes / took) * 1000;
}

async function makeTables(databaseUrl: string): Promise<void> {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  await client.query(
    'create table bench_rows (id integer primary key, wanted_mg bigint not null, version integer not null)',
  );
  await client.query(
    `create table bench_changes (id bigint generated always as identity primary key, row_id integer not null,
       wanted_mg bigint not null, at timestamptz not null default clock_timestamp())`,
  );
  await client.query('insert into bench_rows select n, 0, 0 from generate_series(0, 100) n');
  await client.end();
}

/** Rounds of both, taking turns, after one of each to warm up. */
async function compare(
  name: string,
  ours: () => Promise<number>,
  theirs: () => Promise<number>,
): Promise<BenchResult> {
  await ours();
  await theirs();
  const speeds = { ours: [] as number[], theirs: [] as number[] };
  for (let round = 0; round < rounds; round += 1) {
    speeds.theirs.push(await theirs());
    speeds.ours.push(await ours());
  }
  const [speed, bare] = [median(speeds.ours), median(speeds.theirs)];
  const ratio = speed / bare;
  return {
    name,
    figures: `${Math.round(speed)} changes a second, bare ${Math.round(bare)}`,
    ratio,
    target: `at least ${target} of a bare Express and pg transaction with one update and one insert`,
    ok: ratio >= target,
  };
}

/**
 * Changing a pledge (session, policy, the buy's lock, rules, audit, live message, plan) against a bare Express and pg
 * transaction with one update and one insert. Each connection is a member of one buy, whose version is one row for all
 * of them, as the updated row is for the bare transaction.
 */
export async function run(): Promise<BenchResult[]> {
  return withGround(size, async ({ seeded, databaseUrl, origin, bare, signIn }) => {
    await makeTables(databaseUrl);
    const people = seeded.members.slice(0, connections);
    const cookies = await Promise.all(people.map(({ email }) => signIn(email)));
    const bareOrigin = await bare('bareServer.ts');
    const writer = (index: number, buyId: string, lineId: string, version: number): Writer => ({
      url: `/api/v1/clubs/${seeded.slug}/buys/${buyId}/lines/${lineId}/pledges/${people[index]?.id}`,
      headers: { Cookie: cookies[index] ?? '', 'Sec-Fetch-Site': 'same-origin' },
      version,
    });
    const plain = (row: number): Writer => ({ url: `/pledges/${row}`, headers: {}, version: 1 });
    // Potassium sulfate is not classified, so nobody has to confirm anything.
    const line = seeded.lineIds[1] ?? '';
    const together = people.map((_, index) => writer(index, seeded.buyId, line, 1));
    const oneRow = people.map(() => plain(0));
    return [
      await compare(
        'Changing a pledge, ten members at once in one buy',
        () => perSecond(origin, together),
        () => perSecond(bareOrigin, oneRow),
      ),
    ];
  });
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) console.log(await run());
