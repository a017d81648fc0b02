import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { execute, select, transact } from '#server/config/database.ts';
import { postTransaction, type Posting } from '#server/services/ledger/postTransaction.ts';
import { reverseTransaction } from '#server/services/ledger/reverseTransaction.ts';
import { systemActor } from '#server/services/actorName.ts';
import { accountSum, booksOf } from '#tests/support/locked.ts';
import { makeWorld, type World } from '#tests/support/world.ts';

const by = systemActor('test');

describe('the books in the database', () => {
  let world: World;
  beforeAll(async () => {
    world = await makeWorld('open');
  });

  const post = (postings: Posting[], eventId: string = randomUUID(), clubId = world.club.id) =>
    transact((tx) =>
      postTransaction(tx, {
        clubId,
        eventType: 'test',
        eventId,
        onDate: '2026-11-03',
        memo: 'test',
        buyId: world.buy.id,
        by,
        postings,
      }),
    );
  const member = () => ({ kind: 'member' as const, refId: world.people.member.membership.id });
  const payment = (amountMinor: number): Posting[] => [
    { account: { kind: 'bank' }, amountMinor },
    { account: member(), amountMinor: -amountMinor },
  ];

  it('refuses a transaction that does not sum to zero', async () => {
    await expect(
      post([
        { account: { kind: 'bank' }, amountMinor: 100 },
        { account: member(), amountMinor: -99 },
      ]),
    ).rejects.toThrow(/does not balance/);
    expect(await booksOf(world.club.id)).toEqual({ sum: 0, unbalanced: 0 });
  });

  it('refuses raw SQL that adds to, changes, deletes or empties what is posted', async () => {
    const id = await post(payment(500));
    const [account] = await select<{ id: string }>('select id from ledger_accounts limit 1');
    const values = { id, account: account?.id };
    const tries: [string, RegExp][] = [
      [
        'insert into ledger_postings (transaction_id, account_id, amount_minor) values (:id, :account, 7)',
        /does not balance/,
      ],
      [
        `insert into ledger_postings (transaction_id, account_id, amount_minor)
         values (:id, :account, 7), (:id, :account, -7)`,
        /is complete/,
      ],
      ['update ledger_postings set amount_minor = 1 where transaction_id = :id', /append only/],
      ['delete from ledger_postings where transaction_id = :id', /append only/],
      ["update ledger_transactions set memo = 'x' where id = :id", /append only/],
      ['delete from ledger_transactions where id = :id', /append only/],
      ["update ledger_accounts set kind = 'cash' where id = :account", /append only/],
      ['truncate ledger_postings', /append only/],
      ['truncate ledger_transactions cascade', /append only/],
    ];
    for (const [sql, message] of tries) {
      await expect(
        transact((tx) => execute(sql, values, tx)),
        sql,
      ).rejects.toThrow(message);
    }
    expect(await accountSum(world.club.id, 'bank')).toBe(500);
  });

  it('refuses a posting on an account or a buy of another club', async () => {
    const other = await makeWorld('open');
    await expect(
      transact((tx) =>
        execute(
          `with t as (insert into ledger_transactions (club_id, event_type, event_id, on_date)
             values (:other, 'test', 'crossing', '2026-11-03') returning id),
           a as (select id from ledger_accounts where club_id = :club limit 1)
           insert into ledger_postings (transaction_id, account_id, amount_minor)
             select t.id, a.id, x from t, a, (values (5), (-5)) v(x)`,
          { other: other.club.id, club: world.club.id },
          tx,
        ),
      ),
    ).rejects.toThrow(/crosses clubs/);
    await expect(
      post(payment(5).map((posting) => ({ ...posting, buyId: other.buy.id }))),
    ).rejects.toThrow(/buy of another club/);
  });

  it('posts one event once, also when asked many times at once', async () => {
    const before = await accountSum(world.club.id, 'bank');
    const eventId = randomUUID();
    const ids = await Promise.all(Array.from({ length: 5 }, () => post(payment(300), eventId)));
    expect(ids.filter((id) => id !== null)).toHaveLength(1);
    expect(await accountSum(world.club.id, 'bank')).toBe(before + 300);
  });

  it('reverses once, posting by posting, with the same buys', async () => {
    const before = await accountSum(world.club.id, 'member', member().refId);
    const id = await post(payment(450));
    if (!id) throw new Error('not posted');
    const reverse = () =>
      transact((tx) =>
        reverseTransaction(tx, { transactionId: id, onDate: '2026-11-04', reason: 'typo', by }),
      );
    const results = await Promise.allSettled([reverse(), reverse()]);
    expect(results.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
    expect(await accountSum(world.club.id, 'member', member().refId)).toBe(before);
    const rows = await select<{ buy_id: string | null }>(
      `select p.buy_id from ledger_transactions t join ledger_postings p on p.transaction_id = t.id
       where t.reverses_id = :id`,
      { id },
    );
    expect(rows.map((row) => row.buy_id)).toEqual([world.buy.id, world.buy.id]);
  });
});
