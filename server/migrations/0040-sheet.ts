import type { Migration } from '../config/migrate.ts';

/** A snapshot keeps the terms it was made under; a buy says when its closing was announced. */
export const up: Migration = async (sql) => {
  await sql(`
    alter table snapshots add column terms jsonb;
    alter table buys add column closing_told_for timestamptz;
    create index pledge_proposals_open on pledge_proposals (buy_id, membership_id) where answered_at is null;
    create unique index pledge_proposals_one on pledge_proposals (line_id, membership_id) where answered_at is null;
  `);
};
