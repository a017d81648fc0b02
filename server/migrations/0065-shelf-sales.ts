import type { Migration } from '../config/migrate.ts';

/** What a sale took off the shelf's cost, and the record it made of a reportable salt. */
export const up: Migration = async (sql) => {
  await sql(`
    alter table shelf_sales add column cost_minor bigint not null default 0;
    alter table precursor_records add column sale_id uuid references shelf_sales;
    create index shelf_sales_stock on shelf_sales (stock_id);
    create index buy_members_slot on buy_members (slot_id) where slot_id is not null;
    create index portions_handover on portions (handover_id) where handover_id is not null;
  `);
};
