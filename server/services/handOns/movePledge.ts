import { execute, select, type Tx } from '../../config/database.ts';
import type { Hand } from './moveSnapshots.ts';
import type { OwnLine } from './handOnRows.ts';

interface Held {
  id: string;
  wanted_mg: number;
  up_to_mg: number | null;
  at: Date;
  living: boolean;
}

/** Room of a pledge: what it would take at most. */
const most = (pledge: { wanted_mg: number; up_to_mg: number | null }) =>
  Math.max(pledge.wanted_mg, pledge.up_to_mg ?? 0);

/**
 * The pledge goes over to the taker; where they have one on that line, the two become one with the later turn. The
 * giver's row stays as history, dropped.
 */
export async function movePledge(
  { lineId, fromId, toId }: Hand,
  given: OwnLine,
  reason: string,
  sheetVersion: number,
  tx: Tx,
): Promise<void> {
  const [held] = await select<Held>(
    `select id, wanted_mg, up_to_mg, at, dropped_at is null as living from pledges
     where line_id = :lineId and membership_id = :toId for update`,
    { lineId, toId },
    tx,
  );
  const joins = held?.living ? held : null;
  const anyRoom = given.up_to_mg !== null || (joins !== null && joins.up_to_mg !== null);
  const values = {
    lineId,
    toId,
    wantedMg: given.wanted_mg + (joins?.wanted_mg ?? 0),
    upToMg: anyRoom ? most(given) + (joins ? most(joins) : 0) : null,
    at: joins && joins.at > given.at ? joins.at : given.at,
    sheetVersion,
  };
  await execute(
    `insert into pledges (id, buy_id, line_id, membership_id, wanted_mg, up_to_mg, at, changed_sheet_version, created_at, updated_at)
     select gen_random_uuid(), buy_id, id, :toId, :wantedMg, :upToMg, :at, :sheetVersion, now(), now()
     from lines where id = :lineId
     on conflict (line_id, membership_id) do update set wanted_mg = :wantedMg, up_to_mg = :upToMg, at = :at,
       version = pledges.version + 1, changed_sheet_version = :sheetVersion, dropped_at = null,
       dropped_reason = null, updated_at = now()`,
    values,
    tx,
  );
  await execute(
    `update pledges set dropped_at = clock_timestamp(), dropped_reason = :reason, version = version + 1,
       changed_sheet_version = :sheetVersion, updated_at = now()
     where line_id = :lineId and membership_id = :fromId`,
    { lineId, fromId, reason, sheetVersion },
    tx,
  );
}
