import { run } from '../processes.mjs';
import { program } from './programs.mjs';

/**
 * Runs SQL with psql, so that nothing from npm is needed.
 * @param url where to; the password travels in the environment, not in the process list
 * @returns the rows as text, one a line
 * @throws Error with PostgreSQL's message
 */
export async function sql(url, statements) {
  const args = [
    '-X',
    '-A',
    '-t',
    '-q',
    '-v',
    'ON_ERROR_STOP=1',
    ...[statements].flat().flatMap((one) => ['-c', one]),
  ];
  const { code, output } = await run(program('psql'), args, { env: connectionEnv(url), cwd: '/' });
  if (code !== 0) throw new Error(output.trim());
  return output.trim();
}

/** @returns the environment by which libpq's programs (psql, pg_dump, pg_restore) find a database */
export function connectionEnv(url) {
  const { hostname, port, username, password, pathname, searchParams } = new URL(url);
  const given = {
    PGHOST: searchParams.get('host') ?? decodeURIComponent(hostname),
    PGPORT: port,
    PGUSER: decodeURIComponent(username),
    PGPASSWORD: decodeURIComponent(password),
    PGDATABASE: decodeURIComponent(pathname.slice(1)),
    PGSSLMODE: searchParams.get('sslmode') ?? '',
    PGSSLROOTCERT: searchParams.get('sslrootcert') ?? '',
  };
  const inherited = Object.entries(process.env).filter(
    ([name]) => !(name in given) || name === 'PGSSLMODE',
  );
  const set = Object.entries(given).filter(([, value]) => value !== '');
  return { ...Object.fromEntries(inherited), ...Object.fromEntries(set), PGCONNECT_TIMEOUT: '10' };
}

/** Quotes a name for SQL. */
export const quoteName = (name) => `"${name.replaceAll('"', '""')}"`;

/** Quotes a text for SQL. */
export const quoteText = (text) => `'${text.replaceAll("'", "''")}'`;
