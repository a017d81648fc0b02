import { hazardText } from '#shared/domain/salts/hazards.ts';
import type { ClubSalt } from '#shared/schemas/salts.ts';
import type { PickupPortion } from '#shared/schemas/pickup.ts';
import { select, type Tx } from '../../config/database.ts';
import { saltsByIds } from '../salts/saltsOfClub.ts';

export interface PortionOfMember extends PickupPortion {
  readonly membershipId: string;
  readonly reportable: boolean;
  readonly classified: boolean;
}

interface Row {
  id: string;
  membership_id: string;
  line_id: string;
  salt_id: string;
  code: string;
  part: number;
  parts: number;
  weighed_mg: number;
  lot: string;
  handed_over_at: Date | null;
}

function present(row: Row, salt: ClubSalt | undefined): PortionOfMember {
  return {
    id: row.id,
    membershipId: row.membership_id,
    lineId: row.line_id,
    saltId: row.salt_id,
    salt: salt?.name ?? row.salt_id,
    formula: salt?.formula ?? null,
    code: row.code,
    part: row.part,
    parts: row.parts,
    mg: row.weighed_mg,
    lot: row.lot,
    signalWord: salt?.signalWord ?? null,
    hazards: salt?.statements.map(hazardText) ?? [],
    handedOverAt: row.handed_over_at?.toISOString() ?? null,
    reportable: salt?.reportable ?? false,
    classified: salt?.classified ?? false,
  };
}

/** Weighed portions of a buy, in the order of lines and codes; only one member's when named. */
export async function portionsOf(
  buy: { id: string; clubId: string },
  tx?: Tx,
  membershipId?: string,
): Promise<PortionOfMember[]> {
  const rows = await select<Row>(
    `select p.id, p.membership_id, p.line_id, l.salt_id, p.code, p.part, p.parts,
        p.weighed_mg, coalesce(b.lot, '') as lot, p.handed_over_at
     from portions p join lines l on l.id = p.line_id left join bags b on b.id = p.bag_id
     where p.buy_id = :buyId and p.state = 'done' ${membershipId ? 'and p.membership_id = :membershipId' : ''}
     order by l.position, l.id, length(p.code), p.code`,
    { buyId: buy.id, ...(membershipId ? { membershipId } : {}) },
    tx,
  );
  const salts = await saltsByIds(buy.clubId, [...new Set(rows.map((row) => row.salt_id))], tx);
  return rows.map((row) => present(row, salts.get(row.salt_id)));
}

const wireKeys = [
  'id',
  'lineId',
  'saltId',
  'salt',
  'formula',
  'code',
  'part',
  'parts',
  'mg',
  'lot',
  'signalWord',
  'hazards',
  'handedOverAt',
] as const satisfies readonly (keyof PickupPortion)[];

/** A portion without what only the server needs to know. */
export function wirePortion(portion: PortionOfMember): PickupPortion {
  return Object.fromEntries(wireKeys.map((key) => [key, portion[key]])) as PickupPortion;
}
