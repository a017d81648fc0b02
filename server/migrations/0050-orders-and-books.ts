import type { Migration } from '../config/migrate.ts';

/** Postings that name a buy of their own, what the supplier paid back, what the club bears, and dues that were reminded of. */
export const up: Migration = async (sql) => {
  await sql(`
    alter table ledger_postings add column buy_id uuid references buys;
    alter table ledger_postings disable trigger ledger_postings_append_only;
    update ledger_postings p set buy_id = t.buy_id from ledger_transactions t where t.id = p.transaction_id;
    alter table ledger_postings enable trigger ledger_postings_append_only;
    create index ledger_postings_buy on ledger_postings (buy_id, account_id) where buy_id is not null;

    -- A transaction is complete with the database transaction that wrote it: nothing is added to it later.
    alter table ledger_transactions add column written_in bigint not null default 0;
    alter table ledger_transactions alter column written_in set default txid_current();
    create or replace function ledger_must_balance() returns trigger language plpgsql as $$
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
      if exists (
        select 1 from buys b join ledger_transactions t on t.id = new.transaction_id
        where b.id = new.buy_id and b.club_id <> t.club_id
      ) then
        raise exception 'ledger posting names a buy of another club' using errcode = 'check_violation';
      end if;
      if (select written_in from ledger_transactions where id = new.transaction_id) <> txid_current() then
        raise exception 'ledger transaction % is complete', new.transaction_id using errcode = 'restrict_violation';
      end if;
      return null;
    end $$;

    create trigger ledger_postings_no_truncate before truncate on ledger_postings
      for each statement execute function append_only();
    create trigger ledger_transactions_no_truncate before truncate on ledger_transactions
      for each statement execute function append_only();
    create trigger ledger_accounts_fixed before update or delete on ledger_accounts
      for each row execute function append_only();

    alter table payments add column rounding_minor bigint not null default 0;
    alter table payments add column reversed_by_id uuid references memberships;
    alter table payments add column reversed_reason text;
    create index payments_unconfirmed on payments (club_id) where confirmed_at is null and reversed_at is null;

    alter table buy_members add column due_reminders integer not null default 0;
    alter table buy_members add column due_reminded_at timestamptz;
    alter table buy_members add column dropped_reason text;

    alter table supplier_orders add column quoted_at timestamptz;
    alter table supplier_orders add column quoted_by_id uuid references memberships;
    alter table supplier_orders add column placed_on date;

    alter table bills add column posted_from text not null default 'bank' check (posted_from in ('bank', 'cash'));
    alter table bills add column voided_by_id uuid references memberships;
    alter table bills add column voided_reason text;

    create table supplier_refunds (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      supplier_order_id uuid not null references supplier_orders,
      amount_minor bigint not null check (amount_minor > 0),
      received_on date not null,
      into_account text not null check (into_account in ('bank', 'cash')),
      reference text not null default '',
      recorded_by_id uuid not null references memberships,
      reversed_at timestamptz,
      reversed_reason text,
      idempotency_key uuid not null,
      created_at timestamptz not null default clock_timestamp(),
      unique (buy_id, idempotency_key)
    );

    create table buy_losses (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      supplier_order_id uuid references supplier_orders,
      amount_minor bigint not null check (amount_minor <> 0),
      reason text not null,
      booked_by_id uuid not null references memberships,
      reversed_at timestamptz,
      idempotency_key uuid not null,
      created_at timestamptz not null default clock_timestamp(),
      unique (buy_id, idempotency_key)
    );
  `);
};
