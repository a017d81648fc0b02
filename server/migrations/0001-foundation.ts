import type { Migration } from '../config/migrate.ts';

/** Accounts, clubs and the records every feature leans on: sessions, audit, outbox, limits, uploads, ledger. */
export const up: Migration = async (sql) => {
  await sql(`
    create table accounts (
      id uuid primary key default gen_random_uuid(),
      email text not null,
      display_name text not null,
      password_hash text not null,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      deleted_at timestamptz
    );
    create unique index accounts_email on accounts (lower(email)) where deleted_at is null;

    create table account_tokens (
      id uuid primary key default gen_random_uuid(),
      account_id uuid not null references accounts on delete cascade,
      kind text not null check (kind in ('reset', 'email')),
      token_hash text not null unique,
      new_email text,
      expires_at timestamptz not null,
      used_at timestamptz,
      created_at timestamptz not null default now()
    );

    create table session (
      sid text primary key,
      sess json not null,
      expire timestamp(6) not null
    );
    create index session_expire on session (expire);
    create index session_account on session ((sess -> 'passport' ->> 'user'));

    create table clubs (
      id uuid primary key default gen_random_uuid(),
      slug text not null unique check (slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$'),
      name text not null,
      note text not null default '',
      contact text not null default '',
      currency text not null check (currency ~ '^[A-Z]{3}$'),
      locale text not null default 'en-GB',
      time_zone text not null default 'Europe/London',
      units text not null default 'metric' check (units in ('metric', 'us')),
      place_address text not null default '',
      place_note text not null default '',
      transfer_how text not null default '',
      join_needs_approval boolean not null default true,
      hide_reportable_grams boolean not null default false,
      shelf_limit_minor bigint not null default 0 check (shelf_limit_minor >= 0),
      precursor_months integer not null default 18 check (precursor_months between 1 and 120),
      is_demo boolean not null default false,
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now()
    );

    create table memberships (
      id uuid primary key default gen_random_uuid(),
      club_id uuid not null references clubs,
      account_id uuid references accounts,
      status text not null default 'active' check (status in ('pending', 'active', 'left', 'removed')),
      display_name text not null,
      is_organiser boolean not null default false,
      is_treasurer boolean not null default false,
      is_steward boolean not null default false,
      is_guest boolean not null default false,
      guest_contact text not null default '',
      vouched_by_id uuid references memberships,
      legal_name text,
      notice_off jsonb not null default '[]',
      version integer not null default 1,
      joined_at timestamptz not null default now(),
      ended_at timestamptz,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      check (is_guest or account_id is not null),
      check (not is_guest or not (is_organiser or is_treasurer or is_steward)),
      unique (id, club_id)
    );
    create unique index memberships_account on memberships (club_id, account_id) where account_id is not null;
    create index memberships_by_account on memberships (account_id);

    create table invitations (
      id uuid primary key default gen_random_uuid(),
      club_id uuid not null references clubs,
      kind text not null check (kind in ('link', 'email')),
      token_hash text not null unique,
      email text,
      guest_membership_id uuid references memberships,
      created_by_id uuid not null references memberships,
      expires_at timestamptz not null,
      revoked_at timestamptz,
      accepted_at timestamptz,
      accepted_by_id uuid references memberships,
      created_at timestamptz not null default now()
    );
    create index invitations_club on invitations (club_id);

    create table rate_limits (
      key text primary key,
      hits integer not null,
      resets_at timestamptz not null
    );

    create table audit_entries (
      id bigint generated always as identity primary key,
      club_id uuid not null references clubs,
      buy_id uuid,
      actor_id uuid,
      actor_name text not null,
      action text not null,
      subject_type text not null,
      subject_id text,
      before jsonb,
      after jsonb,
      request_id text,
      at timestamptz not null default clock_timestamp()
    );
    create index audit_entries_club on audit_entries (club_id, id desc);
    create index audit_entries_buy on audit_entries (buy_id, id desc) where buy_id is not null;

    create table uploads (
      id uuid primary key default gen_random_uuid(),
      club_id uuid not null references clubs,
      owner_type text not null check (owner_type in ('offer', 'supplier', 'bag', 'bill', 'line', 'buy', 'supplier_order')),
      owner_id uuid not null,
      purpose text not null check (purpose in ('price_list', 'certificate', 'photo', 'bill', 'safety_sheet')),
      file_name text not null,
      content_type text not null,
      bytes integer not null check (bytes between 1 and 10485760),
      sha256 text not null,
      storage_key text not null unique,
      created_by_id uuid not null references memberships,
      created_at timestamptz not null default now(),
      deleted_at timestamptz
    );
    create index uploads_owner on uploads (owner_type, owner_id);

    create table notices (
      id uuid primary key default gen_random_uuid(),
      club_id uuid not null references clubs,
      membership_id uuid not null references memberships,
      buy_id uuid,
      kind text not null,
      event_key text not null,
      subject text not null,
      body text not null,
      path text,
      read_at timestamptz,
      created_at timestamptz not null default clock_timestamp(),
      unique (event_key, membership_id)
    );
    create index notices_member on notices (membership_id, created_at desc);

    create table outbox (
      id uuid primary key default gen_random_uuid(),
      club_id uuid references clubs,
      notice_id uuid references notices,
      buy_id uuid,
      kind text not null,
      event_key text not null,
      address text not null,
      message_id text not null unique,
      subject text not null,
      text_body text not null,
      html_body text not null,
      headers jsonb not null default '{}',
      attachments jsonb not null default '[]',
      state text not null default 'queued' check (state in ('queued', 'sent', 'failed')),
      attempts integer not null default 0,
      next_attempt_at timestamptz not null default clock_timestamp(),
      sent_at timestamptz,
      last_error text,
      created_at timestamptz not null default clock_timestamp(),
      unique (event_key, address)
    );
    create index outbox_due on outbox (next_attempt_at) where state = 'queued';

    create table ledger_accounts (
      id uuid primary key default gen_random_uuid(),
      club_id uuid not null references clubs,
      kind text not null check (kind in ('bank', 'cash', 'cash_held', 'card_clearing', 'member', 'supplier', 'buy', 'shelf', 'fees', 'losses', 'rounding')),
      ref_id uuid,
      created_at timestamptz not null default now(),
      check ((kind in ('cash_held', 'member', 'supplier', 'buy')) = (ref_id is not null))
    );
    create unique index ledger_accounts_of on ledger_accounts (club_id, kind, coalesce(ref_id, '00000000-0000-0000-0000-000000000000'));

    create table ledger_transactions (
      id uuid primary key default gen_random_uuid(),
      club_id uuid not null references clubs,
      event_type text not null,
      event_id text not null,
      on_date date not null,
      memo text not null default '',
      buy_id uuid,
      reverses_id uuid unique references ledger_transactions,
      created_by_id uuid references memberships,
      created_at timestamptz not null default clock_timestamp(),
      unique (club_id, event_type, event_id)
    );
    create index ledger_transactions_club on ledger_transactions (club_id, created_at);
    create index ledger_transactions_buy on ledger_transactions (buy_id) where buy_id is not null;

    create table ledger_postings (
      id bigint generated always as identity primary key,
      transaction_id uuid not null references ledger_transactions,
      account_id uuid not null references ledger_accounts,
      amount_minor bigint not null check (amount_minor <> 0)
    );
    create index ledger_postings_account on ledger_postings (account_id);
    create index ledger_postings_transaction on ledger_postings (transaction_id);

    create function ledger_must_balance() returns trigger language plpgsql as $$
    begin
      if (select coalesce(sum(amount_minor), 0) from ledger_postings where transaction_id = new.transaction_id) <> 0 then
        raise exception 'ledger transaction % does not balance', new.transaction_id using errcode = 'check_violation';
      end if;
      if exists (
        select 1 from ledger_accounts a join ledger_transactions t on t.id = new.transaction_id
        where a.id = new.account_id and a.club_id <> t.club_id
      ) then
        raise exception 'ledger posting crosses clubs' using errcode = 'check_violation';
      end if;
      return null;
    end $$;
    create constraint trigger ledger_balanced after insert on ledger_postings
      deferrable initially deferred for each row execute function ledger_must_balance();

    create function append_only() returns trigger language plpgsql as $$
    begin
      raise exception '% is append only', tg_table_name using errcode = 'restrict_violation';
    end $$;
    create trigger ledger_postings_append_only before update or delete on ledger_postings
      for each row execute function append_only();
    create trigger ledger_transactions_append_only before update or delete on ledger_transactions
      for each row execute function append_only();
    create trigger audit_entries_append_only before update or delete on audit_entries
      for each row execute function append_only();

    create table socket_io_attachments (
      id bigserial unique,
      created_at timestamptz default now(),
      payload bytea
    );
  `);
};
