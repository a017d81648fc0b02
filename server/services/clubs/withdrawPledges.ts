import { execute, select, type Tx } from '../../config/database.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import type { By } from '../actorName.ts';
import { requestPlan } from '../sheet/planning.ts';

interface Living {
  id: string;
  wanted_mg: number;
  up_to_mg: number | null;
}

async function withdrawFrom(
  tx: Tx,
  buy: { id: string; club_id: string },
  membershipId: string,
  by: By,
): Promise<void> {
  const pledges = await select<Living>(
    `select id, wanted_mg, up_to_mg from pledges
     where buy_id = :buyId and membership_id = :membershipId and (wanted_mg > 0 or up_to_mg > 0)
     order by id for update`,
    { buyId: buy.id, membershipId },
    tx,
  );
  let sheetVersion = 0;
  for (const pledge of pledges) {
    const [changed] = await select<{ sheet_version: number }>(
      `with sheet as (
         update buys set sheet_version = sheet_version + 1, updated_at = now() where id = :buyId returning sheet_version)
       update pledges set wanted_mg = 0, up_to_mg = null, version = version + 1, updated_at = now(),
         changed_sheet_version = (select sheet_version from sheet)
       where id = :id returning changed_sheet_version as sheet_version`,
      { buyId: buy.id, id: pledge.id },
      tx,
    );
    if (!changed) continue;
    sheetVersion = changed.sheet_version;
    await writeAudit(tx, {
      clubId: buy.club_id,
      buyId: buy.id,
      by,
      action: 'buys.withdraw',
      subject: { type: 'membership', id: membershipId },
      before: { wantedMg: pledge.wanted_mg, upToMg: pledge.up_to_mg },
      after: { wantedMg: 0, upToMg: null },
    });
  }
  if (pledges.length === 0) return;
  tx.afterCommit(() => {
    publishToBuy(buy.id, 'buy:changed', { buyId: buy.id, kind: 'pledges', sheetVersion });
    requestPlan(buy.id);
  });
}

/**
 * Withdraws a member's pledges in all buys that are open; from the lock on they stand. Each buy is locked, in the order
 * of ids.
 */
export async function withdrawPledges(tx: Tx, membershipId: string, by: By): Promise<void> {
  const buys = await select<{ id: string; club_id: string }>(
    `select id, club_id from buys where state = 'open'
       and id in (select buy_id from pledges where membership_id = :membershipId)
     order by id for update`,
    { membershipId },
    tx,
  );
  for (const buy of buys) await withdrawFrom(tx, buy, membershipId, by);
  await execute(
    `update pledge_proposals set answered_at = clock_timestamp(), accepted = false
     where membership_id = :membershipId and answered_at is null`,
    { membershipId },
    tx,
  );
}
