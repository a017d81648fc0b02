import { randomBytes } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import pg from 'pg';
import { afterAll } from 'vitest';

const adminUrl = process.env.TEST_DATABASE_URL;
const template = process.env.TEST_TEMPLATE;
if (!adminUrl || !template) throw new Error('globalSetup did not run');

const name = `tarewell_test_${randomBytes(6).toString('hex')}`;
const url = new URL(adminUrl);
url.pathname = `/${name}`;

async function admin(sql: string): Promise<void> {
  const client = new pg.Client({ connectionString: adminUrl });
  await client.connect();
  await client.query(sql);
  await client.end();
}

const dataFolder = mkdtempSync(path.join(tmpdir(), 'tarewell-test-'));
await admin(`create database ${name} template ${template}`);
Object.assign(process.env, {
  NODE_ENV: 'test',
  DATABASE_URL: url.href,
  DATABASE_POOL: '6',
  TAREWELL_DATA: dataFolder,
  TAREWELL_DEMO: process.env.TEST_DEMO ?? '0',
  LOG_LEVEL: 'silent',
});

afterAll(async () => {
  const { pool, sequelize } = await import('#server/config/database.ts');
  await sequelize.close();
  await pool.end();
  await admin(`drop database if exists ${name} with (force)`);
  rmSync(dataFolder, { recursive: true, force: true });
});
