import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { LauncherProblem } from '../problem.mjs';

const debianFolder = '/usr/lib/postgresql';

/** @returns the folder of the newest PostgreSQL server's programs (14 or later), or null */
export function findPrograms() {
  const debian = existsSync(debianFolder)
    ? readdirSync(debianFolder)
        .filter((version) => Number(version) >= 14)
        .sort((a, b) => Number(b) - Number(a))
        .map((version) => join(debianFolder, version, 'bin'))
    : [];
  const folders = [...debian, ...(process.env.PATH ?? '').split(delimiter)];
  return (
    folders.find((folder) =>
      ['initdb', 'pg_ctl', 'psql'].every((name) => existsSync(join(folder, name))),
    ) ?? null
  );
}

/** @returns the path of one of PostgreSQL's programs */
export function program(name) {
  const folder = findPrograms();
  if (!folder)
    throw new LauncherProblem('PostgreSQL is missing. Install the Debian package postgresql.');
  return join(folder, name);
}

function idOf(flag, account) {
  const found = spawnSync('id', [flag, account], { encoding: 'utf8' });
  return found.status === 0 ? Number(found.stdout) : null;
}

let account;

/**
 * Spawn options for PostgreSQL's server programs. PostgreSQL refuses to run as root, so root hands
 * over to the account of the Debian package; an ordinary user runs it as themselves.
 * @returns `{ cwd, uid?, gid? }`
 */
export function serverAccount() {
  if (account) return account;
  if (process.getuid?.() !== 0) return (account = { cwd: '/' });
  const uid = idOf('-u', 'postgres');
  const gid = idOf('-g', 'postgres');
  if (!uid || !gid) {
    throw new LauncherProblem(
      'PostgreSQL does not run as root and there is no account "postgres" for it.',
    );
  }
  return (account = { cwd: '/', uid, gid });
}
