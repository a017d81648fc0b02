import type { Migration } from '../config/migrate.ts';

/** Why a portion fell away, when a bag was closed, on which scale something was weighed, and what the final share took in. */
export const up: Migration = async (sql) => {
  await sql(`
    alter table buys add column split_version integer not null default 0;
    alter table buys add column excess_loss_by_id uuid references memberships;
    alter table buys add column excess_loss_at timestamptz;

    alter table snapshots add column extra jsonb;

    alter table bags add column extra boolean not null default false;
    alter table bags add column closed_at timestamptz;
    alter table bags add column closed_by_id uuid references memberships;
    alter table bags add column unaccounted_note text not null default '';
    alter table bags add check ((closed_at is null) = (shelf_mg is null));

    alter table portions add column station text not null default '';
    alter table portions add column void_reason text not null default '';
    alter table portions add column voided_by_id uuid references memberships;
    alter table portions add check (state <> 'done' or (weighed_mg is not null and charged_mg is not null and bag_id is not null));

    alter table weighings add column band_mg bigint not null default 0;
    alter table weighings add column division_mg bigint not null default 1;
    alter table weighings add column capacity_mg bigint;
    create unique index weighings_standing on weighings (portion_id) where undone_at is null;
    create index weighings_bag on weighings (bag_id) where undone_at is null;
    create index spills_bag on spills (bag_id) where undone_at is null;
    create index bags_order on bags (supplier_order_id);
  `);
};
