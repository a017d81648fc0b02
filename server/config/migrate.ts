import { readdir } from 'node:fs/promises';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { Umzug } from 'umzug';
import type { Sequelize } from 'sequelize';

type Sql = (text: string) => Promise<void>;
/** A step forward of the schema; it uses SQL alone, never a model. */
export type Migration = (sql: Sql) => Promise<void>;

const folder = path.join(import.meta.dirname, '..', 'migrations');
const lockKey = 468_000_001;

async function migrations() {
  const files = (await readdir(folder)).filter((file) => /^\d{4}-.*\.ts$/.test(file)).sort();
  return files.map((file) => ({ name: file.replace(/\.ts$/, ''), file: path.join(folder, file) }));
}

/** Names of the shipped migrations, in order. */
export async function migrationNames(): Promise<string[]> {
  return (await migrations()).map(({ name }) => name);
}

/** Brings the schema forward under an advisory lock, so that several processes may start at once. */
export async function migrate(sequelize: Sequelize): Promise<string[]> {
  return sequelize.transaction(async (lock) => {
    await sequelize.query(`select pg_advisory_xact_lock(${lockKey})`, { transaction: lock });
    await sequelize.query(
      'create table if not exists schema_migrations (name text primary key, applied_at timestamptz not null default now())',
    );
    const umzug = new Umzug({
      migrations: (await migrations()).map(({ name, file }) => ({
        name,
        up: async () => {
          const { up } = (await import(pathToFileURL(file).href)) as { up: Migration };
          await sequelize.transaction(async (transaction) => {
            await up(async (text) => {
              await sequelize.query(text, { transaction, raw: true });
            });
            await sequelize.query('insert into schema_migrations (name) values (:name)', {
              transaction,
              replacements: { name },
            });
          });
        },
      })),
      storage: {
        logMigration: () => Promise.resolve(),
        unlogMigration: () => Promise.reject(new Error('migrations only go forward')),
        executed: async () => {
          const [rows] = await sequelize.query('select name from schema_migrations order by name');
          return (rows as { name: string }[]).map(({ name }) => name);
        },
      },
      context: undefined,
      logger: undefined,
    });
    return (await umzug.up()).map(({ name }) => name);
  });
}
