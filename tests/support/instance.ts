import { spawn, type ChildProcess } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import pg from 'pg';
import { browserFlags } from './browserFlags.ts';

/** A Tarewell of its own: real server, real database, real browsers. */
export interface Instance {
  readonly url: string;
  /** Rows of a statement, for what no page shows. */
  query<T extends pg.QueryResultRow>(sql: string, values?: unknown[]): Promise<T[]>;
  /** A fresh browser, signed out. */
  browse(options?: { phone?: boolean }): Promise<Person>;
  /** A fresh browser in which a person of the demo is signed in. */
  as(email: string, options?: { phone?: boolean }): Promise<Person>;
  stop(): Promise<void>;
}

/** Somebody before a browser, with what their console complained of. */
export interface Person {
  readonly page: Page;
  readonly context: BrowserContext;
  readonly complaints: string[];
}

const startMs = 120_000;
const project = path.join(import.meta.dirname, '..', '..');

async function onCluster(adminUrl: string, sql: string): Promise<void> {
  const client = new pg.Client({ connectionString: adminUrl });
  await client.connect();
  await client.query(sql);
  await client.end();
}

function waitReady(server: ChildProcess): Promise<string> {
  return new Promise((resolve, reject) => {
    let said = '';
    const timer = setTimeout(() => reject(new Error(`server not ready:\n${said}`)), startMs);
    const listen = (chunk: Buffer) => {
      said += chunk.toString();
      const url = /Tarewell is ready at (\S+)/.exec(said)?.[1];
      if (!url) return;
      clearTimeout(timer);
      resolve(url);
    };
    server.stdout?.on('data', listen);
    server.stderr?.on('data', listen);
    server.once('exit', (code) => {
      clearTimeout(timer);
      reject(new Error(`server ended with ${code}:\n${said}`));
    });
  });
}

async function watch(context: BrowserContext): Promise<Person> {
  const page = await context.newPage();
  const complaints: string[] = [];
  page.on('pageerror', (error) => complaints.push(error.message));
  page.on('console', (message) => {
    // A refused request is told to the person on the page; the browser's own line about it is no fault.
    if (message.type() === 'error' && !message.text().startsWith('Failed to load resource')) {
      complaints.push(message.text());
    }
  });
  page.setDefaultTimeout(20_000);
  return { page, context, complaints };
}

/** Starts a server on a database of its own; `demo` loads the demo clubs. */
export async function startInstance(options: { demo: boolean }): Promise<Instance> {
  const adminUrl = process.env.TEST_DATABASE_URL;
  if (!adminUrl) throw new Error('TEST_DATABASE_URL is not set: run the tests with `npm test`.');
  const name = `tarewell_e2e_${randomBytes(6).toString('hex')}`;
  await onCluster(adminUrl, `create database ${name}`);
  const databaseUrl = new URL(adminUrl);
  databaseUrl.pathname = `/${name}`;
  const folder = mkdtempSync(path.join(tmpdir(), 'tarewell-e2e-'));
  chmodSync(folder, 0o711);
  const server = spawn(process.execPath, ['--import', 'tsx', 'server/main.ts'], {
    cwd: project,
    stdio: ['ignore', 'pipe', 'pipe'],
    env: {
      ...process.env,
      NODE_ENV: 'test',
      HOST: '127.0.0.1',
      PORT: '0',
      DATABASE_URL: databaseUrl.href,
      TAREWELL_DATA: folder,
      TAREWELL_DEMO: options.demo ? '1' : '0',
      LOG_LEVEL: 'warn',
    },
  });
  const pool = new pg.Pool({ connectionString: databaseUrl.href, max: 2 });
  pool.on('error', () => undefined);
  const stopServer = async () => {
    if (server.exitCode === null) {
      const ended = new Promise((resolve) => server.once('exit', resolve));
      server.kill('SIGTERM');
      await ended;
    }
    await pool.end();
    await onCluster(adminUrl, `drop database if exists ${name} with (force)`);
    rmSync(folder, { recursive: true, force: true });
  };
  let browser: Browser | undefined;
  try {
    const url = await waitReady(server);
    browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: browserFlags });
    const chrome = browser;
    const browse = async ({ phone = false } = {}) =>
      watch(
        await chrome.newContext({
          baseURL: url,
          viewport: phone ? { width: 390, height: 844 } : { width: 1440, height: 900 },
          hasTouch: phone,
          isMobile: phone,
          reducedMotion: 'reduce',
          locale: 'en-IE',
          timezoneId: 'Europe/Dublin',
        }),
      );
    return {
      url,
      query: async <T extends pg.QueryResultRow>(sql: string, values: unknown[] = []) =>
        (await pool.query<T>(sql, values)).rows,
      browse,
      as: async (email, how) => {
        const person = await browse(how);
        const reply = await person.context.request.post('/api/v1/session/demo', {
          data: { email },
          headers: { Origin: url, 'Sec-Fetch-Site': 'same-origin' },
        });
        if (!reply.ok()) throw new Error(`sign-in as ${email}: ${reply.status()}`);
        return person;
      },
      stop: async () => {
        await chrome.close();
        await stopServer();
      },
    };
  } catch (error) {
    await browser?.close();
    await stopServer();
    throw error;
  }
}
