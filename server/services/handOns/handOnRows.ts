import { select, type Tx } from '../../config/database.ts';

/** A hand-on with what it is about. */
export interface HandOnRow {
  id: string;
  line_id: string;
  salt_id: string;
  from_id: string;
  from_name: string;
  to_id: string;
  to_name: string;
  state: 'offered' | 'accepted' | 'declined' | 'withdrawn';
  mg: number | null;
  amount_minor: number | null;
  created_at: Date;
  answered_at: Date | null;
}

/** Hand-ons of a buy, newest first, or the one with this id. */
export async function findHandOns(buyId: string, id: string | null, tx: Tx): Promise<HandOnRow[]> {
  return select<HandOnRow>(
    `select h.*, l.salt_id, f.display_name as from_name, t.display_name as to_name
     from hand_ons h join lines l on l.id = h.line_id
     join memberships f on f.id = h.from_id join memberships t on t.id = h.to_id
     where h.buy_id = :buyId ${id ? 'and h.id = :id' : ''} order by h.created_at desc, h.id`,
    { buyId, ...(id ? { id } : {}) },
    tx,
  );
}

/** A living pledge that nothing of was handed over yet. */
export interface OwnLine {
  line_id: string;
  salt_id: string;
  wanted_mg: number;
  up_to_mg: number | null;
  at: Date;
}

/** The lines a member could hand on: pledged, not dropped, and still with the club. */
export async function findOwnLines(
  buyId: string,
  membershipId: string,
  tx: Tx,
): Promise<OwnLine[]> {
  return select<OwnLine>(
    `select p.line_id, l.salt_id, p.wanted_mg, p.up_to_mg, p.at
     from pledges p join lines l on l.id = p.line_id and l.removed_at is null
     left join buy_members bm on bm.buy_id = p.buy_id and bm.membership_id = p.membership_id
     where p.buy_id = :buyId and p.membership_id = :membershipId and p.dropped_at is null and p.wanted_mg > 0
       and bm.collected_at is null and bm.dropped_at is null
       and not exists (select 1 from portions o where o.line_id = p.line_id
         and o.membership_id = p.membership_id and o.handed_over_at is not null)
     order by l.position, l.id`,
    { buyId, membershipId },
    tx,
  );
}
