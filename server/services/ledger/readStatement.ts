import type { BuyState } from '#shared/domain/buys/states.ts';
import { paymentReference } from '#shared/domain/ledger/reference.ts';
import type { Statement, StatementBuy, StatementEntry } from '#shared/schemas/ledger.ts';
import { select } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';
import { notFound } from '../problem.ts';
import { owedOfMember } from './owed.ts';

interface BuyRow {
  id: string;
  name: string;
  state: BuyState;
  vouched_by: string | null;
  overdue: boolean;
}

async function buyRows(buyIds: readonly string[], memberId: string): Promise<Map<string, BuyRow>> {
  if (buyIds.length === 0) return new Map();
  const rows = await select<BuyRow>(
    `select b.id, b.name, b.state, v.display_name as vouched_by,
        coalesce(b.due_at < clock_timestamp(), false) as overdue
     from buys b left join buy_members m on m.buy_id = b.id and m.membership_id = :memberId
     left join memberships v on v.id = m.vouched_by_id and m.vouched_at is not null
     where b.id in (:buyIds)`,
    { buyIds, memberId },
  );
  return new Map(rows.map((row) => [row.id, row]));
}

async function entriesOf(clubId: string, memberId: string): Promise<StatementEntry[]> {
  const rows = await select<{
    id: string;
    on_date: string;
    memo: string;
    buy_name: string | null;
    amount: number;
    reversal: boolean;
  }>(
    `select p.id::text, t.on_date, t.memo, b.name as buy_name, p.amount_minor as amount,
        t.reverses_id is not null as reversal
     from ledger_accounts a join ledger_postings p on p.account_id = a.id
     join ledger_transactions t on t.id = p.transaction_id left join buys b on b.id = p.buy_id
     where a.club_id = :clubId and a.kind = 'member' and a.ref_id = :memberId
     order by t.created_at, p.id`,
    { clubId, memberId },
  );
  let balanceMinor = 0;
  return rows.map((row) => {
    balanceMinor += row.amount;
    return {
      id: row.id,
      onDate: row.on_date,
      memo: row.memo,
      buyName: row.buy_name,
      amountMinor: row.amount,
      balanceMinor,
      reversal: row.reversal,
    };
  });
}

/**
 * What a member owes, paid and may have back, with every posting on their account.
 * @throws DomainProblem 404
 */
export async function readStatement(actor: ClubActor, memberId: string): Promise<Statement> {
  const { club } = actor;
  const [member] = await select<{ name: string; guest: boolean; transfer_how: string }>(
    `select m.display_name as name, m.is_guest as guest, c.transfer_how
     from memberships m join clubs c on c.id = m.club_id
     where m.id = :memberId and m.club_id = :clubId and m.status <> 'pending'`,
    { memberId, clubId: club.id },
  );
  if (!member) throw notFound('This member');
  const owed = await owedOfMember(club.id, memberId);
  const rows = await buyRows(
    owed.buys.map(({ buyId }) => buyId),
    memberId,
  );
  const buys = owed.buys
    .flatMap(({ dueAtMs, ...buy }): StatementBuy[] => {
      const row = rows.get(buy.buyId);
      if (!row) return [];
      return [
        {
          ...buy,
          buyName: row.name,
          state: row.state,
          dueAt: dueAtMs === null ? null : new Date(dueAtMs).toISOString(),
          overdue: buy.openMinor > 0 && row.overdue,
          vouchedBy: row.vouched_by,
          reference: paymentReference(buy.buyId, memberId),
        },
      ];
    })
    .sort((a, b) => (b.dueAt ?? '').localeCompare(a.dueAt ?? ''));
  return {
    member: { id: memberId, name: member.name, guest: member.guest },
    balanceMinor: owed.balanceMinor,
    openMinor: owed.openMinor,
    accountOpenMinor: owed.accountOpenMinor,
    carriedMinor: owed.carriedMinor,
    creditMinor: owed.creditMinor,
    buys,
    entries: await entriesOf(club.id, memberId),
    transferHow: member.transfer_how,
    club: { name: club.name },
  };
}
