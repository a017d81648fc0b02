import type { BagRow, PortionRow } from '../../presenters/splits.ts';
import { select, type Tx } from '../../config/database.ts';

// JSON has no instants: written as the wire has them.
const utc = (column: string) =>
  `to_char(${column} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')`;

/** The bags of a buy with what was taken out of them; only some when `ids` are given. */
export async function findBags(buyId: string, tx?: Tx, ids?: readonly string[]): Promise<BagRow[]> {
  if (ids?.length === 0) return [];
  return select<BagRow>(
    `select b.id, b.line_id, so.supplier_id, s.name as supplier, b.offer_id, b.number, b.nominal_mg, b.gross_mg,
        b.tare_mg, b.tare_assumed, b.net_mg, b.lot, b.missing, b.extra, b.damage, b.note,
        cm.display_name as counted_by, b.counted_at, b.shelf_mg, b.closed_at, xm.display_name as closed_by,
        b.unaccounted_note, b.version,
        (select coalesce(sum(p.weighed_mg), 0)::bigint from portions p where p.bag_id = b.id and p.state = 'done') as portions_mg,
        (select coalesce(sum(x.mg), 0)::bigint from spills x where x.bag_id = b.id and x.undone_at is null) as spilled_mg,
        (select coalesce(json_agg(json_build_object('id', x.id, 'mg', x.mg, 'note', x.note, 'at', ${utc('x.created_at')},
            'by', json_build_object('membershipId', xn.id, 'name', xn.display_name)) order by x.created_at), '[]'::json)
          from spills x join memberships xn on xn.id = x.noted_by_id
          where x.bag_id = b.id and x.undone_at is null) as spills,
        (select count(*)::int from uploads u where u.owner_type = 'bag' and u.owner_id = b.id and u.deleted_at is null) as files
     from bags b join lines l on l.id = b.line_id
     join supplier_orders so on so.id = b.supplier_order_id join suppliers s on s.id = so.supplier_id
     left join memberships cm on cm.id = b.counted_by_id
     left join memberships xm on xm.id = b.closed_by_id
     where b.buy_id = :buyId ${ids ? 'and b.id in (:ids)' : ''}
     order by l.position, l.id, b.number`,
    { buyId, ...(ids ? { ids } : {}) },
    tx,
  );
}

/** The portions of a buy in the order of their lines and codes; only some when `ids` are given. */
export async function findPortions(
  buyId: string,
  tx?: Tx,
  ids?: readonly string[],
): Promise<PortionRow[]> {
  if (ids?.length === 0) return [];
  return select<PortionRow>(
    `select p.id, p.line_id, p.membership_id, m.display_name as member, p.code, p.part, p.parts, p.target_mg,
        p.target_version, p.state, p.charged_mg, p.weighed_mg, p.bag_id, p.claimed_by_id,
        cm.display_name as claimed_by, p.claimed_at, p.station, p.void_reason, p.voided_by_id, p.handed_over_at,
        p.created_at, p.version,
        (select json_build_object('id', w.id, 'readingMg', w.reading_mg, 'chargedMg', w.charged_mg,
            'verdict', w.verdict, 'station', w.station, 'scale', w.scale, 'at', ${utc('w.created_at')},
            'by', json_build_object('membershipId', wm.id, 'name', wm.display_name))
          from weighings w join memberships wm on wm.id = w.weighed_by_id
          where w.portion_id = p.id and w.undone_at is null) as weighing
     from portions p join lines l on l.id = p.line_id join memberships m on m.id = p.membership_id
     left join memberships cm on cm.id = p.claimed_by_id
     where p.buy_id = :buyId ${ids ? 'and p.id in (:ids)' : ''}
     order by l.position, l.id, length(p.code), p.code`,
    { buyId, ...(ids ? { ids } : {}) },
    tx,
  );
}
