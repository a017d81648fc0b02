import type { Migration } from '../config/migrate.ts';

/** A bill for something no supplier's order has, such as bags from a shop, names who was paid. */
export const up: Migration = async (sql) => {
  await sql(`
    alter table bills alter column supplier_order_id drop not null;
    alter table bills add column payee text not null default '';
    alter table bills add check (supplier_order_id is not null or payee <> '');
  `);
};
