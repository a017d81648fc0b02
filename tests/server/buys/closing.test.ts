import { describe, expect, it } from 'vitest';
import { execute, select, transact } from '#server/config/database.ts';
import { Buy } from '#server/models/Buy.ts';
import { closeDueBuys } from '#server/services/sheet/closeBuys.ts';
import { tellClosingSoon } from '#server/services/sheet/tellClosingSoon.ts';
import {
  closesIn,
  givePledge,
  makeSheetWorld,
  type SheetWorld,
} from '#tests/support/sheetWorld.ts';

const stateOf = async (world: SheetWorld) => {
  await world.buy.reload();
  return world.buy;
};

const subjects = async (world: SheetWorld, kind: string) =>
  (
    await select<{ subject: string }>(
      'select subject from notices where buy_id = :buyId and kind = :kind order by created_at',
      { buyId: world.buy.id, kind },
    )
  ).map(({ subject }) => subject);

describe('closing', () => {
  it('leaves alone what is not due', async () => {
    const world = await makeSheetWorld();
    await givePledge(world, world.people.member, world.plain, 400);
    await closeDueBuys();
    expect((await stateOf(world)).state).toBe('open');
  });

  it('locks once, however many processes close at the same moment', async () => {
    const world = await makeSheetWorld();
    await givePledge(world, world.people.member, world.plain, 400);
    await closesIn(world, -0.001);
    await Promise.all([closeDueBuys(), closeDueBuys(), closeDueBuys()]);
    const buy = await stateOf(world);
    expect(buy.state).toBe('locked');
    const rows = await select('select id from snapshots where buy_id = :buyId', { buyId: buy.id });
    expect(rows).toHaveLength(1);
    const audit = await select<{ actor_name: string }>(
      `select actor_name from audit_entries where buy_id = :buyId and action = 'buys.lock'`,
      { buyId: buy.id },
    );
    expect(audit).toEqual([{ actor_name: 'Closing time' }]);
    expect(await subjects(world, 'locked')).toEqual(['Test buy is locked: €24.50 due']);
  });

  it.each([
    ['nobody pledged', {}, /Nobody has pledged/],
    ['too few members', { minimumKind: 'members', minimumAmount: 2 }, /minimum is 2 members/],
    ['too little mass', { minimumKind: 'mass', minimumAmount: 500_000 }, /minimum is 500/],
    ['too little value', { minimumKind: 'value', minimumAmount: 1451 }, /minimum is 14.51/],
  ] as const)('freezes for 72 hours when %s', async (name, fields, why) => {
    const world = await makeSheetWorld();
    if (name !== 'nobody pledged') await givePledge(world, world.people.member, world.plain, 400);
    await Buy.update({ ...fields }, { where: { id: world.buy.id } });
    await closesIn(world, -0.001);
    await closeDueBuys();
    const buy = await stateOf(world);
    expect(buy.state).toBe('open');
    expect(buy.frozenUntil && buy.frozenAt && +buy.frozenUntil - +buy.frozenAt).toBe(
      72 * 3_600_000,
    );
    const [change] = await select<{ summary: string }>(
      'select summary from terms_changes where buy_id = :buyId',
      { buyId: buy.id },
    );
    expect(change?.summary).toMatch(why);
    await closeDueBuys();
    expect((await stateOf(world)).termsVersion).toBe(buy.termsVersion);
  });

  it('freezes when no packs cover the pledges', async () => {
    const world = await makeSheetWorld();
    await givePledge(world, world.people.member, world.plain, 400);
    await transact((tx) =>
      execute(
        'update offers set archived_at = now() where id = :id',
        { id: world.offers.plain },
        tx,
      ),
    );
    await closesIn(world, -0.001);
    await closeDueBuys();
    expect((await stateOf(world)).frozenAt).not.toBeNull();
  });

  it("freezes when the shelf's part is above its limit", async () => {
    const world = await makeSheetWorld();
    await givePledge(world, world.people.member, world.plain, 400);
    await Buy.update(
      { leftOverPayer: 'shelf', shelfLimitMinor: 1000 },
      { where: { id: world.buy.id } },
    );
    await closesIn(world, -0.001);
    await closeDueBuys();
    expect((await stateOf(world)).frozenAt).not.toBeNull();
    await Buy.update(
      { shelfLimitMinor: 5000, frozenAt: null, frozenUntil: null },
      { where: { id: world.buy.id } },
    );
    await closeDueBuys();
    expect((await stateOf(world)).state).toBe('locked');
  });

  it('cancels itself when nobody decides', async () => {
    const world = await makeSheetWorld();
    await closesIn(world, -80);
    await Buy.update(
      { frozenAt: new Date(Date.now() - 73 * 3_600_000), frozenUntil: new Date(Date.now() - 1000) },
      { where: { id: world.buy.id } },
    );
    await Promise.all([closeDueBuys(), closeDueBuys()]);
    expect((await stateOf(world)).state).toBe('cancelled');
  });
});

describe('a frozen buy', () => {
  async function frozen() {
    const world = await makeSheetWorld();
    await givePledge(world, world.people.member, world.plain, 400);
    await Buy.update({ minimumKind: 'members', minimumAmount: 2 }, { where: { id: world.buy.id } });
    await closesIn(world, -0.001);
    await closeDueBuys();
    await stateOf(world);
    return { world, agent: await world.people.own.agent() };
  }

  it('is extended by its organiser, and pledges move again', async () => {
    const { world, agent } = await frozen();
    const closesAt = new Date(Date.now() + 86_400_000).toISOString();
    const body = { termsVersion: world.buy.termsVersion, closesAt };
    await (await world.people.member.agent()).post(`${world.url}/extend`).send(body).expect(403);
    const past = await agent
      .post(`${world.url}/extend`)
      .send({ ...body, closesAt: new Date(0).toISOString() })
      .expect(422);
    expect(Object.keys(past.body.errors)).toEqual(['closesAt']);
    await agent
      .post(`${world.url}/extend`)
      .send({ ...body, termsVersion: 1 })
      .expect(409);
    await agent.post(`${world.url}/extend`).send(body).expect(200);
    const buy = await stateOf(world);
    expect([buy.frozenAt, buy.closesAt?.toISOString()]).toEqual([null, closesAt]);
  });

  it('locks at once when its minimum is lowered enough', async () => {
    const { world, agent } = await frozen();
    const send = (minimum: { kind: string; amount: number }) =>
      agent
        .post(`${world.url}/extend`)
        .send({ termsVersion: world.buy.termsVersion, closesAt: null, minimum });
    await send({ kind: 'members', amount: 3 }).expect(422);
    await send({ kind: 'mass', amount: 1 }).expect(422);
    await send({ kind: 'members', amount: 1 }).expect(200);
    await expect.poll(async () => (await stateOf(world)).state, { timeout: 5000 }).toBe('locked');
  });
});

describe('closing soon', () => {
  it('is told to all members once per closing time', async () => {
    const world = await makeSheetWorld();
    await Buy.update({ openedAt: new Date(Date.now() - 9e8) }, { where: { id: world.buy.id } });
    await tellClosingSoon();
    expect(await subjects(world, 'closing_soon')).toEqual([]);
    await closesIn(world, 20);
    await Promise.all([tellClosingSoon(), tellClosingSoon()]);
    expect(await subjects(world, 'closing_soon')).toHaveLength(7);
    await tellClosingSoon();
    expect(await subjects(world, 'closing_soon')).toHaveLength(7);
  });
});
