import type { Migration } from '../config/migrate.ts';

/** Who an e-mailed invitation greets and when it was last sent; tokens and memberships found by whose they are. */
export const up: Migration = async (sql) => {
  await sql(`
    alter table invitations add column name text not null default '';
    alter table invitations add column sent_at timestamptz not null default clock_timestamp();
    create unique index invitations_open_email on invitations (club_id, lower(email))
      where kind = 'email' and revoked_at is null and accepted_at is null;
    create index account_tokens_account on account_tokens (account_id, kind);
    create index audit_entries_actor on audit_entries (club_id, actor_id, id desc);
    create index audit_entries_action on audit_entries (club_id, action, id desc);
  `);
};
