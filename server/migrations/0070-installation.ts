import type { Migration } from '../config/migrate.ts';

/** What happened once to this installation, such as loading the demo. */
export const up: Migration = async (sql) => {
  await sql(`
    create table installation (
      key text primary key,
      at timestamptz not null default now()
    );
  `);
};
