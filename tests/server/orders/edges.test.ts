import { describe, expect, it } from 'vitest';
import { execute, select, transact } from '#server/config/database.ts';
import { buyAccountBalance } from '#server/services/ledger/balances.ts';
import { costsOfBuy } from '#server/services/orders/costsOfBuy.ts';
import { remindDueBuys } from '#server/services/orders/remindDues.ts';
import { accountSum, lockWorldBuy, makeLockedWorld } from '#tests/support/locked.ts';
import { base, orders, pay, place, quote } from '#tests/support/ordering.ts';

const change = (sql: string, values: Record<string, unknown>) =>
  transact((tx) => execute(sql, values, tx));

/** A locked world in which the second supplier is the club's own shelf, with one lot that covers the order. */
async function makeShelfWorld() {
  const world = await makeLockedWorld();
  const shelf = world.suppliers.other;
  await change(
    `insert into shelf_stock (club_id, salt_id, lot, mg, cost_minor, price_minor_per_kg, origin)
     select club_id, salt_id, 'L-1', pack_mg, 700, 1, 'left_over' from offers where supplier_id = :shelf`,
    { shelf },
  );
  await change('update suppliers set is_shelf = true where id = :shelf', { shelf });
  await change(
    `update snapshots set terms = jsonb_set(terms, '{suppliers}', (
       select jsonb_agg(case when s->>'id' = :shelf then s || '{"isShelf": true}' else s end)
       from jsonb_array_elements(terms->'suppliers') s)) where buy_id = :buyId`,
    { shelf, buyId: world.buy.id },
  );
  for (const person of world.payers) await pay(world, person);
  return { world, shelf };
}

describe('an order from the club’s own shelf', () => {
  it('costs what the shelf asks, without a bill, and goes back when it fails', async () => {
    const { world, shelf } = await makeShelfWorld();
    expect((await place(world, shelf)).status).toBe(200);
    expect(await buyAccountBalance(world.buy.id)).toBe(1840);
    expect(await accountSum(world.club.id, 'shelf')).toBe(-700);
    expect(await accountSum(world.club.id, 'losses')).toBe(-1140);
    await place(world, world.suppliers.salts);
    const costs = await costsOfBuy(world.buy.id);
    expect(costs.reason).toContain('Grainmoor Salts');
    expect(costs.reason).not.toContain('Tidewell');
    const own = await world.people.own.agent();
    const order = (await orders(world)).orders.find(({ supplierId }) => supplierId === shelf);
    await own
      .post(`${base(world)}/orders/${shelf}/state`)
      .send({ version: order?.version, state: 'failed', note: 'The bag was wet' })
      .expect(200);
    expect(await buyAccountBalance(world.buy.id)).toBe(0);
    expect(await accountSum(world.club.id, 'shelf')).toBe(0);
    expect(await accountSum(world.club.id, 'losses')).toBe(0);
  });

  it('comes as one bag for each lot, and is refused when the lot was sold meanwhile', async () => {
    const { world, shelf } = await makeShelfWorld();
    await change('update shelf_stock set mg = mg - 1 where club_id = :clubId', {
      clubId: world.club.id,
    });
    const refused = await place(world, shelf);
    expect(refused.status).toBe(409);
    expect(refused.body.detail).toContain('The shelf has only');
    await change('update shelf_stock set mg = mg + 1 where club_id = :clubId', {
      clubId: world.club.id,
    });
    expect((await place(world, shelf)).status).toBe(200);
    const own = await world.people.own.agent();
    const order = (await orders(world)).orders.find(({ supplierId }) => supplierId === shelf);
    await own
      .post(`${base(world)}/orders/${shelf}/arrival`)
      .send({
        version: order?.version,
        packs: order?.packs.map(({ offerId, packs }) => ({ offerId, packs })),
        note: '',
      })
      .expect(200);
    const bags = await select<{ lot: string; mg: number }>(
      'select lot, nominal_mg as mg from bags where buy_id = :id',
      { id: world.buy.id },
    );
    expect(bags).toEqual([{ lot: 'L-1', mg: 5_000_000 }]);
  });
});

describe('a quote', () => {
  it('ends with the lock it was made for', async () => {
    const world = await makeLockedWorld();
    const { set } = await quote(world, world.suppliers.salts, 9900);
    await set().expect(200);
    const own = await world.people.own.agent();
    const { termsVersion } = await orders(world);
    await own
      .post(`${base(world)}/reopen`)
      .send({
        termsVersion,
        reason: 'A cheaper supplier turned up',
        closesAt: new Date(Date.now() + 86_400_000).toISOString(),
      })
      .expect(200);
    await change('delete from buy_members where buy_id = :id', { id: world.buy.id });
    await lockWorldBuy(world.buy.id);
    const order = (await orders(world)).orders.find(
      ({ supplierId }) => supplierId === world.suppliers.salts,
    );
    expect(order).toMatchObject({ goodsMinor: 9500, quotedAt: null });
  });

  it('is not taken over for an order that is placed', async () => {
    const world = await makeLockedWorld();
    for (const person of world.payers) await pay(world, person);
    const { set } = await quote(world, world.suppliers.salts, 9900);
    await place(world, world.suppliers.salts);
    expect((await set()).status).toBe(409);
    const again = await quote(world, world.suppliers.salts, 9900);
    expect(again.check.status).toBe(409);
    expect((await again.set()).body.code).toBe('wrong_state');
  });
});

describe('a buy whose order is out', () => {
  it('can neither be cancelled nor opened again', async () => {
    const world = await makeLockedWorld();
    for (const person of world.payers) await pay(world, person);
    await place(world, world.suppliers.salts);
    const own = await world.people.own.agent();
    const { termsVersion } = await orders(world);
    const cancel = await own
      .post(`${base(world)}/cancel`)
      .send({ termsVersion, reason: 'Second thoughts' });
    expect(cancel.body.code).toBe('wrong_state');
    const closesAt = new Date(Date.now() + 86_400_000).toISOString();
    const reopen = await own
      .post(`${base(world)}/reopen`)
      .send({ termsVersion, reason: 'Second thoughts', closesAt });
    expect(reopen.body.code).toBe('wrong_state');
  });
});

describe('the reminders’ round', () => {
  const remindersFor = (buyId: string) =>
    select<{ membership_id: string }>(
      "select membership_id from notices where buy_id = :buyId and kind = 'reminder'",
      { buyId },
    );
  const due = (buyId: string, when: string) =>
    change(
      `update buys set due_at = now() + interval '${when}', locked_at = now() - interval '6 days' where id = :buyId`,
      { buyId },
    );

  it('reminds who owes the day before and the day after, once each', async () => {
    const world = await makeLockedWorld();
    const [ana, ben, cleo] = world.payers;
    await pay(world, ana);
    const own = await world.people.own.agent();
    await own
      .put(`${base(world)}/vouched/${cleo.membership.id}`)
      .send({ reason: 'Pays at the meetup' })
      .expect(200);
    const { id } = world.buy;
    await due(id, '3 days');
    await remindDueBuys();
    expect(await remindersFor(id)).toEqual([]);
    await due(id, '20 hours');
    await remindDueBuys();
    await remindDueBuys();
    expect(await remindersFor(id)).toEqual([{ membership_id: ben.membership.id }]);
    await due(id, '-1 hours');
    await remindDueBuys();
    expect(await remindersFor(id)).toHaveLength(1);
    await change(
      "update buy_members set due_reminded_at = now() - interval '3 days' where buy_id = :id",
      { id },
    );
    await due(id, '-25 hours');
    await Promise.all([remindDueBuys(), remindDueBuys()]);
    await remindDueBuys();
    expect(await remindersFor(id)).toHaveLength(2);
    await due(id, '-20 days');
    await remindDueBuys();
    expect(await remindersFor(id)).toHaveLength(2);
  });
});
