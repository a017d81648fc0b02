import { randomBytes } from 'node:crypto';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { parts } from '../backupFile.mjs';
import { onEnd } from '../command.mjs';
import { LauncherProblem } from '../problem.mjs';
import { lastLines, run } from '../processes.mjs';
import { program } from './programs.mjs';
import { connectionEnv, quoteName, quoteText, sql } from './sql.mjs';

function withDatabase(url, database) {
  const changed = new URL(url);
  changed.pathname = `/${database}`;
  return changed.href;
}

const databaseOf = (url) => decodeURIComponent(new URL(url).pathname.slice(1));

/** @returns how many tables a database holds */
export async function countTables(url) {
  return Number(
    await sql(
      url,
      "select count(*) from pg_tables where schemaname not in ('pg_catalog', 'information_schema')",
    ),
  );
}

async function refuseWhileInUse(admin, name) {
  const count = `select count(*) from pg_stat_activity
    where datname = ${quoteText(name)} and backend_type = 'client backend'`;
  // Our own connections may still be closing.
  for (let tries = 0; tries < 10; tries++) {
    if ((await sql(admin, count)) === '0') return;
    await pause(200);
  }
  throw new LauncherProblem(
    `The database ${name} is in use. Stop the server first. Nothing was changed.`,
  );
}

async function createBeside(admin, name, owner) {
  try {
    await sql(
      admin,
      `create database ${quoteName(name)} owner ${quoteName(owner)} template template0`,
    );
  } catch (error) {
    throw new LauncherProblem(
      `A restore needs a second database for a moment, and PostgreSQL does not let this role make one:\n` +
        `${error.message}\nGive the role CREATEDB. Nothing was changed.`,
    );
  }
}

/**
 * Restores a dump into a new database beside the present one.
 * @param ownerUrl the superuser's to the maintenance database; without it the application's role is used
 * @param folder the unpacked backup
 * @returns `{ tables, migrations, swap }`; swap puts the new one in the present one's place and drops that
 */
export async function restoreAside({ url, ownerUrl, folder }) {
  const present = databaseOf(url);
  const admin = ownerUrl ?? withDatabase(url, 'postgres');
  await refuseWhileInUse(admin, present);
  const stamp = randomBytes(4).toString('hex');
  const [next, before] = [`${present}_restored_${stamp}`, `${present}_before_${stamp}`];
  await createBeside(admin, next, decodeURIComponent(new URL(url).username));
  onEnd(() => sql(admin, `drop database if exists ${quoteName(next)}`));
  const nextUrl = withDatabase(url, next);
  const args = ['--no-owner', '--no-privileges', '--exit-on-error', `--dbname=${next}`];
  const { code, output } = await run(program('pg_restore'), [...args, join(folder, parts.dump)], {
    env: connectionEnv(nextUrl),
  });
  if (code !== 0) {
    throw new LauncherProblem(`pg_restore failed:\n${lastLines(output, 5)}\nNothing was changed.`);
  }
  await sql(nextUrl, 'analyze');
  const migrations = await sql(nextUrl, 'select name from schema_migrations');
  const swap = async () => {
    await refuseWhileInUse(admin, present);
    // Renaming is transactional: there is no moment without a database of this name.
    const rename = (from, to) => `alter database ${quoteName(from)} rename to ${quoteName(to)}`;
    await sql(admin, ['begin', rename(present, before), rename(next, present), 'commit']);
    await sql(admin, `drop database ${quoteName(before)}`);
  };
  return { tables: await countTables(nextUrl), migrations: migrations.split('\n'), swap };
}
