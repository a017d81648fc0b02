import { pathToFileURL } from 'node:url';
import { io as connect, type Socket } from 'socket.io-client';
import { median, quantile, withGround, type BenchResult } from './ground.ts';

const size = { members: 20, lines: 4 };
const sockets = 500;
const rounds = 4;
const changesARound = 20;
const pauseMs = 150;
const target = 1.5;

async function opened(client: Socket): Promise<Socket> {
  if (client.connected) return client;
  await new Promise<void>((resolve, reject) => {
    client.once('connect', resolve);
    client.once('connect_error', reject);
  });
  return client;
}

/** So many clients, opened a few at a time. */
async function openMany(make: () => Socket, ready: (client: Socket) => Promise<void>) {
  const clients: Socket[] = [];
  while (clients.length < sockets) {
    const some = await Promise.all(Array.from({ length: 25 }, () => opened(make())));
    await Promise.all(some.map(ready));
    clients.push(...some);
  }
  return clients;
}

/** Milliseconds from the instant a message names to each client's hearing of it, over a round of changes. */
async function hearing(
  clients: readonly Socket[],
  instantOf: (message: unknown) => number | null,
  change: () => Promise<unknown>,
): Promise<number[]> {
  const waits: number[] = [];
  for (let count = 0; count < changesARound; count += 1) {
    const heard = new Promise<void>((resolve) => {
      let left = clients.length;
      for (const client of clients) {
        const hear = (message: unknown) => {
          const began = instantOf(message);
          if (began === null) return;
          client.off('buy:changed', hear);
          waits.push(performance.timeOrigin + performance.now() - began);
          left -= 1;
          if (left === 0) resolve();
        };
        client.on('buy:changed', hear);
      }
    });
    await Promise.all([heard, change()]);
    // The plan that follows is another message, with its own time.
    await new Promise((resolve) => setTimeout(resolve, pauseMs));
  }
  return waits;
}

/**
 * A change reaching 500 open sheets, through the PostgreSQL adapter, against a bare Socket.IO server in memory that
 * emits the same payload to a room of 500. A wait begins when the pledge is written (its instant by the database's
 * clock, before the commit) or the bare emit begins, and ends when a client has the message.
 */
export async function run(): Promise<BenchResult[]> {
  return withGround(size, async ({ seeded, origin, bare, signIn }) => {
    const person = seeded.members[1];
    const cookie = await signIn(person?.email ?? '');
    const room = { club: seeded.slug, buy: seeded.buyId };
    const ours = await openMany(
      () =>
        connect(origin, {
          transports: ['websocket'],
          forceNew: true,
          extraHeaders: { Cookie: cookie, Origin: origin },
        }),
      async (client) => {
        const answer = (await client.emitWithAck('buy:join', room)) as { ok: boolean };
        if (!answer.ok) throw new Error('the room was refused');
      },
    );
    const url = `${origin}/api/v1/clubs/${seeded.slug}/buys/${seeded.buyId}/lines/${seeded.lineIds[1]}/pledges/${person?.id}`;
    let version = 1;
    let payload: unknown;
    ours[0]?.on('buy:changed', (message: unknown) => {
      payload = message;
    });
    const change = async () => {
      const reply = await fetch(url, {
        method: 'PUT',
        headers: {
          Cookie: cookie,
          'Content-Type': 'application/json',
          'Sec-Fetch-Site': 'same-origin',
        },
        body: JSON.stringify({ wantedMg: 5_000_000 + version * 1000, upToMg: null, version }),
      });
      if (reply.status !== 200) throw new Error(`pledge: ${reply.status}`);
      version += 1;
    };
    const writtenAt = (message: unknown) => {
      const { pledge } = message as { pledge?: { at: string } };
      return pledge ? Date.parse(pledge.at) : null;
    };
    const emittedAt = (message: unknown) => (message as { emittedAt: number }).emittedAt;
    await hearing(ours, writtenAt, change);

    const bareOrigin = await bare('bareSockets.ts', { BENCH_PAYLOAD: JSON.stringify(payload) });
    const theirs = await openMany(
      () => connect(bareOrigin, { transports: ['websocket'], forceNew: true }),
      () => Promise.resolve(),
    );
    const emit = () => fetch(`${bareOrigin}/emit`, { method: 'POST' });
    await hearing(theirs, emittedAt, emit);

    const p95 = { ours: [] as number[], theirs: [] as number[] };
    for (let round = 0; round < rounds; round += 1) {
      p95.theirs.push(quantile(await hearing(theirs, emittedAt, emit), 0.95));
      p95.ours.push(quantile(await hearing(ours, writtenAt, change), 0.95));
    }
    [...ours, ...theirs].forEach((client) => client.disconnect());
    const [mine, plain] = [median(p95.ours), median(p95.theirs)];
    const ratio = mine / plain;
    return [
      {
        name: `A change reaching ${sockets} open sheets`,
        figures: `p95 ${mine.toFixed(1)} ms from writing the pledge to the sheets, bare ${plain.toFixed(1)} ms`,
        ratio,
        target: `at most ${target} times the p95 of a bare Socket.IO emit`,
        ok: ratio <= target,
      },
    ];
  });
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) console.log(await run());
