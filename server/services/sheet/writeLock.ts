import { TZDate } from '@date-fns/tz';
import { addDays, endOfDay } from 'date-fns';
import type { ShareSheet } from '#shared/domain/shares/shareTypes.ts';
import { databaseNow, execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import type { By } from '../actorName.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { changeTerms } from '../buys/withBuy.ts';
import type { PreparedLock } from './prepareLock.ts';
import { tellLocked } from './tellLocked.ts';

async function dueAt(buy: Buy, now: Date, tx: Tx): Promise<Date> {
  const [club] = await select<{ time_zone: string }>(
    'select time_zone from clubs where id = :clubId',
    { clubId: buy.clubId },
    tx,
  );
  const local = new TZDate(now, club?.time_zone ?? 'UTC');
  return new Date(endOfDay(addDays(local, buy.dueDays)).getTime());
}

/** What each owes from now on; who had a part in an earlier lock and has none now owes nothing. */
async function writeDues(buyId: string, sheet: ShareSheet, tx: Tx): Promise<void> {
  const dues = sheet.members.map(({ memberId, totalMinor }) => ({ memberId, totalMinor }));
  await execute(
    `insert into buy_members as bm (buy_id, membership_id, locked_minor, due_minor)
     select :buyId, d."memberId", d."totalMinor", d."totalMinor"
     from json_to_recordset(:dues) as d("memberId" uuid, "totalMinor" bigint)
     on conflict (buy_id, membership_id) do update set
       locked_minor = excluded.locked_minor, due_minor = excluded.due_minor, dropped_at = null, dropped_reason = null,
       over_limit_minor = null, agreed_at = null,
       vouched_at = case when excluded.due_minor > coalesce(bm.due_minor, 0) then null else bm.vouched_at end,
       vouched_by_id = case when excluded.due_minor > coalesce(bm.due_minor, 0) then null else bm.vouched_by_id end,
       vouched_reason = case when excluded.due_minor > coalesce(bm.due_minor, 0) then null else bm.vouched_reason end,
       version = bm.version + 1, updated_at = now()`,
    { buyId, dues: JSON.stringify(dues) },
    tx,
  );
  await execute(
    `update buy_members set locked_minor = 0, due_minor = 0, over_limit_minor = null, agreed_at = null,
       version = version + 1, updated_at = now()
     where buy_id = :buyId and membership_id not in (
       select d."memberId" from json_to_recordset(:dues) as d("memberId" uuid))`,
    { buyId, dues: JSON.stringify(dues) },
    tx,
  );
}

/** Locks the buy under its row lock with sums that were prepared for exactly this version of its sheet. */
export async function writeLock(
  buy: Buy,
  prepared: PreparedLock & { sheet: ShareSheet },
  by: By,
  tx: Tx,
): Promise<void> {
  const { sheet, plan, request, terms } = prepared;
  const now = await databaseNow(tx);
  buy.state = 'locked';
  buy.lockedAt = now;
  buy.dueAt = await dueAt(buy, now, tx);
  buy.frozenAt = null;
  buy.frozenUntil = null;
  buy.plan = plan;
  buy.planVersion = buy.sheetVersion + 1;
  await changeTerms(buy, 'The buy locked: pledges stand, and what each owes is known.', by, tx);
  await execute(
    `insert into snapshots (buy_id, kind, terms_version, request, sheet, plan, terms)
     values (:buyId, 'estimate', :termsVersion, :request, :sheet, :plan, :terms)`,
    {
      buyId: buy.id,
      termsVersion: buy.termsVersion,
      request: JSON.stringify(request),
      sheet: JSON.stringify(sheet),
      plan: JSON.stringify(plan),
      terms: JSON.stringify(terms),
    },
    tx,
  );
  await writeDues(buy.id, sheet, tx);
  await execute(
    `update pledge_proposals set answered_at = clock_timestamp(), accepted = false
     where buy_id = :buyId and answered_at is null`,
    { buyId: buy.id },
    tx,
  );
  await writeAudit(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    by,
    action: 'buys.lock',
    subject: { type: 'buy', id: buy.id },
    before: { state: 'open' },
    after: { state: 'locked', packs: plan.packs, totalMinor: sheet.totalMinor },
  });
  await tellLocked(buy, prepared, tx);
  const { id: buyId, sheetVersion } = buy;
  tx.afterCommit(() =>
    publishToBuy(buyId, 'buy:changed', {
      kind: 'state',
      buyId,
      sheetVersion,
      state: 'locked',
      frozen: false,
    }),
  );
}
