import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { execute, select, transact } from '#server/config/database.ts';
import { owedOfBuy, overdueElsewhere } from '#server/services/ledger/owed.ts';
import type { PaymentReply, Statement } from '#shared/schemas/ledger.ts';
import { accountSum, booksOf, makeLockedWorld, passDueDay } from '#tests/support/locked.ts';
import type { LockedWorld } from '#tests/support/locked.ts';
import type { Person } from '#tests/support/world.ts';

const today = () => new Date().toISOString().slice(0, 10);

describe('payments by hand', () => {
  let world: LockedWorld;
  let api: string;
  beforeAll(async () => {
    world = await makeLockedWorld();
    api = `/api/v1/clubs/${world.club.slug}`;
  });

  const pay = async (person: Person, fields: object = {}) => {
    const agent = await world.people.treasurer.agent();
    return agent.post(`${api}/payments`).send({
      key: randomUUID(),
      memberId: person.membership.id,
      buyId: null,
      method: 'transfer',
      amountMinor: 100,
      receivedOn: today(),
      reference: '',
      ...fields,
    });
  };
  const statementOf = async (person: Person): Promise<Statement> =>
    (await (await person.agent()).get(`${api}/ledger/statement`).expect(200)).body;
  const open = async (person: Person) =>
    (await owedOfBuy(world.buy.id)).get(person.membership.id)?.openMinor;

  it('asks for the locked amount until it is paid', async () => {
    const [ana] = world.payers;
    expect(world.dueOf(ana)).toBeGreaterThan(100);
    expect(await open(ana)).toBe(world.dueOf(ana));
    const reply = await pay(ana, { amountMinor: world.dueOf(ana) });
    expect(reply.status).toBe(201);
    expect((reply.body as PaymentReply).parts).toMatchObject([
      { buyId: world.buy.id, amountMinor: world.dueOf(ana) },
    ]);
    expect(await open(ana)).toBe(0);
    const statement = await statementOf(ana);
    expect(statement).toMatchObject({ openMinor: 0, creditMinor: 0 });
    expect(statement.entries.map(({ amountMinor }) => amountMinor)).toEqual([-world.dueOf(ana)]);
    expect(statement.buys[0]?.reference).toMatch(/^RF\d\d[0-9A-Z]{16}$/);
  });

  it('tells the payer, once', async () => {
    const rows = await select<{ subject: string }>(
      `select subject from outbox where kind = 'payment_received' and address = :address`,
      { address: world.payers[0].email },
    );
    expect(rows).toHaveLength(1);
  });

  it('records one form once, in a row and at once', async () => {
    const [, ben] = world.payers;
    const bank = await accountSum(world.club.id, 'bank');
    const key = randomUUID();
    const replies = await Promise.all(
      Array.from({ length: 4 }, () => pay(ben, { key, amountMinor: 250 })),
    );
    expect(new Set(replies.map(({ body }) => (body as PaymentReply).id)).size).toBe(1);
    expect(replies.map(({ status }) => status)).toEqual([201, 201, 201, 201]);
    expect(await accountSum(world.club.id, 'bank')).toBe(bank + 250);
    const other = await pay(ben, { key, amountMinor: 260 });
    expect(other.status).toBe(409);
    expect(other.body.code).toBe('already_there');
    expect(await accountSum(world.club.id, 'bank')).toBe(bank + 250);
  });

  it('refuses what makes no sense, beside the field', async () => {
    const [, ben] = world.payers;
    const tomorrow = new Date(Date.now() + 2 * 86_400_000).toISOString().slice(0, 10);
    for (const [fields, field] of [
      [{ amountMinor: 0 }, 'amountMinor'],
      [{ amountMinor: -5 }, 'amountMinor'],
      [{ receivedOn: tomorrow }, 'receivedOn'],
      [{ receivedOn: 'yesterday' }, 'receivedOn'],
      [{ memberId: randomUUID() }, 'memberId'],
      [{ memberId: world.people.stranger.membership.id }, 'memberId'],
      [{ buyId: randomUUID() }, 'buyId'],
      [{ key: 'no' }, 'key'],
    ] as const) {
      const reply = await pay(ben, fields);
      expect(reply.status).toBe(422);
      expect(Object.keys(reply.body.errors)).toContain(field);
    }
  });

  it('takes a mistaken entry back with a reason, once, and keeps both in the books', async () => {
    const [, , cleo] = world.payers;
    const before = await open(cleo);
    const { body: payment } = await pay(cleo, { amountMinor: 400 });
    const treasurer = await world.people.treasurer.agent();
    const url = `${api}/payments/${payment.id}/reverse`;
    await treasurer.post(url).send({ reason: '' }).expect(422);
    const done = await treasurer.post(url).send({ reason: 'Wrong member' }).expect(200);
    expect(done.body.reversedReason).toBe('Wrong member');
    await treasurer.post(url).send({ reason: 'Wrong member' }).expect(409);
    expect(await open(cleo)).toBe(before);
    const { entries } = await statementOf(cleo);
    expect(entries.map(({ amountMinor }) => amountMinor)).toEqual([-400, 400]);
  });

  it('lets an organiser note cash, which the treasurer confirms', async () => {
    const [, , cleo] = world.payers;
    const own = await world.people.own.agent();
    const before = (await open(cleo)) ?? 0;
    const note = { key: randomUUID(), memberId: cleo.membership.id, receivedOn: today() };
    const noted = await own
      .post(`${api}/buys/${world.buy.id}/payments`)
      .send({ ...note, amountMinor: 300 })
      .expect(201);
    expect(noted.body.confirmedAt).toBeNull();
    expect(await open(cleo)).toBe(before - 300);
    const holder = world.people.own.membership.id;
    expect(await accountSum(world.club.id, 'cash_held', holder)).toBe(300);

    const treasurer = await world.people.treasurer.agent();
    const tasks = await treasurer.get(`${api}/ledger/tasks`).expect(200);
    expect(tasks.body.cashHeld).toMatchObject([{ holder: { id: holder }, totalMinor: 300 }]);
    const confirm = { paymentIds: [noted.body.id], receivedOn: today() };
    const twice = await Promise.all([
      treasurer.post(`${api}/payments/confirm`).send(confirm),
      treasurer.post(`${api}/payments/confirm`).send(confirm),
    ]);
    expect(twice.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect(await accountSum(world.club.id, 'cash_held', holder)).toBe(0);
    expect(await accountSum(world.club.id, 'cash')).toBe(300);
    await own
      .post(`${api}/buys/${world.buy.id}/payments/${noted.body.id}/withdraw`)
      .send({ reason: 'I miscounted' })
      .expect(409);
    expect(await booksOf(world.club.id)).toEqual({ sum: 0, unbalanced: 0 });
  });

  it('lets whoever noted cash withdraw the note, and nobody else', async () => {
    const [, , cleo] = world.payers;
    const own = await world.people.own.agent();
    const before = await open(cleo);
    const noted = await own
      .post(`${api}/buys/${world.buy.id}/payments`)
      .send({
        key: randomUUID(),
        memberId: cleo.membership.id,
        receivedOn: today(),
        amountMinor: 50,
      })
      .expect(201);
    const url = `${api}/buys/${world.buy.id}/payments/${noted.body.id}/withdraw`;
    await transact((tx) =>
      execute(
        'insert into buy_organisers (buy_id, membership_id) values (:buyId, :id)',
        { buyId: world.buy.id, id: world.people.organiser.membership.id },
        tx,
      ),
    );
    const other = await world.people.organiser.agent();
    await other.post(url).send({ reason: 'Not mine' }).expect(403);
    await own.post(url).send({ reason: 'I miscounted' }).expect(200);
    expect(await open(cleo)).toBe(before);
  });

  it('keeps others out of payments, and members out of others’ statements', async () => {
    const [ana, ben] = world.payers;
    const agent = await ana.agent();
    await agent.get(`${api}/ledger/members/${ben.membership.id}`).expect(403);
    await agent.get(`${api}/buys/${world.buy.id}/payments`).expect(403);
    const own = await world.people.own.agent();
    await own.get(`${api}/buys/${world.buy.id}/payments`).expect(200);
    await own.get(`${api}/ledger/members/${ben.membership.id}`).expect(403);
    const treasurer = await world.people.treasurer.agent();
    const theirs = await treasurer.get(`${api}/ledger/members/${ben.membership.id}`).expect(200);
    expect(theirs.body.member.name).toBe('Ben Payer');
    await treasurer.get(`${api}/ledger/members/${randomUUID()}`).expect(404);
  });

  it('says who is overdue elsewhere, unless somebody vouches', async () => {
    const [, ben] = world.payers;
    expect(await overdueElsewhere(ben.membership.id, randomUUID())).toEqual([]);
    await passDueDay(world.buy.id);
    expect(await overdueElsewhere(ben.membership.id, world.buy.id)).toEqual([]);
    expect(await overdueElsewhere(ben.membership.id, randomUUID())).toMatchObject([
      { buyId: world.buy.id, openMinor: world.dueOf(ben) - 250 },
    ]);
    const treasurer = await world.people.treasurer.agent();
    const { body } = await treasurer.get(`${api}/ledger/members`).expect(200);
    const row = body.members.find(({ id }: { id: string }) => id === ben.membership.id);
    expect(row).toMatchObject({ overdueMinor: world.dueOf(ben) - 250, creditMinor: 0 });
    await transact((tx) =>
      execute(
        `update buy_members set vouched_at = now(), vouched_by_id = :id, vouched_reason = 'Pays at the meetup'
         where buy_id = :buyId and membership_id = :member`,
        {
          id: world.people.own.membership.id,
          buyId: world.buy.id,
          member: ben.membership.id,
        },
        tx,
      ),
    );
    expect(await overdueElsewhere(ben.membership.id, randomUUID())).toEqual([]);
  });
});

describe('credit and refunds', () => {
  it('gives back free credit only, once, and rounds cash by the currency', async () => {
    const world = await makeLockedWorld();
    await transact((tx) =>
      execute("update clubs set currency = 'CHF' where id = :id", { id: world.club.id }, tx),
    );
    const api = `/api/v1/clubs/${world.club.slug}`;
    const treasurer = await world.people.treasurer.agent();
    const [ana, ben] = world.payers;
    const pay = (fields: object) =>
      treasurer.post(`${api}/payments`).send({
        key: randomUUID(),
        memberId: ana.membership.id,
        buyId: null,
        method: 'transfer',
        amountMinor: 100,
        receivedOn: today(),
        reference: '',
        ...fields,
      });
    const refund = (fields: object) =>
      treasurer.post(`${api}/refunds`).send({
        key: randomUUID(),
        memberId: ana.membership.id,
        method: 'transfer',
        amountMinor: 100,
        paidOn: today(),
        reference: '',
        ...fields,
      });

    await pay({ amountMinor: 102, method: 'cash' }).expect(422);
    await refund({ amountMinor: 100 }).expect(422);
    await pay({ amountMinor: world.dueOf(ana) + 733 }).expect(201);
    await refund({ amountMinor: 734 }).expect(422);

    // Two refunds at once: only one finds the credit.
    const both = await Promise.all([refund({ amountMinor: 700 }), refund({ amountMinor: 700 })]);
    expect(both.map(({ status }) => status).sort()).toEqual([201, 422]);
    // The last 0.33 in coins: 0.35, the rest to rounding.
    const cash = await refund({ amountMinor: 35, method: 'cash' }).expect(201);
    expect(cash.body).toMatchObject({ amountMinor: 35, roundingMinor: 2 });
    expect(await accountSum(world.club.id, 'rounding')).toBe(2);
    expect(await accountSum(world.club.id, 'cash')).toBe(-35);
    const statement = await treasurer.get(`${api}/ledger/members/${ana.membership.id}`).expect(200);
    expect(statement.body).toMatchObject({ creditMinor: 0, openMinor: 0 });

    // Cash for a due that coins can't pay exactly settles it exactly.
    const due = world.dueOf(ben);
    const coins = Math.round(due / 5) * 5;
    const taken = await pay({
      memberId: ben.membership.id,
      amountMinor: coins,
      method: 'cash',
      buyId: world.buy.id,
    }).expect(201);
    expect(taken.body.roundingMinor).toBe(due - coins);
    expect((await owedOfBuy(world.buy.id)).get(ben.membership.id)?.openMinor).toBe(0);
    expect(await booksOf(world.club.id)).toEqual({ sum: 0, unbalanced: 0 });
  });

  it('turns the deposits of a cancelled buy into credit that waits for a refund', async () => {
    const world = await makeLockedWorld();
    const api = `/api/v1/clubs/${world.club.slug}`;
    const treasurer = await world.people.treasurer.agent();
    const [ana] = world.payers;
    await treasurer
      .post(`${api}/payments`)
      .send({
        key: randomUUID(),
        memberId: ana.membership.id,
        buyId: world.buy.id,
        method: 'transfer',
        amountMinor: 500,
        receivedOn: today(),
        reference: 'statement 11',
      })
      .expect(201);
    await transact((tx) =>
      execute(
        "update buys set state = 'cancelled', cancelled_at = now() where id = :id",
        { id: world.buy.id },
        tx,
      ),
    );
    const { body } = await treasurer.get(`${api}/ledger/tasks`).expect(200);
    expect(body.refunds).toEqual([
      {
        member: { id: ana.membership.id, name: 'Ana Payer' },
        creditMinor: 500,
        from: ['Test buy (cancelled)'],
      },
    ]);
    await treasurer
      .post(`${api}/refunds`)
      .send({
        key: randomUUID(),
        memberId: ana.membership.id,
        method: 'transfer',
        amountMinor: 500,
        paidOn: today(),
        reference: '',
      })
      .expect(201);
    expect((await treasurer.get(`${api}/ledger/tasks`)).body.refunds).toEqual([]);
    expect(await accountSum(world.club.id, 'member', ana.membership.id)).toBe(0);
  });
});
