import { randomBytes } from 'node:crypto';
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { z } from 'zod';

const flag = z.enum(['0', '1']).transform((value) => value === '1');

const Env = z.object({
  NODE_ENV: z.enum(['development', 'production', 'test']).default('production'),
  HOST: z.string().default('127.0.0.1'),
  PORT: z.coerce.number().int().min(0).max(65535).default(4680),
  TAREWELL_DATA: z.string().default('.data'),
  DATABASE_URL: z.string().min(1),
  DATABASE_POOL: z.coerce.number().int().min(2).max(100).default(10),
  TAREWELL_DEMO: flag.default(true),
  SMTP_URL: z.string().optional(),
  MAIL_FROM: z.string().default('Tarewell <post@tarewell.example>'),
  PUBLIC_URL: z.url().optional(),
  SESSION_SECRET: z.string().min(32).optional(),
  METRICS_TOKEN: z.string().min(16).optional(),
  S3_ENDPOINT: z.url().optional(),
  S3_REGION: z.string().default('us-east-1'),
  S3_BUCKET: z.string().optional(),
  S3_ACCESS_KEY_ID: z.string().optional(),
  S3_SECRET_ACCESS_KEY: z.string().optional(),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent']).default('info'),
});

const loopbackHosts = new Set(['127.0.0.1', 'localhost', '::1', '[::1]']);

/** Whether a host name or a URL's host means this machine alone. */
export function isLoopback(host: string): boolean {
  return loopbackHosts.has(host);
}

function keptSecret(folder: string): string {
  const file = path.join(folder, 'session-secret');
  try {
    return readFileSync(file, 'utf8').trim();
  } catch {
    mkdirSync(folder, { recursive: true });
    const secret = randomBytes(32).toString('hex');
    writeFileSync(file, secret, { mode: 0o600, flag: 'wx' });
    return secret;
  }
}

/**
 * Reads and checks the environment once.
 * @throws Error naming the variable that is wrong, or why demo mode may not run.
 */
export function readEnv(source: NodeJS.ProcessEnv) {
  const parsed = Env.safeParse(source);
  if (!parsed.success) throw new Error(`Environment: ${z.prettifyError(parsed.error)}`);
  const env = parsed.data;
  const publicHost = env.PUBLIC_URL ? new URL(env.PUBLIC_URL).hostname : undefined;
  if (env.TAREWELL_DEMO && (!isLoopback(env.HOST) || (publicHost && !isLoopback(publicHost)))) {
    throw new Error(
      'Demo mode signs anyone in with one click, so it runs only on loopback: set TAREWELL_DEMO=0, or HOST=127.0.0.1 and no PUBLIC_URL.',
    );
  }
  const dataFolder = path.resolve(env.TAREWELL_DATA);
  return {
    nodeEnv: env.NODE_ENV,
    host: env.HOST,
    port: env.PORT,
    dataFolder,
    databaseUrl: env.DATABASE_URL,
    databasePool: env.DATABASE_POOL,
    demo: env.TAREWELL_DEMO,
    smtpUrl: env.SMTP_URL,
    mailFrom: env.MAIL_FROM,
    publicUrl: env.PUBLIC_URL?.replace(/\/$/, ''),
    behindTls: env.PUBLIC_URL?.startsWith('https:') ?? false,
    sessionSecret: env.SESSION_SECRET ?? keptSecret(dataFolder),
    metricsToken: env.METRICS_TOKEN,
    s3:
      env.S3_ENDPOINT && env.S3_BUCKET && env.S3_ACCESS_KEY_ID && env.S3_SECRET_ACCESS_KEY
        ? {
            endpoint: env.S3_ENDPOINT,
            region: env.S3_REGION,
            bucket: env.S3_BUCKET,
            accessKeyId: env.S3_ACCESS_KEY_ID,
            secretAccessKey: env.S3_SECRET_ACCESS_KEY,
          }
        : undefined,
    logLevel: env.LOG_LEVEL,
  };
}

export type AppEnv = ReturnType<typeof readEnv>;
