import { groupReference, paymentReference } from '#shared/domain/ledger/reference.ts';
import { execute, select, transact, type Tx } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import { Club } from '../../models/Club.ts';
import { systemActor, type By } from '../actorName.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { owedOfBuy } from '../ledger/owed.ts';
import { clubMoney } from '../ledger/paymentWords.ts';
import { queueNotice } from '../notices/queueNotice.ts';

const states = ['locked', 'ordered', 'arrived', 'splitting', 'pickup'] as const;

interface DueRow {
  membership_id: string;
  due_reminders: number;
}

/** Asks those who still owe for the buy once more, under its lock. @returns how many were told */
async function remindUnderLock(
  buy: Buy,
  only: ReadonlySet<string> | null,
  by: By,
  tx: Tx,
): Promise<number> {
  const club = await Club.findByPk(buy.clubId, {
    transaction: tx.transaction,
    rejectOnEmpty: true,
  });
  const owed = await owedOfBuy(buy.id, tx);
  const rows = await select<DueRow>(
    `select membership_id, due_reminders from buy_members where buy_id = :buyId and dropped_at is null`,
    { buyId: buy.id },
    tx,
  );
  const late = rows.filter(
    ({ membership_id }) =>
      (owed.get(membership_id)?.openMinor ?? 0) > 0 && (only?.has(membership_id) ?? true),
  );
  const dueDay = buy.dueAt
    ? new Intl.DateTimeFormat(club.locale, { dateStyle: 'long', timeZone: club.timeZone }).format(
        buy.dueAt,
      )
    : null;
  for (const { membership_id: memberId, due_reminders } of late) {
    const open = clubMoney(club, owed.get(memberId)?.openMinor ?? 0);
    const past = buy.dueAt !== null && buy.dueAt.getTime() < Date.now();
    await queueNotice(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      kind: 'reminder',
      eventKey: `buy:${buy.id}:due:${memberId}:${due_reminders + 1}`,
      to: [memberId],
      content: {
        subject: `${buy.name}: ${open} still to pay`,
        paragraphs: [
          dueDay === null
            ? `${open} of your share is still open.`
            : `${open} of your share is still open; it ${past ? 'was' : 'is'} due on ${dueDay}.`,
          ...(club.transferHow ? [club.transferHow] : []),
          'If you have paid in the meantime, you need not do anything.',
        ],
        rows: [
          ['Amount', open],
          ['Reference', groupReference(paymentReference(buy.id, memberId))],
        ],
        action: { label: 'See how to pay', path: `/c/${club.slug}/ledger` },
      },
    });
    await execute(
      `update buy_members set due_reminders = due_reminders + 1, due_reminded_at = clock_timestamp()
       where buy_id = :buyId and membership_id = :memberId`,
      { buyId: buy.id, memberId },
      tx,
    );
  }
  if (late.length > 0) {
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by,
      action: 'orders.remind',
      subject: { type: 'buy', id: buy.id },
      after: { told: late.length },
    });
  }
  return late.length;
}

/** An organiser or treasurer reminds those who owe; without names, everyone who does. */
export async function remindDues(
  actor: BuyActor,
  memberIds: readonly string[],
): Promise<{ told: number }> {
  const only = memberIds.length > 0 ? new Set(memberIds) : null;
  return withBuy(actor.buy.id, { states }, async (buy, tx) => ({
    told: await remindUnderLock(buy, only, byActor(actor), tx),
  }));
}

/**
 * The job's round: one reminder the day before a due day, one the day after, to those who owe then. A buy is skipped
 * while another process has it.
 */
export async function remindDueBuys(): Promise<void> {
  const buys = await select<{ id: string }>(
    `select distinct b.id from buys b join buy_members m on m.buy_id = b.id and m.dropped_at is null
     where b.state in ('locked', 'ordered', 'arrived', 'splitting', 'pickup') and b.due_at is not null
       and m.final_minor is null and m.vouched_at is null
       and ((b.due_at - interval '1 day' <= now() and now() < b.due_at
           and coalesce(m.due_reminded_at, '-infinity') < b.due_at - interval '1 day'
           and b.locked_at < b.due_at - interval '2 days')
         or (b.due_at + interval '1 day' <= now() and now() < b.due_at + interval '8 days'
           and coalesce(m.due_reminded_at, '-infinity') < b.due_at))`,
  );
  for (const { id } of buys) {
    await transact(async (tx) => {
      const buy = await Buy.findByPk(id, {
        transaction: tx.transaction,
        lock: tx.transaction.LOCK.UPDATE,
        skipLocked: true,
      });
      if (!buy?.dueAt || !states.some((state) => state === buy.state)) return;
      const since =
        Date.now() < buy.dueAt.getTime() ? buy.dueAt.getTime() - 86_400_000 : buy.dueAt.getTime();
      const waiting = await select<{ membership_id: string }>(
        `select membership_id from buy_members where buy_id = :id and dropped_at is null and vouched_at is null
           and final_minor is null and coalesce(due_reminded_at, '-infinity') < :since`,
        { id, since: new Date(since) },
        tx,
      );
      const only = new Set(waiting.map(({ membership_id }) => membership_id));
      await remindUnderLock(buy, only, systemActor('Reminders'), tx);
      // Who had paid is looked at no more this time.
      await execute(
        `update buy_members set due_reminded_at = clock_timestamp()
         where buy_id = :id and membership_id in (:ids) and coalesce(due_reminded_at, '-infinity') < :since`,
        {
          id,
          ids: only.size > 0 ? [...only] : ['00000000-0000-0000-0000-000000000000'],
          since: new Date(since),
        },
        tx,
      );
    });
  }
}
