import type { LedgerTasks, PaymentReply } from '#shared/schemas/ledger.ts';
import { select } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { findPayments } from './findPayments.ts';
import { owedInClub } from './owed.ts';
import { buysOfClub } from './readMembers.ts';

function cashByHolder(payments: readonly PaymentReply[]): LedgerTasks['cashHeld'] {
  const held = new Map<string, LedgerTasks['cashHeld'][number]>();
  for (const payment of payments) {
    const { notedBy: holder } = payment;
    const known = held.get(holder.id) ?? { holder, totalMinor: 0, payments: [] };
    known.totalMinor += payment.amountMinor;
    known.payments.push(payment);
    held.set(holder.id, known);
  }
  return [...held.values()];
}

async function waitingBills(clubId: string): Promise<LedgerTasks['bills']> {
  return select(
    `select x.id, b.id as "buyId", b.name as "buyName", s.id as "supplierId", s.name as "supplierName", x.number,
        x.billed_on as "billedOn", x.total_minor as "totalMinor", m.display_name as "enteredBy"
     from bills x join buys b on b.id = x.buy_id join supplier_orders o on o.id = x.supplier_order_id
     join suppliers s on s.id = o.supplier_id join memberships m on m.id = x.entered_by_id
     where b.club_id = :clubId and x.confirmed_at is null and x.voided_at is null order by x.created_at`,
    { clubId },
  );
}

/** What waits for the treasurer: credit to give back, cash and bills to confirm, dues past their day, buys to close. */
export async function readTasks(actor: ClubActor): Promise<LedgerTasks> {
  const clubId = actor.club.id;
  const [owedBy, buys, cash, bills] = await Promise.all([
    owedInClub(clubId),
    buysOfClub(clubId),
    findPayments(clubId, 'unconfirmed'),
    waitingBills(clubId),
  ]);
  const names = new Map(
    (
      await select<{ id: string; name: string }>(
        'select id, display_name as name from memberships where club_id = :clubId',
        { clubId },
      )
    ).map(({ id, name }) => [id, name]),
  );
  const refunds: LedgerTasks['refunds'] = [];
  const overdue: LedgerTasks['overdue'] = [];
  for (const [id, owed] of owedBy) {
    const member = { id, name: names.get(id) ?? '' };
    if (owed.creditMinor > 0) {
      const from = owed.buys.flatMap(({ buyId, creditMinor }) => {
        const buy = buys.get(buyId);
        if (creditMinor === 0 || !buy) return [];
        return [buy.state === 'cancelled' ? `${buy.name} (cancelled)` : buy.name];
      });
      refunds.push({ member, creditMinor: owed.creditMinor, from });
    }
    for (const { buyId, openMinor, dueAtMs } of owed.buys) {
      const buy = buys.get(buyId);
      if (openMinor > 0 && dueAtMs !== null && buy?.overdue) {
        const dueAt = new Date(dueAtMs).toISOString();
        overdue.push({ member, buyId, buyName: buy.name, openMinor, dueAt });
      }
    }
  }
  return {
    refunds: refunds.sort((a, b) => b.creditMinor - a.creditMinor),
    cashHeld: cashByHolder(cash),
    bills,
    overdue: overdue.sort((a, b) => a.dueAt.localeCompare(b.dueAt)),
    toSettle: [...buys].flatMap(([buyId, buy]) =>
      buy.state === 'pickup' ? [{ buyId, buyName: buy.name }] : [],
    ),
  };
}
