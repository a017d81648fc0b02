import type { Migration } from '../config/migrate.ts';

/** A pledge looks for what its member owes elsewhere. */
export const up: Migration = async (sql) => {
  await sql('create index buy_members_member on buy_members (membership_id)');
};
