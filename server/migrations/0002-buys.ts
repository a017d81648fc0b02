import type { Migration } from '../config/migrate.ts';

/** Salts, suppliers, offers and everything a buy holds from draft to settled. */
export const up: Migration = async (sql) => {
  await sql(`
    create table club_salts (
      id uuid primary key default gen_random_uuid(),
      club_id uuid not null references clubs,
      kind text not null check (kind in ('salt', 'trace_mix')),
      name text not null,
      formula text,
      cas text,
      composition jsonb not null default '{}',
      hazard_statements jsonb not null default '[]',
      signal_word text,
      storage text not null default '',
      note text not null default '',
      archived_at timestamptz,
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now()
    );
    create unique index club_salts_name on club_salts (club_id, lower(name)) where archived_at is null;

    create table hidden_salts (
      club_id uuid not null references clubs,
      salt_id text not null,
      primary key (club_id, salt_id)
    );

    create table suppliers (
      id uuid primary key default gen_random_uuid(),
      club_id uuid not null references clubs,
      name text not null,
      contact text not null default '',
      email text not null default '',
      website text not null default '',
      note text not null default '',
      is_shelf boolean not null default false,
      shipping jsonb not null,
      free_shipping_from_minor bigint check (free_shipping_from_minor >= 0),
      minimum_order_minor bigint check (minimum_order_minor >= 0),
      archived_at timestamptz,
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      unique (id, club_id)
    );
    create unique index suppliers_name on suppliers (club_id, lower(name)) where archived_at is null;

    create table offers (
      id uuid primary key default gen_random_uuid(),
      club_id uuid not null references clubs,
      supplier_id uuid not null references suppliers,
      salt_id text not null,
      label text not null default '',
      pack_mg bigint not null check (pack_mg > 0),
      price_minor bigint not null check (price_minor >= 0),
      price_includes_tax boolean not null default true,
      tax_rate_ppm integer not null default 0 check (tax_rate_ppm between 0 and 1000000),
      stock_packs integer check (stock_packs >= 0),
      multiple_of integer not null default 1 check (multiple_of >= 1),
      link text not null default '',
      archived_at timestamptz,
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      foreign key (supplier_id, club_id) references suppliers (id, club_id)
    );
    create index offers_supplier on offers (supplier_id);
    create index offers_salt on offers (club_id, salt_id);

    create table offer_prices (
      id bigint generated always as identity primary key,
      offer_id uuid not null references offers,
      price_minor bigint not null,
      price_includes_tax boolean not null,
      tax_rate_ppm integer not null,
      set_by_id uuid references memberships,
      set_at timestamptz not null default clock_timestamp()
    );
    create index offer_prices_offer on offer_prices (offer_id, id desc);

    create table buys (
      id uuid primary key default gen_random_uuid(),
      club_id uuid not null references clubs,
      name text not null,
      state text not null default 'draft' check (state in ('draft', 'open', 'locked', 'ordered', 'arrived', 'splitting', 'pickup', 'settled', 'cancelled')),
      responsible_id uuid not null references memberships,
      offered_to_id uuid references memberships,
      terms_version integer not null default 1,
      sheet_version integer not null default 1,
      minimum_kind text not null default 'none' check (minimum_kind in ('none', 'mass', 'value', 'members')),
      minimum_amount bigint not null default 0 check (minimum_amount >= 0),
      price_limit_permille integer not null default 100 check (price_limit_permille between 0 and 1000),
      due_days integer not null default 5 check (due_days between 0 and 90),
      due_at timestamptz,
      closes_at timestamptz,
      frozen_at timestamptz,
      frozen_until timestamptz,
      splits_at timestamptz,
      split_ends_at timestamptz,
      place text not null default '',
      pickup_rules text not null default '',
      note text not null default '',
      lowering_freeze_hours integer not null default 24 check (lowering_freeze_hours between 0 and 336),
      left_over_payer text not null default 'members' check (left_over_payer in ('members', 'shelf')),
      shelf_limit_minor bigint not null default 0 check (shelf_limit_minor >= 0),
      spread_max_permille integer not null default 100 check (spread_max_permille between 0 and 100),
      band_permille integer not null default 5 check (band_permille between 0 and 100),
      unclaimed_days integer not null default 60 check (unclaimed_days between 1 and 365),
      target_version integer not null default 0,
      plan jsonb,
      plan_version integer,
      plan_override jsonb,
      copied_from_id uuid references buys,
      reopen_reason text,
      cancel_reason text,
      opened_at timestamptz,
      locked_at timestamptz,
      ordered_at timestamptz,
      arrived_at timestamptz,
      splitting_at timestamptz,
      pickup_at timestamptz,
      settled_at timestamptz,
      cancelled_at timestamptz,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      unique (id, club_id),
      check (state = 'draft' or state = 'cancelled' or closes_at is not null)
    );
    create index buys_club on buys (club_id, created_at desc);
    create index buys_closing on buys (closes_at) where state = 'open';

    create table buy_organisers (
      buy_id uuid not null references buys,
      membership_id uuid not null references memberships,
      created_at timestamptz not null default now(),
      primary key (buy_id, membership_id)
    );

    create table buy_helpers (
      buy_id uuid not null references buys,
      membership_id uuid not null references memberships,
      takes_cash boolean not null default false,
      created_at timestamptz not null default now(),
      primary key (buy_id, membership_id)
    );

    create table lines (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      salt_id text not null,
      position integer not null,
      step_mg bigint not null default 1000 check (step_mg between 1 and 10000000),
      reserve_permyriad integer not null default 50 check (reserve_permyriad between 0 and 300),
      surplus text not null default 'spread' check (surplus in ('spread', 'shelf')),
      shortage text not null default 'scale' check (shortage in ('scale', 'queue')),
      any_of_supplier_id uuid references suppliers,
      note text not null default '',
      unaccounted_note text not null default '',
      removed_at timestamptz,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      unique (id, buy_id)
    );
    create unique index lines_salt on lines (buy_id, salt_id) where removed_at is null;

    create table line_offers (
      line_id uuid not null references lines,
      offer_id uuid not null references offers,
      primary key (line_id, offer_id)
    );

    create table charges (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      kind text not null check (kind in ('freight', 'duty', 'bags', 'rebate', 'other')),
      name text not null,
      amount_minor bigint not null,
      basis text not null check (basis in ('mass', 'value', 'member', 'portion')),
      supplier_id uuid references suppliers,
      line_ids jsonb,
      tax_rate_ppm integer not null default 0 check (tax_rate_ppm between 0 and 1000000),
      position integer not null default 0,
      removed_at timestamptz,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now()
    );
    create index charges_buy on charges (buy_id);

    create table pledges (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      line_id uuid not null,
      membership_id uuid not null references memberships,
      wanted_mg bigint not null check (wanted_mg >= 0),
      up_to_mg bigint check (up_to_mg >= 0),
      at timestamptz(3) not null,
      version integer not null default 1,
      changed_sheet_version integer not null default 1,
      dropped_at timestamptz,
      dropped_reason text,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      unique (line_id, membership_id),
      foreign key (line_id, buy_id) references lines (id, buy_id)
    );
    create index pledges_buy on pledges (buy_id, changed_sheet_version);
    create index pledges_member on pledges (membership_id);

    create table pledge_proposals (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      line_id uuid not null references lines,
      membership_id uuid not null references memberships,
      wanted_mg bigint not null check (wanted_mg > 0),
      up_to_mg bigint,
      proposed_by_id uuid not null references memberships,
      answered_at timestamptz,
      accepted boolean,
      created_at timestamptz not null default now()
    );

    create table hazard_confirmations (
      membership_id uuid not null references memberships,
      salt_id text not null,
      on_paper_by_id uuid references memberships,
      confirmed_at timestamptz not null default now(),
      primary key (membership_id, salt_id)
    );

    create table terms_changes (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      terms_version integer not null,
      summary text not null,
      detail jsonb not null default '{}',
      changed_by_id uuid references memberships,
      at timestamptz not null default clock_timestamp()
    );
    create index terms_changes_buy on terms_changes (buy_id, terms_version);

    create table snapshots (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      kind text not null check (kind in ('estimate', 'ordered', 'targets', 'final')),
      terms_version integer not null,
      request jsonb not null,
      sheet jsonb not null,
      plan jsonb,
      created_at timestamptz not null default clock_timestamp()
    );
    create index snapshots_buy on snapshots (buy_id, kind, created_at desc);

    create table buy_members (
      buy_id uuid not null references buys,
      membership_id uuid not null references memberships,
      locked_minor bigint,
      due_minor bigint,
      final_minor bigint,
      vouched_by_id uuid references memberships,
      vouched_reason text,
      vouched_at timestamptz,
      dropped_at timestamptz,
      over_limit_minor bigint,
      agreed_at timestamptz,
      slot_id uuid,
      pass_token_hash text unique,
      proxy_name text,
      proxy_membership_id uuid references memberships,
      collected_at timestamptz,
      unclaimed_at timestamptz,
      reminders integer not null default 0,
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      primary key (buy_id, membership_id)
    );

    create table hand_ons (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      line_id uuid not null references lines,
      from_id uuid not null references memberships,
      to_id uuid not null references memberships,
      state text not null default 'offered' check (state in ('offered', 'accepted', 'declined', 'withdrawn')),
      mg bigint,
      amount_minor bigint,
      answered_at timestamptz,
      created_at timestamptz not null default now()
    );
    create unique index hand_ons_open on hand_ons (line_id, from_id) where state = 'offered';

    create table supplier_orders (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      supplier_id uuid not null references suppliers,
      state text not null default 'draft' check (state in ('draft', 'placed', 'confirmed', 'arrived', 'short', 'failed')),
      packs jsonb not null,
      goods_minor bigint not null,
      shipping_minor bigint not null,
      reference text not null default '',
      note text not null default '',
      placed_at timestamptz,
      placed_by_id uuid references memberships,
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      unique (buy_id, supplier_id)
    );

    create table bills (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      supplier_order_id uuid not null references supplier_orders,
      number text not null default '',
      billed_on date not null,
      lines jsonb not null,
      charges jsonb not null default '[]',
      goods_minor bigint not null,
      charges_minor bigint not null,
      tax_minor bigint not null default 0,
      total_minor bigint not null,
      paid_by text not null check (paid_by in ('club', 'member')),
      advanced_by_id uuid references memberships,
      entered_by_id uuid not null references memberships,
      confirmed_by_id uuid references memberships,
      confirmed_at timestamptz,
      voided_at timestamptz,
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      check (total_minor = goods_minor + charges_minor),
      check ((paid_by = 'member') = (advanced_by_id is not null))
    );
    create index bills_buy on bills (buy_id);

    create table payments (
      id uuid primary key default gen_random_uuid(),
      club_id uuid not null references clubs,
      buy_id uuid references buys,
      membership_id uuid not null references memberships,
      direction text not null check (direction in ('in', 'refund')),
      method text not null check (method in ('cash', 'transfer')),
      amount_minor bigint not null check (amount_minor > 0),
      received_on date not null,
      reference text not null default '',
      noted_by_id uuid not null references memberships,
      confirmed_by_id uuid references memberships,
      confirmed_at timestamptz,
      reversed_at timestamptz,
      idempotency_key uuid not null,
      created_at timestamptz not null default clock_timestamp(),
      unique (club_id, idempotency_key)
    );
    create index payments_member on payments (membership_id, created_at desc);
    create index payments_buy on payments (buy_id);

    create table bags (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      line_id uuid not null references lines,
      supplier_order_id uuid not null references supplier_orders,
      offer_id uuid not null references offers,
      number integer not null,
      nominal_mg bigint not null check (nominal_mg > 0),
      gross_mg bigint check (gross_mg > 0),
      tare_mg bigint check (tare_mg >= 0),
      tare_assumed boolean not null default true,
      net_mg bigint check (net_mg >= 0),
      lot text not null default '',
      missing boolean not null default false,
      damage text not null default '',
      note text not null default '',
      counted_by_id uuid references memberships,
      counted_at timestamptz,
      station text,
      shelf_mg bigint check (shelf_mg >= 0),
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      unique (buy_id, line_id, number)
    );

    create table portions (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      line_id uuid not null references lines,
      membership_id uuid not null references memberships,
      code text not null,
      part integer not null default 1,
      parts integer not null default 1,
      target_mg bigint not null check (target_mg > 0),
      target_version integer not null default 1,
      state text not null default 'waiting' check (state in ('waiting', 'claimed', 'done', 'void')),
      charged_mg bigint,
      weighed_mg bigint,
      bag_id uuid references bags,
      claimed_by_id uuid references memberships,
      claimed_at timestamptz,
      done_at timestamptz,
      handed_over_at timestamptz,
      handover_id uuid,
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      unique (buy_id, code)
    );
    create index portions_buy on portions (buy_id, line_id);
    create index portions_member on portions (membership_id);

    create table weighings (
      id uuid primary key,
      buy_id uuid not null references buys,
      portion_id uuid not null references portions,
      bag_id uuid not null references bags,
      station text not null default '',
      scale text not null default '',
      reading_mg bigint not null check (reading_mg >= 0),
      charged_mg bigint not null check (charged_mg >= 0),
      verdict text not null check (verdict in ('within', 'below', 'above')),
      second_look boolean not null default false,
      target_mg bigint not null,
      target_version integer not null,
      weighed_by_id uuid not null references memberships,
      undone_at timestamptz,
      created_at timestamptz not null default clock_timestamp()
    );
    create index weighings_portion on weighings (portion_id);

    create table spills (
      id uuid primary key,
      buy_id uuid not null references buys,
      bag_id uuid not null references bags,
      mg bigint not null check (mg > 0),
      note text not null default '',
      noted_by_id uuid not null references memberships,
      undone_at timestamptz,
      created_at timestamptz not null default clock_timestamp()
    );

    create table pickup_slots (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      starts_at timestamptz not null,
      ends_at timestamptz not null,
      place text not null default '',
      capacity integer check (capacity > 0),
      created_at timestamptz not null default now(),
      check (ends_at > starts_at)
    );
    create index pickup_slots_buy on pickup_slots (buy_id, starts_at);

    create table handovers (
      id uuid primary key,
      buy_id uuid not null references buys,
      membership_id uuid not null references memberships,
      method text not null check (method in ('pass', 'name')),
      collected_by text not null default '',
      handed_by_id uuid not null references memberships,
      undone_at timestamptz,
      created_at timestamptz not null default clock_timestamp()
    );
    create index handovers_buy on handovers (buy_id);

    create table precursor_records (
      id uuid primary key default gen_random_uuid(),
      club_id uuid not null references clubs,
      buy_id uuid not null references buys,
      kind text not null check (kind in ('handover', 'loss')),
      salt_id text not null,
      membership_id uuid references memberships,
      legal_name text not null default '',
      mg bigint not null,
      lot text not null default '',
      on_date date not null,
      handed_by_id uuid references memberships,
      handover_id uuid references handovers,
      note text not null default '',
      reported_to text not null default '',
      erase_after date not null,
      created_at timestamptz not null default now()
    );
    create index precursor_records_club on precursor_records (club_id, erase_after);

    create table shelf_stock (
      id uuid primary key default gen_random_uuid(),
      club_id uuid not null references clubs,
      salt_id text not null,
      buy_id uuid references buys,
      bag_id uuid references bags,
      lot text not null default '',
      mg bigint not null check (mg >= 0),
      cost_minor bigint not null default 0,
      price_minor_per_kg bigint check (price_minor_per_kg >= 0),
      origin text not null check (origin in ('left_over', 'unclaimed')),
      owed_to_id uuid references memberships,
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now()
    );
    create index shelf_stock_club on shelf_stock (club_id, salt_id);

    create table shelf_sales (
      id uuid primary key,
      club_id uuid not null references clubs,
      stock_id uuid not null references shelf_stock,
      membership_id uuid not null references memberships,
      mg bigint not null check (mg > 0),
      price_minor bigint not null check (price_minor >= 0),
      sold_by_id uuid not null references memberships,
      undone_at timestamptz,
      created_at timestamptz not null default clock_timestamp()
    );
  `);
};
