import { describe, expect, it } from 'vitest';
import { execute, select, transact } from '#server/config/database.ts';
import { Buy } from '#server/models/Buy.ts';
import { Pledge } from '#server/models/Pledge.ts';
import { postTransaction } from '#server/services/ledger/postTransaction.ts';
import { owedOfBuy } from '#server/services/ledger/owed.ts';
import { paymentReference } from '#shared/domain/buys/paymentReference.ts';
import { shareOut } from '#shared/domain/shares/shareOut.ts';
import type { ShareRequest, ShareSheet } from '#shared/domain/shares/shareTypes.ts';
import { BuyHeader } from '#shared/schemas/buys.ts';
import { SheetReply } from '#shared/schemas/sheet.ts';
import { closesIn, givePledge, makeSheetWorld, pledgeUrl } from '#tests/support/sheetWorld.ts';
import type { SheetWorld } from '#tests/support/sheetWorld.ts';
import type { Person } from '#tests/support/world.ts';

async function lock(world: SheetWorld, status = 200) {
  await world.buy.reload();
  const agent = await world.people.own.agent();
  const { termsVersion } = world.buy;
  return agent.post(`${world.url}/lock`).send({ termsVersion }).expect(status);
}

async function reopen(world: SheetWorld, body: Record<string, unknown> = {}, status = 200) {
  await world.buy.reload();
  const agent = await world.people.own.agent();
  return agent
    .post(`${world.url}/reopen`)
    .send({
      termsVersion: world.buy.termsVersion,
      reason: 'A supplier dropped its price.',
      closesAt: new Date(Date.now() + 86_400_000).toISOString(),
      ...body,
    })
    .expect(status);
}

const dues = (world: SheetWorld) =>
  select<{ membership_id: string; locked_minor: number; due_minor: number }>(
    'select membership_id, locked_minor, due_minor from buy_members where buy_id = :buyId order by due_minor desc',
    { buyId: world.buy.id },
  );

async function pay(world: SheetWorld, person: Person, amountMinor: number): Promise<void> {
  await transact((tx) =>
    postTransaction(tx, {
      clubId: world.club.id,
      eventType: 'test',
      eventId: crypto.randomUUID(),
      onDate: '2026-12-01',
      memo: 'paid',
      buyId: world.buy.id,
      by: { membershipId: null, name: 'Test' },
      postings: [
        { account: { kind: 'bank' }, amountMinor },
        { account: { kind: 'member', refId: person.membership.id }, amountMinor: -amountMinor },
      ],
    }),
  );
}

describe('locking', () => {
  it('keeps the estimate, what it was made of and what each owes by when', async () => {
    const world = await makeSheetWorld();
    const { member, treasurer } = world.people;
    await givePledge(world, member, world.line, 1200);
    await givePledge(world, treasurer, world.line, 500);
    await givePledge(world, treasurer, world.plain, 400);
    const head = BuyHeader.parse((await lock(world)).body);
    expect(head.state).toBe('locked');
    const [snapshot] = await select<{
      request: ShareRequest;
      sheet: ShareSheet;
      terms: unknown;
      plan: unknown;
    }>(
      `select request, sheet, plan, terms from snapshots where buy_id = :buyId and kind = 'estimate'`,
      { buyId: world.buy.id },
    );
    expect(snapshot && shareOut(snapshot.request)).toEqual(snapshot?.sheet);
    expect(snapshot?.sheet.totalMinor).toBe(2 * 600 + 1450 + 1000);
    const owed = await dues(world);
    expect(owed.reduce((sum, row) => sum + row.due_minor, 0)).toBe(3650);
    expect(owed.every((row) => row.due_minor === row.locked_minor)).toBe(true);
    // End of the fifth day after the lock, in Berlin.
    const due = new Date(head.dueAt ?? 0);
    expect(due.toLocaleTimeString('en-GB', { timeZone: 'Europe/Berlin' })).toBe('23:59:59');
    const days = (+due - Date.now()) / 86_400_000;
    expect(days > 5 && days < 6).toBe(true);
  });

  it('asks each for their sum, with how to pay it', async () => {
    const world = await makeSheetWorld();
    const { member } = world.people;
    await world.club.update({ transferHow: 'IBAN of the club: DE00 0000' });
    await givePledge(world, member, world.plain, 400);
    await lock(world);
    const [mail] = await select<{ address: string; subject: string; text_body: string }>(
      `select address, subject, text_body from outbox where buy_id = :buyId and kind = 'locked'`,
      { buyId: world.buy.id },
    );
    expect(mail).toMatchObject({
      address: member.email,
      subject: 'Test buy is locked: €24.50 due',
    });
    expect(mail?.text_body).toContain('IBAN of the club: DE00 0000');
    expect(mail?.text_body).toContain(paymentReference(world.buy.id, member.membership.id));
  });

  it('is refused with the reason, and changes nothing', async () => {
    const world = await makeSheetWorld();
    expect((await lock(world, 409)).body.code).toBe('minimum_unmet');
    await givePledge(world, world.people.member, world.plain, 400);
    await Buy.update(
      { leftOverPayer: 'shelf', shelfLimitMinor: 100 },
      { where: { id: world.buy.id } },
    );
    const reply = await lock(world, 409);
    expect(reply.body.code).toBe('shelf_limit');
    expect(reply.body.detail).toMatch(/its limit is 1.00 EUR/);
    await transact((tx) =>
      execute(
        'update offers set archived_at = now() where id = :id',
        { id: world.offers.plain },
        tx,
      ),
    );
    expect((await lock(world, 409)).body.code).toBe('plan_infeasible');
    await world.buy.reload();
    expect(world.buy.state).toBe('open');
  });

  it('happens once, for the terms that the organiser saw', async () => {
    const world = await makeSheetWorld();
    await givePledge(world, world.people.member, world.plain, 400);
    const agent = await world.people.own.agent();
    const body = { termsVersion: world.buy.termsVersion };
    const replies = await Promise.all(
      [1, 2, 3].map(() => agent.post(`${world.url}/lock`).send(body)),
    );
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409, 409]);
    expect(await dues(world)).toHaveLength(1);
  });

  it('fixes prices: what an offer costs later changes nothing on the sheet', async () => {
    const world = await makeSheetWorld();
    await givePledge(world, world.people.member, world.plain, 400);
    await lock(world);
    await transact((tx) =>
      execute(
        'update offers set price_minor = 9999 where id = :id',
        { id: world.offers.plain },
        tx,
      ),
    );
    const agent = await world.people.member.agent();
    const sheet = SheetReply.parse((await agent.get(`${world.url}/sheet`)).body);
    const offer = sheet.terms.offers.find(({ id }) => id === world.offers.plain);
    expect([sheet.terms.state, offer?.priceMinor]).toEqual(['locked', 1450]);
  });
});

describe('a race between pledges and the lock', () => {
  it('counts each pledge in the estimate or refuses it, never neither nor both', async () => {
    for (let round = 0; round < 12; round += 1) {
      const world = await makeSheetWorld();
      const { member, treasurer, steward, own } = world.people;
      await givePledge(world, own, world.plain, 1000);
      const people = [member, treasurer, steward];
      const agents = await Promise.all(people.map((person) => person.agent()));
      const organise = await own.agent();
      const pause = (ms: number) => new Promise((resolve) => setTimeout(resolve, ms));
      const [locked, ...pledged] = await Promise.all([
        pause(round % 4).then(() =>
          organise.post(`${world.url}/lock`).send({ termsVersion: world.buy.termsVersion }),
        ),
        ...people.map((person, index) =>
          pause((round * 3 + index * 7) % 25).then(() =>
            agents[index]
              ?.put(pledgeUrl(world, world.plain, person))
              .send({ wantedMg: 500_000, upToMg: null, version: 0 }),
          ),
        ),
      ]);
      expect(locked.status).toBe(200);
      const [snapshot] = await select<{ sheet: ShareSheet }>(
        'select sheet from snapshots where buy_id = :buyId',
        { buyId: world.buy.id },
      );
      const inSheet = new Set(snapshot?.sheet.members.map(({ memberId }) => memberId));
      pledged.forEach((reply, index) => {
        expect([200, 409]).toContain(reply?.status);
        if (reply?.status === 409) expect(reply.body.code).toBe('buy_locked');
        expect(inSheet.has(people[index]?.membership.id ?? '')).toBe(reply?.status === 200);
      });
      expect(await Pledge.count({ where: { buyId: world.buy.id } })).toBe(inSheet.size);
    }
  });

  it('at the closing time goes by the database clock', async () => {
    const world = await makeSheetWorld();
    const { member } = world.people;
    const agent = await member.agent();
    await closesIn(world, 0.35 / 3600);
    const url = pledgeUrl(world, world.plain, member);
    let version = 0;
    let last = 200;
    while (last === 200) {
      const body = { wantedMg: (version + 1) * 1000, upToMg: null, version };
      const reply = await agent.put(url).send(body);
      last = reply.status;
      if (last === 200) version += 1;
      else expect(reply.body.code).toBe('buy_locked');
    }
    await world.buy.reload();
    const [late] = await select<{ late: boolean }>(
      `select bool_or(p.at > b.closes_at) as late from pledges p join buys b on b.id = p.buy_id where b.id = :buyId`,
      { buyId: world.buy.id },
    );
    expect(version).toBeGreaterThan(0);
    expect(late?.late).toBe(false);
  });
});

describe('reopening', () => {
  it('keeps pledges and payments, tells everyone, and asks at the next lock only for what rose', async () => {
    const world = await makeSheetWorld();
    const { member, treasurer } = world.people;
    const first = await givePledge(world, member, world.plain, 400);
    await givePledge(world, treasurer, world.plain, 400);
    await lock(world);
    await pay(world, member, 1225);
    const head = BuyHeader.parse((await reopen(world)).body);
    expect(head).toMatchObject({
      state: 'open',
      reopenReason: 'A supplier dropped its price.',
      dueAt: null,
    });
    const told = await select('select id from notices where buy_id = :b and kind = :k', {
      b: world.buy.id,
      k: 'reopened',
    });
    expect(told).toHaveLength(2);
    const stood = await Pledge.findByPk(first.id);
    expect([stood?.wantedMg, +(stood?.at ?? 0)]).toEqual([400_000, +first.at]);

    // The other leaves, so the first now pays for all of it.
    const agent = await treasurer.agent();
    await agent
      .put(pledgeUrl(world, world.plain, treasurer))
      .send({ wantedMg: 0, upToMg: null, version: 1 })
      .expect(200);
    await lock(world);
    const owed = await transact((tx) => owedOfBuy(world.buy.id, tx));
    expect(owed.get(member.membership.id)).toMatchObject({ paidMinor: 1225, openMinor: 1225 });
    expect(owed.get(treasurer.membership.id)?.openMinor ?? 0).toBe(0);
    const snapshots = await select('select id from snapshots where buy_id = :b', {
      b: world.buy.id,
    });
    expect(snapshots).toHaveLength(2);
    const [mail] = await select<{ subject: string }>(
      `select subject from outbox where buy_id = :b and kind = 'locked' and address = :to order by created_at desc limit 1`,
      { b: world.buy.id, to: member.email },
    );
    expect(mail?.subject).toBe('Test buy is locked: €12.25 due');
  });

  it('wants a reason, a time to come and no order placed', async () => {
    const world = await makeSheetWorld();
    await givePledge(world, world.people.member, world.plain, 400);
    await reopen(world, {}, 409);
    await lock(world);
    expect(Object.keys((await reopen(world, { reason: '' }, 422)).body.errors)).toEqual(['reason']);
    const past = await reopen(world, { closesAt: new Date(0).toISOString() }, 422);
    expect(Object.keys(past.body.errors)).toEqual(['closesAt']);
    expect((await reopen(world, { termsVersion: 1 }, 409)).body.code).toBe('stale');
    await transact((tx) =>
      execute(
        `insert into supplier_orders (buy_id, supplier_id, state, packs, goods_minor, shipping_minor, placed_at)
         values (:b, :s, 'placed', '[]', 1, 1, now())`,
        { b: world.buy.id, s: world.supplierId },
        tx,
      ),
    );
    expect((await reopen(world, {}, 409)).body.detail).toMatch(/order is placed/);
  });
});
