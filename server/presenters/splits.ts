import type { Bag, Portion, Spill } from '#shared/schemas/splits.ts';

export interface BagRow {
  id: string;
  line_id: string;
  supplier_id: string;
  supplier: string;
  offer_id: string;
  number: number;
  nominal_mg: number;
  gross_mg: number | null;
  tare_mg: number | null;
  tare_assumed: boolean;
  net_mg: number | null;
  lot: string;
  missing: boolean;
  extra: boolean;
  damage: string;
  note: string;
  counted_by: string | null;
  counted_at: Date | null;
  portions_mg: number;
  spilled_mg: number;
  spills: Spill[];
  shelf_mg: number | null;
  closed_at: Date | null;
  closed_by: string | null;
  unaccounted_note: string;
  files: number;
  version: number;
}

export interface PortionRow {
  id: string;
  line_id: string;
  membership_id: string;
  member: string;
  code: string;
  part: number;
  parts: number;
  target_mg: number;
  target_version: number;
  state: Portion['state'];
  charged_mg: number | null;
  weighed_mg: number | null;
  bag_id: string | null;
  claimed_by_id: string | null;
  claimed_by: string | null;
  claimed_at: Date | null;
  station: string;
  void_reason: string;
  voided_by_id: string | null;
  handed_over_at: Date | null;
  created_at: Date;
  version: number;
  weighing: Portion['weighing'];
}

const instant = (at: Date | null) => at?.toISOString() ?? null;

/** A bag as replies and live messages have it. */
export function presentBag(row: BagRow): Bag {
  return {
    id: row.id,
    lineId: row.line_id,
    supplierId: row.supplier_id,
    supplier: row.supplier,
    offerId: row.offer_id,
    number: row.number,
    nominalMg: row.nominal_mg,
    grossMg: row.gross_mg,
    tareMg: row.tare_mg,
    tareAssumed: row.tare_assumed,
    netMg: row.net_mg,
    lot: row.lot,
    missing: row.missing,
    extra: row.extra,
    damage: row.damage,
    note: row.note,
    countedBy: row.counted_by,
    countedAt: instant(row.counted_at),
    portionsMg: row.portions_mg,
    spilledMg: row.spilled_mg,
    spills: row.spills,
    shelfMg: row.shelf_mg,
    closedAt: instant(row.closed_at),
    closedBy: row.closed_by,
    unaccountedNote: row.unaccounted_note,
    files: row.files,
    version: row.version,
  };
}

/** A portion as replies and live messages have it. */
export function presentPortion(row: PortionRow): Portion {
  return {
    id: row.id,
    lineId: row.line_id,
    member: { membershipId: row.membership_id, name: row.member },
    code: row.code,
    part: row.part,
    parts: row.parts,
    targetMg: row.target_mg,
    targetVersion: row.target_version,
    state: row.state,
    chargedMg: row.charged_mg,
    weighedMg: row.weighed_mg,
    bagId: row.bag_id,
    claimedBy:
      row.claimed_by_id === null
        ? null
        : { membershipId: row.claimed_by_id, name: row.claimed_by ?? '' },
    claimedAt: instant(row.claimed_at),
    station: row.station,
    weighing: row.weighing,
    voidReason: row.void_reason,
    handedOverAt: instant(row.handed_over_at),
    version: row.version,
  };
}
