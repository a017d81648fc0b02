import type { Journal, JournalEntry } from '#shared/schemas/ledger.ts';
import { select } from '../../config/database.ts';
import type { ClubActor } from '../actors.ts';

const pageSize = 50;

const accountName = `case a.kind
    when 'bank' then 'Bank' when 'cash' then 'Cash' when 'card_clearing' then 'Card clearing'
    when 'shelf' then 'Shelf stock' when 'fees' then 'Fees' when 'losses' then 'Losses' when 'rounding' then 'Rounding'
    when 'cash_held' then 'Cash held by ' || m.display_name
    when 'member' then m.display_name
    when 'supplier' then s.name
    when 'buy' then 'Buy: ' || b.name end`;
const accountJoins = `left join memberships m on a.kind in ('member', 'cash_held') and m.id = a.ref_id
  left join suppliers s on a.kind = 'supplier' and s.id = a.ref_id
  left join buys b on a.kind = 'buy' and b.id = a.ref_id`;

interface EntryRow {
  id: string;
  on_date: string;
  created_at: Date;
  event_type: string;
  memo: string;
  buy_name: string | null;
  by: string | null;
  reverses_id: string | null;
  reversed_by_id: string | null;
  postings: { account: string; amountMinor: number }[];
}

async function entriesBefore(clubId: string, before: string | undefined): Promise<JournalEntry[]> {
  const rows = await select<EntryRow>(
    `select t.id, t.on_date, t.created_at, t.event_type, t.memo, tb.name as buy_name, w.display_name as by,
        t.reverses_id, r.id as reversed_by_id,
        (select json_agg(json_build_object('account', ${accountName}, 'amountMinor', p.amount_minor) order by p.id)
          from ledger_postings p join ledger_accounts a on a.id = p.account_id ${accountJoins}
          where p.transaction_id = t.id) as postings
     from ledger_transactions t left join buys tb on tb.id = t.buy_id
     left join memberships w on w.id = t.created_by_id
     left join ledger_transactions r on r.reverses_id = t.id
     where t.club_id = :clubId and (:before::uuid is null or (t.created_at, t.id) < (
       select created_at, id from ledger_transactions where id = :before::uuid and club_id = :clubId))
     order by t.created_at desc, t.id desc limit ${pageSize + 1}`,
    { clubId, before: before ?? null },
  );
  return rows.map((row) => ({
    id: row.id,
    onDate: row.on_date,
    createdAt: row.created_at.toISOString(),
    eventType: row.event_type,
    memo: row.memo,
    buyName: row.buy_name,
    by: row.by,
    reversesId: row.reverses_id,
    reversedById: row.reversed_by_id,
    postings: row.postings,
  }));
}

/** The journal, newest first, fifty a page, and what stands on each account; members' accounts as one sum. */
export async function readJournal(actor: ClubActor, before: string | undefined): Promise<Journal> {
  const clubId = actor.club.id;
  const accounts = await select<Journal['accounts'][number]>(
    `select kind, name, sum(amount)::bigint as "balanceMinor" from (
       select a.kind, case when a.kind = 'member' then 'Members' else ${accountName} end as name, p.amount_minor as amount
       from ledger_accounts a join ledger_postings p on p.account_id = a.id ${accountJoins}
       where a.club_id = :clubId) x
     group by kind, name having sum(amount) <> 0 or kind in ('bank', 'cash')
     order by array_position(array['bank', 'cash', 'cash_held', 'member', 'supplier', 'buy', 'shelf'], kind), name`,
    { clubId },
  );
  const entries = await entriesBefore(clubId, before);
  const page = entries.slice(0, pageSize);
  return {
    accounts,
    entries: page,
    next: entries.length > pageSize ? (page.at(-1)?.id ?? null) : null,
  };
}
