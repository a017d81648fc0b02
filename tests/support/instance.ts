import { randomBytes } from 'node:crypto';
import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import pg from 'pg';
import { browserFlags } from './browserFlags.ts';
import { startServer, type Server } from './serverProcess.ts';

type Look = { phone?: boolean; url?: string };

/** A Tarewell of its own: real server, real database, real browsers. */
export interface Instance {
  readonly url: string;
  /** Rows of a statement, for what no page shows. */
  query<T extends pg.QueryResultRow>(sql: string, values?: unknown[]): Promise<T[]>;
  /** A fresh browser, signed out; at `url` when another process is meant. */
  browse(options?: Look): Promise<Person>;
  /** A fresh browser in which a person of the demo is signed in. */
  as(email: string, options?: Look): Promise<Person>;
  /** Kills the server without a word, as a power cut does. */
  kill(): Promise<void>;
  /** Starts it again on the same database and port. */
  startAgain(): Promise<void>;
  /** One more process on the same database; gives its address. */
  startAnother(): Promise<string>;
  stop(): Promise<void>;
}

/** Somebody before a browser, with what their console complained of. */
export interface Person {
  readonly page: Page;
  readonly context: BrowserContext;
  readonly complaints: string[];
}

async function onCluster(adminUrl: string, sql: string): Promise<void> {
  const client = new pg.Client({ connectionString: adminUrl });
  await client.connect();
  await client.query(sql);
  await client.end();
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
  const start = (port: string) =>
    startServer({
      PORT: port,
      DATABASE_URL: databaseUrl.href,
      TAREWELL_DATA: folder,
      TAREWELL_DEMO: options.demo ? '1' : '0',
    });
  const pool = new pg.Pool({ connectionString: databaseUrl.href, max: 2 });
  pool.on('error', () => undefined);
  const servers: Server[] = [];
  let browser: Browser | undefined;
  const stop = async () => {
    await browser?.close();
    await Promise.all(servers.map((server) => server.end('SIGTERM')));
    await pool.end();
    await onCluster(adminUrl, `drop database if exists ${name} with (force)`);
    rmSync(folder, { recursive: true, force: true });
  };
  try {
    const first = await start('0');
    servers.push(first);
    const { url } = first;
    browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: browserFlags });
    const chrome = browser;
    const browse = async ({ phone = false, url: baseURL = url }: Look = {}) =>
      watch(
        await chrome.newContext({
          baseURL,
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
      as: async (email, how = {}) => {
        const person = await browse(how);
        const reply = await person.context.request.post('/api/v1/session/demo', {
          data: { email },
          headers: { Origin: how.url ?? url, 'Sec-Fetch-Site': 'same-origin' },
        });
        if (!reply.ok()) throw new Error(`sign-in as ${email}: ${reply.status()}`);
        return person;
      },
      kill: () => servers[0]?.end('SIGKILL') ?? Promise.resolve(),
      startAgain: async () => {
        servers[0] = await start(new URL(url).port);
      },
      startAnother: async () => {
        const another = await start('0');
        servers.push(another);
        return another.url;
      },
      stop,
    };
  } catch (error) {
    await stop();
    throw error;
  }
}
