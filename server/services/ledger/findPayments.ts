import type { PaymentReply } from '#shared/schemas/ledger.ts';
import { select, type Tx } from '../../config/database.ts';

interface PaymentRow {
  id: string;
  direction: 'in' | 'refund';
  method: 'cash' | 'transfer';
  member_id: string;
  member_name: string;
  amount_minor: number;
  rounding_minor: number;
  received_on: string;
  reference: string;
  noted_by_id: string;
  noted_by_name: string;
  confirmed_by_id: string | null;
  confirmed_by_name: string | null;
  confirmed_at: Date | null;
  reversed_at: Date | null;
  reversed_reason: string | null;
  created_at: Date;
  parts: { buyId: string | null; buyName: string | null; amountMinor: number }[] | null;
}

function present(row: PaymentRow): PaymentReply {
  const { direction, method, reference } = row;
  return {
    id: row.id,
    direction,
    method,
    member: { id: row.member_id, name: row.member_name },
    amountMinor: row.amount_minor,
    roundingMinor: row.rounding_minor,
    receivedOn: row.received_on,
    reference,
    parts: row.parts ?? [],
    notedBy: { id: row.noted_by_id, name: row.noted_by_name },
    confirmedBy:
      row.confirmed_by_id && row.confirmed_by_name
        ? { id: row.confirmed_by_id, name: row.confirmed_by_name }
        : null,
    confirmedAt: row.confirmed_at?.toISOString() ?? null,
    reversedAt: row.reversed_at?.toISOString() ?? null,
    reversedReason: row.reversed_reason,
    createdAt: row.created_at.toISOString(),
  };
}

const conditions = {
  id: 'p.id = :value',
  key: 'p.idempotency_key = :value',
  buy: `(p.buy_id = :value or exists (select 1 from ledger_transactions t join ledger_postings lp on lp.transaction_id = t.id
    where t.club_id = p.club_id and t.event_type = 'payment' and t.event_id = p.id::text and lp.buy_id = :value))`,
  member: 'p.membership_id = :value',
} as const;

/** Payments and refunds of a club by one of: id, idempotency key, buy, member; newest first. */
export async function findPayments(
  clubId: string,
  by: keyof typeof conditions | 'unconfirmed',
  value?: string,
  tx?: Tx,
): Promise<PaymentReply[]> {
  const condition =
    by === 'unconfirmed' ? 'p.confirmed_at is null and p.reversed_at is null' : conditions[by];
  const rows = await select<PaymentRow>(
    `select p.*, m.display_name as member_name, m.id as member_id,
        n.display_name as noted_by_name, c.display_name as confirmed_by_name,
        (select json_agg(json_build_object('buyId', lp.buy_id, 'buyName', b.name,
            'amountMinor', abs(lp.amount_minor)) order by lp.id)
          from ledger_transactions t join ledger_postings lp on lp.transaction_id = t.id
          join ledger_accounts a on a.id = lp.account_id and a.kind = 'member'
          left join buys b on b.id = lp.buy_id
          where t.club_id = p.club_id and t.event_type = 'payment' and t.event_id = p.id::text) as parts
     from payments p join memberships m on m.id = p.membership_id
     join memberships n on n.id = p.noted_by_id left join memberships c on c.id = p.confirmed_by_id
     where p.club_id = :clubId and ${condition} order by p.created_at desc, p.id`,
    { clubId, value: value ?? null },
    tx,
  );
  return rows.map(present);
}
