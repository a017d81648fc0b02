import { execFileSync } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  truncateSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import pg from 'pg';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { runToEnd } from './launcher.ts';

const admin = process.env.TEST_DATABASE_URL ?? '';
const names = () => ['from', 'to'].map((end) => `backup_${randomBytes(4).toString('hex')}_${end}`);

async function query(url: string, text: string) {
  const client = new pg.Client(url);
  await client.connect();
  try {
    return (await client.query<Record<string, unknown>>(text)).rows;
  } finally {
    await client.end();
  }
}

function at(name: string) {
  const url = new URL(admin);
  url.pathname = `/${name}`;
  return url.href;
}

const folder = () => mkdtempSync(path.join(tmpdir(), 'tarewell-backup-'));

const fill = (note: string) => `
  create table schema_migrations (name text primary key);
  insert into schema_migrations values ('0001-foundation');
  create table session (sid text);
  insert into session values ('signed in');
  create table notes (note text);
  insert into notes values ('${note}')`;

describe('backup and restore', () => {
  let databases: string[];
  let source: { url: string; data: string };
  let target: { url: string; data: string };
  let file: string;

  beforeEach(async () => {
    databases = names();
    for (const name of databases) await query(admin, `create database ${name}`);
    const [from = '', to = ''] = databases;
    source = { url: at(from), data: folder() };
    target = { url: at(to), data: folder() };
    await query(source.url, fill('kept'));
    mkdirSync(path.join(source.data, 'uploads', 'ab'), { recursive: true });
    writeFileSync(path.join(source.data, 'uploads', 'ab', 'abcd1234'), 'a photo');
    writeFileSync(path.join(source.data, 'uploads', 'ab', 'half.part'), 'half a photo');
    writeFileSync(path.join(source.data, 'session-secret'), 's3cret');
    file = path.join(source.data, 'club.tar');
    const backup = await runToEnd('backup.mjs', env(source), [file]);
    expect(backup.output).toContain(`Backup: ${file}`);
  });

  afterEach(async () => {
    for (const name of databases) await query(admin, `drop database ${name} with (force)`);
    for (const { data } of [source, target]) rmSync(data, { recursive: true });
  });

  const env = ({ url, data }: { url: string; data: string }) => ({
    DATABASE_URL: url,
    TAREWELL_DATA: data,
  });
  const restore = (...args: string[]) => runToEnd('restore.mjs', env(target), args);
  const notes = () => query(target.url, 'select note from notes');
  const upload = (...parts: string[]) => path.join(target.data, 'uploads', ...parts);

  it('brings database, uploads and secret to another place, but nobody signed in', async () => {
    const { code, output } = await restore(file);
    expect(output).toMatch(/^Restored the backup of .*: 3 tables\.$/m);
    expect(code).toBe(0);
    expect(await notes()).toEqual([{ note: 'kept' }]);
    expect(await query(target.url, 'select * from session')).toEqual([]);
    expect(readFileSync(upload('ab', 'abcd1234'), 'utf8')).toBe('a photo');
    expect(existsSync(upload('ab', 'half.part'))).toBe(false);
    expect(readFileSync(path.join(target.data, 'session-secret'), 'utf8')).toBe('s3cret');
    expect(statSync(file).mode & 0o777).toBe(0o600);
  });

  it('refuses to overwrite data, and replaces it when told to', async () => {
    await query(target.url, fill('earlier'));
    mkdirSync(upload('cd'), { recursive: true });
    writeFileSync(upload('cd', 'cdef5678'), 'an earlier photo');
    const refused = await restore(file);
    expect(refused).toMatchObject({ code: 1 });
    expect(refused.output).toContain('holds data already (3 tables). Nothing was changed.');
    expect(await notes()).toEqual([{ note: 'earlier' }]);

    expect((await restore(file, '--force')).output).toContain('The earlier data was removed.');
    expect(await notes()).toEqual([{ note: 'kept' }]);
    expect(existsSync(upload('cd', 'cdef5678'))).toBe(false);
  });

  it.each([
    [
      'a dump that is cut off',
      /pg_restore failed/,
      () => damage((dump) => truncateSync(dump, 2000)),
    ],
    ['another tar file', /no backup of Tarewell/, () => damage((dump) => rmSync(dump))],
    ['a file that is no tar', /no backup of Tarewell/, () => writeFileSync(file, 'something')],
  ])('changes nothing for %s', async (_what, message, spoil) => {
    await query(target.url, fill('earlier'));
    spoil();
    const { code, output } = await restore(file, '--force');
    expect(output).toMatch(message);
    expect(code).toBe(1);
    expect(await notes()).toEqual([{ note: 'earlier' }]);
    expect(existsSync(upload('ab', 'abcd1234'))).toBe(false);
    await expectNothingLeft();
  });

  it('changes nothing while the database is in use', async () => {
    await query(target.url, fill('earlier'));
    const client = new pg.Client(target.url);
    await client.connect();
    const { output } = await restore(file, '--force');
    await client.end();
    expect(output).toContain('is in use. Stop the server first. Nothing was changed.');
    expect(await notes()).toEqual([{ note: 'earlier' }]);
    await expectNothingLeft();
  });

  it('refuses a backup of a later version', async () => {
    await query(source.url, "insert into schema_migrations values ('9999-later')");
    const later = path.join(source.data, 'later.tar');
    await runToEnd('backup.mjs', env(source), [later]);
    expect((await restore(later)).output).toContain('made by a later version (9999-later)');
    await expectNothingLeft();
  });

  it('does not write over a file', async () => {
    expect((await runToEnd('backup.mjs', env(source), [file])).output).toContain('exists already');
  });

  function damage(spoil: (dump: string) => void) {
    const unpacked = path.join(source.data, 'unpacked');
    mkdirSync(unpacked);
    execFileSync('tar', ['-xf', file, '-C', unpacked]);
    spoil(path.join(unpacked, 'database.dump'));
    execFileSync('tar', ['-cf', file, '-C', unpacked, ...readdirSync(unpacked)]);
  }

  async function expectNothingLeft() {
    const pattern = `${databases[1]}_%`;
    expect(
      await query(admin, `select datname from pg_database where datname like '${pattern}'`),
    ).toEqual([]);
    expect(readdirSync(target.data).filter((name) => name.startsWith('restore-'))).toEqual([]);
  }
});
