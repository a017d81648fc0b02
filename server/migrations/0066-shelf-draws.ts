import type { Migration } from '../config/migrate.ts';

/** What a buy took from each lot on the shelf, and that a club has one shelf among its suppliers. */
export const up: Migration = async (sql) => {
  await sql(`
    create unique index suppliers_shelf on suppliers (club_id) where is_shelf;
    create table shelf_draws (
      id uuid primary key default gen_random_uuid(),
      buy_id uuid not null references buys,
      supplier_id uuid not null references suppliers,
      offer_id uuid not null references offers,
      stock_id uuid not null references shelf_stock,
      packs integer not null check (packs > 0),
      mg bigint not null check (mg > 0),
      cost_minor bigint not null,
      price_minor bigint not null check (price_minor >= 0),
      returned_at timestamptz,
      created_at timestamptz not null default clock_timestamp()
    );
    create index shelf_draws_buy on shelf_draws (buy_id, supplier_id);
    create index shelf_draws_stock on shelf_draws (stock_id);
  `);
};
