import { spawn, type ChildProcess } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import pg from 'pg';
import type { SeededSheet } from './sheetSeed.ts';

/** One line of the benchmark report: how ours does beside a bare baseline in the same run. */
export interface BenchResult {
  readonly name: string;
  readonly figures: string;
  readonly ratio: number;
  readonly target: string;
  readonly ok: boolean;
}

const folder = path.join(import.meta.dirname, '..', '..');
const password = 'a password for tests';

/** A database of its own with a seeded sheet, Tarewell serving it, and room for a bare server beside it. */
export interface Ground {
  readonly seeded: SeededSheet;
  readonly databaseUrl: string;
  /** Address of Tarewell, in a process of its own. */
  readonly origin: string;
  /** Starts another program of tests/bench that says its address on its first line. */
  bare(file: string, env?: Record<string, string>): Promise<string>;
  signIn(email: string): Promise<string>;
}

function start(args: string[], env: Record<string, string>): ChildProcess {
  return spawn(process.execPath, ['--import', 'tsx', ...args], {
    cwd: folder,
    env: { ...process.env, NODE_ENV: 'production', ...env },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
}

/** The first line a child says that matches. */
function said(child: ChildProcess, pattern: RegExp): Promise<string> {
  return new Promise((resolve, reject) => {
    let text = '';
    child.stdout?.on('data', (chunk: Buffer) => {
      text += chunk.toString();
      const match = pattern.exec(text);
      if (match) resolve(match[1] ?? match[0]);
    });
    child.once('exit', (code) => reject(new Error(`ended with ${code} before it was ready`)));
  });
}

async function createDatabase(adminUrl: string): Promise<string> {
  const name = `tarewell_bench_${randomBytes(5).toString('hex')}`;
  const client = new pg.Client({ connectionString: adminUrl });
  await client.connect();
  await client.query(`create database ${name}`);
  await client.end();
  const url = new URL(adminUrl);
  url.pathname = `/${name}`;
  return url.href;
}

async function dropDatabase(adminUrl: string, databaseUrl: string): Promise<void> {
  const client = new pg.Client({ connectionString: adminUrl });
  await client.connect();
  await client.query(`drop database ${new URL(databaseUrl).pathname.slice(1)} with (force)`);
  await client.end();
}

async function end(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null) return;
  const gone = new Promise((resolve) => child.once('exit', resolve));
  child.kill('SIGTERM');
  await gone;
}

/** Runs `work` on a ground of its own and takes everything down after it. */
export async function withGround<T>(
  size: { members: number; lines: number },
  work: (ground: Ground) => Promise<T>,
): Promise<T> {
  const adminUrl = process.env.TEST_DATABASE_URL;
  if (!adminUrl) throw new Error('TEST_DATABASE_URL is not set: run `npm run bench`.');
  const databaseUrl = await createDatabase(adminUrl);
  const dataFolder = mkdtempSync(path.join(tmpdir(), 'tarewell-bench-'));
  const env = {
    DATABASE_URL: databaseUrl,
    TAREWELL_DATA: dataFolder,
    TAREWELL_DEMO: '0',
    HOST: '127.0.0.1',
    PORT: '0',
    LOG_LEVEL: 'warn',
    BENCH_MEMBERS: String(size.members),
    BENCH_LINES: String(size.lines),
  };
  const children: ChildProcess[] = [];
  try {
    const seeding = start(['tests/bench/sheetSeed.ts'], env);
    const seeded = JSON.parse(await said(seeding, /^(\{.*\})$/m)) as SeededSheet;
    const server = start(['server/main.ts'], env);
    children.push(server);
    const origin = await said(server, /(http:\/\/127\.0\.0\.1:\d+)/);
    return await work({
      seeded,
      databaseUrl,
      origin,
      bare: async (file, more = {}) => {
        const child = start([`tests/bench/${file}`], { ...env, ...more });
        children.push(child);
        return said(child, /(http:\/\/127\.0\.0\.1:\d+)/);
      },
      signIn: async (email) => {
        const reply = await fetch(`${origin}/api/v1/session`, {
          method: 'POST',
          headers: { 'Content-Type': 'application/json', 'Sec-Fetch-Site': 'same-origin' },
          body: JSON.stringify({ email, password }),
        });
        return reply.headers.get('set-cookie')?.split(';')[0] ?? '';
      },
    });
  } finally {
    await Promise.all(children.map(end));
    await dropDatabase(adminUrl, databaseUrl);
    rmSync(dataFolder, { recursive: true, force: true });
  }
}

/** The middle one; of two middle ones the greater. */
export function median(values: readonly number[]): number {
  return [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? NaN;
}

/** The value below which so much of the sample lies. */
export function quantile(values: readonly number[], share: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? NaN;
}
