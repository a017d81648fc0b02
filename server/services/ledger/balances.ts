import { select, type Tx } from '../../config/database.ts';

/** Balance in minor units of each member's account in a club; positive: the member owes the club. */
export async function memberBalances(clubId: string, tx?: Tx): Promise<Map<string, number>> {
  const rows = await select<{ member_id: string; balance: number }>(
    `select a.ref_id as member_id, sum(p.amount_minor)::bigint as balance
     from ledger_accounts a join ledger_postings p on p.account_id = a.id
     where a.club_id = :clubId and a.kind = 'member' group by a.ref_id`,
    { clubId },
    tx,
  );
  return new Map(rows.map((row) => [row.member_id, row.balance]));
}

/** Sum of each member's postings about one buy, in minor units; before the final share what they paid, negative. */
export async function memberBalancesOfBuy(buyId: string, tx?: Tx): Promise<Map<string, number>> {
  const rows = await select<{ member_id: string; balance: number }>(
    `select a.ref_id as member_id, sum(p.amount_minor)::bigint as balance
     from ledger_postings p join ledger_accounts a on a.id = p.account_id and a.kind = 'member'
     where p.buy_id = :buyId group by a.ref_id`,
    { buyId },
    tx,
  );
  return new Map(rows.map((row) => [row.member_id, row.balance]));
}

/** Sum of the buy's own account in minor units; zero when everything it cost has been shared out. */
export async function buyAccountBalance(buyId: string, tx?: Tx): Promise<number> {
  const [row] = await select<{ balance: number | null }>(
    `select sum(p.amount_minor)::bigint as balance from ledger_accounts a
     join ledger_postings p on p.account_id = a.id where a.kind = 'buy' and a.ref_id = :buyId`,
    { buyId },
    tx,
  );
  return row?.balance ?? 0;
}
