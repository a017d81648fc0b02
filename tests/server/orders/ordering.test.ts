import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { execute, select, transact } from '#server/config/database.ts';
import type { LockedReply, OrdersReply, QuoteEffect } from '#shared/schemas/orders.ts';
import { makeLockedWorld } from '#tests/support/locked.ts';
import { base, orders, pay, place, quote } from '#tests/support/ordering.ts';
import type { Person } from '#tests/support/world.ts';

describe('the locked buy', () => {
  it('shows dues and payments to those who may know, and to others only their own', async () => {
    const world = await makeLockedWorld();
    const [ana, ben] = world.payers;
    await pay(world, ana, 400);
    const own = await world.people.own.agent();
    const all: LockedReply = (await own.get(`${base(world)}/locked`).expect(200)).body;
    expect(all.members.map(({ name }) => name)).toEqual(['Ana Payer', 'Ben Payer', 'Cleo Payer']);
    expect(all.members[0]?.money).toMatchObject({
      paidMinor: 400,
      openMinor: world.dueOf(ana) - 400,
    });
    expect(all.totals.paidMinor).toBe(400);
    expect(all.totals.shareMinor + all.totals.shelfMinor).toBe(world.sheet.totalMinor);

    const theirs: LockedReply = (await (await ben.agent()).get(`${base(world)}/locked`).expect(200))
      .body;
    expect(theirs.members.map(({ money }) => money !== null)).toEqual([false, true, false]);
    expect(theirs.totals).toMatchObject({ paidMinor: null, openMinor: null });
    expect(theirs.slip?.totalMinor).toBe(world.dueOf(ben));
    expect(theirs.slip?.lines[0]?.steps.join(' ')).toMatch(/8 000 g/);
    await (await ben.agent()).get(`${base(world)}/slips/${ana.membership.id}`).expect(403);
    const slip = await own.get(`${base(world)}/slips/${ana.membership.id}`).expect(200);
    expect(slip.body.totalMinor).toBe(world.dueOf(ana));
    await own.get(`${base(world)}/slips/${randomUUID()}`).expect(404);
  });

  it('has nothing of it while it was never locked', async () => {
    const world = await makeLockedWorld();
    await transact((tx) =>
      execute('delete from snapshots where buy_id = :id', { id: world.buy.id }, tx),
    );
    const own = await world.people.own.agent();
    await own.get(`${base(world)}/locked`).expect(409);
  });
});

describe('ordering', () => {
  it('waits for who has not paid, until each is vouched for by name', async () => {
    const world = await makeLockedWorld();
    const [ana, ben, cleo] = world.payers;
    await pay(world, ana);
    const refused = await place(world, world.suppliers.salts);
    expect(refused.status).toBe(409);
    expect(refused.body.code).toBe('unpaid');
    expect(refused.body.detail).toContain('Ben Payer and Cleo Payer');

    await pay(world, ben);
    const own = await world.people.own.agent();
    const url = `${base(world)}/vouched/${cleo.membership.id}`;
    await own.put(url).send({ reason: '' }).expect(422);
    await own
      .put(`${base(world)}/vouched/${randomUUID()}`)
      .send({ reason: 'Pays cash' })
      .expect(404);
    const vouched: LockedReply = (
      await own.put(url).send({ reason: 'Pays at the meetup' }).expect(200)
    ).body;
    expect(vouched.members.find(({ name }) => name === 'Cleo Payer')?.money).toMatchObject({
      vouchedBy: 'Own Organiser',
      vouchedReason: 'Pays at the meetup',
    });
    await own.delete(url).expect(200);
    expect((await place(world, world.suppliers.salts)).status).toBe(409);
    await (
      await world.people.treasurer.agent()
    )
      .put(url)
      .send({ reason: 'I know her' })
      .expect(200);

    expect((await place(world, world.suppliers.salts)).status).toBe(200);
    expect((await orders(world)).state).toBe('locked');
    const again = await place(world, world.suppliers.salts);
    expect(again.body.code).toBe('wrong_state');
    const last = await place(world, world.suppliers.other);
    expect(last.body.state).toBe('ordered');
    const [snapshot] = await select<{ total: number }>(
      `select (sheet->>'totalMinor')::int as total from snapshots where buy_id = :id and kind = 'ordered'`,
      { id: world.buy.id },
    );
    expect(snapshot?.total).toBe(world.sheet.totalMinor);
    const told = await select<{ kind: string }>(
      "select kind from notices where buy_id = :id and kind = 'ordered'",
      { id: world.buy.id },
    );
    expect(told).toHaveLength(3);
  });

  it('refuses what is stale, and a second click at the same moment', async () => {
    const world = await makeLockedWorld();
    for (const person of world.payers) await pay(world, person);
    expect((await place(world, world.suppliers.salts, { version: 7 })).body.code).toBe('stale');
    expect((await place(world, world.suppliers.salts, { termsVersion: 1 })).body.code).toBe(
      'stale',
    );
    expect((await place(world, randomUUID())).status).toBe(422);
    const tomorrow = new Date(Date.now() + 2 * 86_400_000).toISOString().slice(0, 10);
    expect((await place(world, world.suppliers.salts, { placedOn: tomorrow })).status).toBe(422);
    const both = await Promise.all([
      place(world, world.suppliers.salts),
      place(world, world.suppliers.salts),
    ]);
    expect(both.map(({ status }) => status).sort()).toEqual([200, 409]);
  });

  it('shows what a real price does to every share before it is taken over', async () => {
    const world = await makeLockedWorld();
    const { check, set } = await quote(world, world.suppliers.salts, 9900);
    const effect = check.body as QuoteEffect;
    expect(effect.newTotalMinor - effect.oldTotalMinor).toBe(400);
    const rise = effect.shares.reduce((sum, share) => sum + share.newMinor - share.oldMinor, 0);
    expect(rise).toBe(400);
    expect(effect.mustAgree).toBe(0);
    // Only looked at: nothing is kept.
    expect((await orders(world)).orders.every(({ quotedAt }) => quotedAt === null)).toBe(true);
    await set().expect(200);
    const now = await orders(world);
    expect(now.orders.find(({ supplierId }) => supplierId === world.suppliers.salts)).toMatchObject(
      {
        goodsMinor: 9900,
        version: 1,
      },
    );
    expect(now.shares.map(({ newMinor }) => newMinor)).toEqual(
      effect.shares.map(({ newMinor }) => newMinor),
    );
    const own = await world.people.own.agent();
    await own
      .post(`${base(world)}/orders/${world.suppliers.salts}/check`)
      .send({ prices: [{ offerId: world.offers.magnesium, priceMinor: 5 }], shippingMinor: 0 })
      .expect(422);
  });

  it('waits past the price limit until each has agreed or left free of charge', async () => {
    const world = await makeLockedWorld();
    const [ana, ben, cleo] = world.payers;
    for (const person of world.payers) await pay(world, person);
    const { check, set } = await quote(world, world.suppliers.salts, 12_000);
    expect((check.body as QuoteEffect).mustAgree).toBeGreaterThan(0);
    await set().expect(200);
    const refused = await place(world, world.suppliers.salts);
    expect(refused.body.code).toBe('price_limit');

    const shareOf = async (person: Person) => {
      const agent = await person.agent();
      const reply: OrdersReply = (await agent.get(`${base(world)}/orders`).expect(200)).body;
      expect(reply.shares).toEqual([]);
      return { agent, mine: reply.mine };
    };
    for (const person of [ana, ben]) {
      const { agent, mine } = await shareOf(person);
      expect(mine?.overLimit).toBe(true);
      const url = `${base(world)}/price-answer`;
      await agent
        .post(url)
        .send({ agree: true, shareMinor: (mine?.newMinor ?? 0) - 1 })
        .expect(409);
      await agent.post(url).send({ agree: true, shareMinor: mine?.newMinor }).expect(200);
    }
    expect((await place(world, world.suppliers.salts)).body.code).toBe('price_limit');

    const { agent, mine } = await shareOf(cleo);
    await agent
      .post(`${base(world)}/price-answer`)
      .send({ agree: false, shareMinor: mine?.newMinor })
      .expect(200);
    const now = await orders(world);
    expect(now.shares.map(({ name }) => name)).toEqual(['Ana Payer', 'Ben Payer']);
    const statement = await agent
      .get(`/api/v1/clubs/${world.club.slug}/ledger/statement`)
      .expect(200);
    expect(statement.body).toMatchObject({ openMinor: 0, creditMinor: world.dueOf(cleo) });
    // The others' shares rose once more without her: what they had agreed to is no longer enough.
    const waiting = now.shares.filter(({ overLimit, agreed }) => overLimit && !agreed);
    for (const share of waiting) {
      const person = world.payers.find(({ membership }) => membership.id === share.memberId);
      await (
        await person?.agent()
      )
        ?.post(`${base(world)}/price-answer`)
        .send({ agree: true, shareMinor: share.newMinor })
        .expect(200);
    }
    expect((await place(world, world.suppliers.salts)).status).toBe(200);
  });

  it('drops who has not paid: plan and shares anew, each told, nobody asked for more', async () => {
    const world = await makeLockedWorld();
    const [ana, ben, cleo] = world.payers;
    await pay(world, ana);
    await pay(world, ben);
    await pay(world, cleo, 100);
    const own = await world.people.own.agent();
    const check = await own
      .post(`${base(world)}/drop/check`)
      .send({ memberIds: [cleo.membership.id] })
      .expect(200);
    expect((check.body as QuoteEffect).shares).toHaveLength(2);
    const before = await orders(world);
    const drop = (memberIds: string[], termsVersion = before.termsVersion) =>
      own.post(`${base(world)}/drop`).send({ memberIds, termsVersion, reason: 'Not paid in time' });
    expect((await drop([ana.membership.id])).status).toBe(422);
    expect((await drop([randomUUID()])).status).toBe(422);
    expect((await drop([cleo.membership.id], 1)).body.code).toBe('stale');
    const dropped = await drop([cleo.membership.id]);
    expect(dropped.status).toBe(200);

    const locked = dropped.body as LockedReply;
    expect(locked.members.find(({ name }) => name === 'Cleo Payer')).toMatchObject({
      dropped: true,
      money: { openMinor: 0, dueMinor: 0 },
    });
    for (const person of [ana, ben]) {
      const row = locked.members.find(({ id }) => id === person.membership.id);
      expect(row?.money?.dueMinor).toBeLessThanOrEqual(world.dueOf(person));
      expect(row?.money?.openMinor).toBe(0);
      const effect = (check.body as QuoteEffect).shares.find(
        ({ memberId }) => memberId === row?.id,
      );
      expect(row?.shareMinor).toBe(effect?.newMinor);
    }
    const sum = locked.members.reduce((total, { shareMinor }) => total + shareMinor, 0);
    const [snapshot] = await select<{ total: number; n: number }>(
      `select (sheet->>'totalMinor')::int as total, (select count(*)::int from snapshots where buy_id = :id) as n
       from snapshots where buy_id = :id order by created_at desc limit 1`,
      { id: world.buy.id },
    );
    expect(snapshot).toEqual({ total: sum + locked.totals.shelfMinor, n: 2 });
    const told = await select<{ subject: string }>(
      'select subject from notices where buy_id = :id and membership_id = :cleo',
      { id: world.buy.id, cleo: cleo.membership.id },
    );
    expect(told.map(({ subject }) => subject)).toContain('You are no longer in Test buy');
    // Ana now bears the magnesium alone, which is past the limit: she has to agree first.
    expect((await place(world, world.suppliers.salts)).body.code).toBe('price_limit');
    const agent = await ana.agent();
    const { mine } = (await agent.get(`${base(world)}/orders`).expect(200)).body as OrdersReply;
    await agent
      .post(`${base(world)}/price-answer`)
      .send({ agree: true, shareMinor: mine?.newMinor })
      .expect(200);
    expect((await place(world, world.suppliers.salts)).status).toBe(200);
    const late = await own.post(`${base(world)}/drop`).send({
      memberIds: [ana.membership.id],
      termsVersion: (await orders(world)).termsVersion,
      reason: 'Late',
    });
    expect(late.status).toBe(409);
  });

  it('does not drop everybody', async () => {
    const world = await makeLockedWorld();
    const own = await world.people.own.agent();
    const { termsVersion } = await orders(world);
    const reply = await own.post(`${base(world)}/drop`).send({
      memberIds: world.payers.map(({ membership }) => membership.id),
      termsVersion,
      reason: 'Nobody paid',
    });
    expect(reply.body.code).toBe('wrong_state');
  });

  it('reminds those who owe, by name or all', async () => {
    const world = await makeLockedWorld();
    const [ana, ben] = world.payers;
    await pay(world, ana);
    const own = await world.people.own.agent();
    const url = `${base(world)}/due-reminders`;
    expect((await own.post(url).send({ memberIds: [] }).expect(200)).body.told).toBe(2);
    expect((await own.post(url).send({ memberIds: [ben.membership.id] })).body.told).toBe(1);
    expect((await own.post(url).send({ memberIds: [ana.membership.id] })).body.told).toBe(0);
    const rows = await select<{ text_body: string }>(
      `select text_body from outbox where kind = 'reminder' and address = :address`,
      { address: ben.email },
    );
    expect(rows).toHaveLength(2);
    expect(rows[0]?.text_body).toMatch(/RF\d\d /);
  });
});

describe('a supplier’s order', () => {
  it('goes through its states, and the buy is cancelled when all fail', async () => {
    const world = await makeLockedWorld();
    for (const person of world.payers) await pay(world, person);
    await place(world, world.suppliers.salts);
    await place(world, world.suppliers.other);
    const own = await world.people.own.agent();
    const mark = async (supplierId: string, state: string, note = 'They wrote today') => {
      const order = (await orders(world)).orders.find((each) => each.supplierId === supplierId);
      return own
        .post(`${base(world)}/orders/${supplierId}/state`)
        .send({ version: order?.version, state, note });
    };
    expect((await mark(world.suppliers.salts, 'confirmed')).status).toBe(200);
    expect((await mark(world.suppliers.salts, 'confirmed')).body.code).toBe('wrong_state');
    expect((await mark(world.suppliers.salts, 'arrived')).status).toBe(422);
    expect((await mark(world.suppliers.salts, 'failed', '')).status).toBe(422);
    expect((await mark(world.suppliers.salts, 'failed')).status).toBe(200);
    expect((await orders(world)).state).toBe('ordered');
    const stale = await own
      .post(`${base(world)}/orders/${world.suppliers.other}/state`)
      .send({ version: 0, state: 'failed', note: 'Gone' });
    expect(stale.body.code).toBe('stale');
    const last = await mark(world.suppliers.other, 'failed');
    expect(last.body.state).toBe('cancelled');
    const tasks = await (
      await world.people.treasurer.agent()
    )
      .get(`/api/v1/clubs/${world.club.slug}/ledger/tasks`)
      .expect(200);
    expect(tasks.body.refunds).toHaveLength(3);
  });

  it('prints as CSV that no spreadsheet runs', async () => {
    const world = await makeLockedWorld();
    await transact((tx) =>
      execute(
        `update snapshots set terms = jsonb_set(terms, '{offers,0,label}', '"=HYPERLINK(\\"http://x\\")"') where buy_id = :id`,
        { id: world.buy.id },
        tx,
      ),
    );
    const own = await world.people.own.agent();
    const texts = [];
    for (const supplier of Object.values(world.suppliers)) {
      const reply = await own.get(`${base(world)}/orders/${supplier}/csv`).expect(200);
      expect(reply.headers['content-type']).toMatch('text/csv');
      expect(reply.headers['content-disposition']).toMatch('attachment');
      texts.push(reply.text);
    }
    const all = texts.join('\n');
    expect(all).toMatch(/25 kg,1,95\.00,95\.00/);
    expect(all).toMatch(/Total,,,,,,107\.00/);
    expect(all).not.toMatch(/(^|,)"?=/m);
    await own.get(`${base(world)}/orders/${randomUUID()}/csv`).expect(409);
    const member = await world.people.member.agent();
    await member.get(`${base(world)}/orders/${world.suppliers.salts}`).expect(403);
  });
});
