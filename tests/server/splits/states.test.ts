import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import type { Problem } from '#shared/schemas/problem.ts';
import type { FinalPreview, MyShare, SplitSheet } from '#shared/schemas/splits.ts';
import { execute, select, transact } from '#server/config/database.ts';
import { handOnPortions } from '#server/services/splits/handOnPortions.ts';
import type { LockedWorld } from '#tests/support/locked.ts';
import {
  arriveAll,
  billAll,
  makeOrderedWorld,
  makeSplitWorld,
  weighingOf,
} from '#tests/support/splitWorld.ts';
import type { Person } from '#tests/support/world.ts';

const urlOf = (world: LockedWorld, path = '') =>
  `/api/v1/clubs/${world.club.slug}/buys/${world.buy.id}${path}`;

async function call(
  world: LockedWorld,
  person: Person,
  method: 'get' | 'post' | 'put',
  path: string,
  body: object = {},
) {
  const agent = await person.agent();
  return method === 'get'
    ? agent.get(urlOf(world, path))
    : agent[method](urlOf(world, path)).send(body);
}

const splitAs = async (world: LockedWorld, person: Person) =>
  (await call(world, person, 'get', '/split')).body as SplitSheet;

describe('arrivals', () => {
  it('refuses an arrival of nothing, of what was not ordered, and of a version gone by', async () => {
    const world = await makeOrderedWorld();
    const own = world.people.own;
    const { orders } = await splitAs(world, own);
    const order = orders.find(({ supplierId }) => supplierId === world.suppliers.other)!;
    const arrive = (version: number, offerId: string, packs: number) =>
      call(world, own, 'post', `/orders/${order.supplierId}/arrival`, {
        version,
        packs: [{ offerId, packs }],
        note: '',
      });
    const magnesium = world.offers.magnesium;
    const none = await arrive(order.version, magnesium, 0);
    expect([none.status, (none.body as Problem).errors]).toEqual([
      422,
      { packs: 'Nothing came: mark the order as failed instead.' },
    ]);
    const unknown = await arrive(order.version, randomUUID(), 1);
    expect((unknown.body as Problem).errors).toHaveProperty(['packs.0.offerId']);
    expect((await arrive(order.version + 1, magnesium, 1)).status).toBe(409);
    expect((await splitAs(world, own)).bags).toEqual([]);

    await world.buy.reload();
    const early = await call(world, own, 'post', '/arrive', {
      termsVersion: world.buy.termsVersion,
    });
    expect([early.status, (early.body as Problem).detail]).toEqual([
      409,
      'Still to come: Grainmoor Salts, Tidewell Supply.',
    ]);
  });

  it('makes an order short when a pack is missing, and complete when it turns up', async () => {
    const world = await makeOrderedWorld();
    const own = world.people.own;
    const stateOf = async () =>
      (await splitAs(world, own)).orders.find(
        ({ supplierId }) => supplierId === world.suppliers.salts,
      )?.state;
    const { orders } = await splitAs(world, own);
    const order = orders.find(({ supplierId }) => supplierId === world.suppliers.salts)!;
    await transact((tx) =>
      execute(
        `update supplier_orders set packs = jsonb_set(packs, '{0,packs}', '2') where buy_id = :buyId and supplier_id = :id`,
        { buyId: world.buy.id, id: order.supplierId },
        tx,
      ),
    );
    const reply = await call(world, own, 'post', `/orders/${order.supplierId}/arrival`, {
      version: order.version,
      packs: [{ offerId: world.offers.sack, packs: 1 }],
      note: 'One sack is with the carrier.',
    });
    expect(reply.status).toBe(200);
    expect(await stateOf()).toBe('short');
    const bag = (await splitAs(world, own)).bags.find(({ missing }) => missing)!;
    const body = { grossMg: null, tareMg: null, lot: '', missing: false, damage: '', note: '' };
    await call(world, own, 'put', `/bags/${bag.id}`, { ...body, version: bag.version });
    expect(await stateOf()).toBe('arrived');
  });

  it('tells everyone who pledged, with the split day', async () => {
    const world = await makeOrderedWorld();
    await arriveAll(world);
    const mails = await select<{ attachments: { fileName: string }[] }>(
      `select attachments from outbox where buy_id = :buyId and kind = 'arrived'`,
      { buyId: world.buy.id },
    );
    expect(mails).toHaveLength(3);
    expect(mails[0]?.attachments[0]?.fileName).toBe('split-day.ics');
  });

  it('makes no targets before every bag is weighed', async () => {
    const world = await makeOrderedWorld();
    await arriveAll(world);
    const own = world.people.own;
    const bag = (await splitAs(world, own)).bags[0]!;
    const body = { grossMg: null, tareMg: null, lot: '', missing: false, damage: '', note: '' };
    await call(world, own, 'put', `/bags/${bag.id}`, { ...body, version: bag.version });
    const preview = (await call(world, own, 'get', '/targets')).body as {
      basis: string;
      blocked: string;
    };
    expect(preview.blocked).toBe('1 bag is still to be weighed.');
    await world.buy.reload();
    const { termsVersion } = world.buy;
    const apply = await call(world, own, 'post', '/targets', {
      termsVersion,
      basis: preview.basis,
    });
    expect(apply.status).toBe(409);
  });
});

describe('the end of the split', () => {
  it('waits for portions, bags and bills, and for what was seen', async () => {
    const world = await makeSplitWorld();
    const own = world.people.own;
    const preview = (await call(world, own, 'get', '/final')).body as FinalPreview;
    expect(preview.blocked).toEqual([
      '5 portions are still to weigh.',
      '2 bags are still to close.',
    ]);
    const { termsVersion } = world.buy;
    const finish = { termsVersion, basis: preview.basis };
    const early = await call(world, own, 'post', '/finish-splitting', finish);
    expect([early.status, (early.body as Problem).code]).toEqual([409, 'wrong_state']);
    const old = { ...finish, termsVersion: termsVersion - 1 };
    const stale = await call(world, own, 'post', '/finish-splitting', old);
    expect([stale.status, (stale.body as Problem).code]).toEqual([409, 'stale']);
  });

  it('weighs nothing before the split begins', async () => {
    const world = await makeOrderedWorld();
    await arriveAll(world);
    const split = await splitAs(world, world.people.own);
    expect(split.portions).toEqual([]);
    const reply = await call(world, world.people.own, 'post', '/start-splitting', {
      termsVersion: world.buy.termsVersion,
    });
    expect((reply.body as Problem).detail).toBe('Work the targets out first.');
  });

  it('takes the treasurer’s choice to bear what was lost above 2 %', async () => {
    const world = await makeSplitWorld();
    const own = world.people.own;
    const split = await splitAs(world, own);
    for (const portion of split.portions) {
      await call(world, own, 'post', '/weighings', weighingOf(split, portion));
    }
    for (const bag of (await splitAs(world, own)).bags) {
      const lost = bag.lineId === world.second.id ? 600_000 : 0;
      await call(world, own, 'post', `/bags/${bag.id}/close`, {
        version: bag.version,
        shelfMg: (bag.netMg ?? 0) - bag.portionsMg - lost,
        tareMg: null,
        unaccountedNote: lost ? 'A cup fell.' : '',
      });
    }
    await call(world, own, 'put', `/lines/${world.second.id}/unaccounted-note`, {
      note: 'A cup fell.',
    });
    const before = (await call(world, own, 'get', '/final')).body as FinalPreview;
    // 600 g of 5 kg lost: 500 g above 2 %, a tenth of 11.50.
    expect(before.excess).toEqual([
      { lineId: world.second.id, name: 'Epsom salt', mg: 500_000, minor: 115, taken: false },
    ]);
    const treasurer = world.people.treasurer;
    const taken = await call(world, treasurer, 'put', '/excess-loss', { clubTakesExcess: true });
    expect(taken.status).toBe(200);
    const after = (await call(world, treasurer, 'get', '/final')).body as FinalPreview;
    expect(after.excess[0]?.taken).toBe(true);
    expect(after.costMinor).toBe(before.costMinor);
    const sum = (preview: FinalPreview) =>
      preview.members.reduce((total, { finalMinor }) => total + finalMinor, 0);
    expect(sum(before) - sum(after)).toBe(115);
  });
});

describe('what others see', () => {
  it('hides others’ portions of a reportable salt where the club shows only totals', async () => {
    const world = await makeSplitWorld();
    await world.club.update({ hideReportableGrams: true });
    const [ana] = world.payers;
    const mine = await splitAs(world, ana);
    const nitrate = mine.portions.filter(({ lineId }) => lineId === world.line.id);
    expect(nitrate.map(({ member }) => member.name)).toEqual(['Ana Payer']);
    expect(mine.lines.find(({ id }) => id === world.line.id)).toMatchObject({
      hidden: true,
      progress: { portions: 3, done: 0 },
    });
    expect(mine.portions.filter(({ lineId }) => lineId === world.second.id)).toHaveLength(2);
    const helper = await splitAs(world, world.people.helper);
    expect(helper.portions).toHaveLength(5);
  });

  it('moves the portions with a line that is handed on', async () => {
    const world = await makeSplitWorld();
    const [ana, ben] = world.payers;
    await transact((tx) =>
      handOnPortions(tx, {
        buyId: world.buy.id,
        lineId: world.second.id,
        fromId: ana.membership.id,
        toId: ben.membership.id,
      }),
    );
    const share = (await call(world, ben, 'get', '/share')).body as MyShare;
    const magnesium = share.lines.find(({ lineId }) => lineId === world.second.id);
    expect(magnesium?.portions).toHaveLength(1);
    expect(magnesium?.targetMg).toBe(2_200_000);
  });

  it('shows the estimate as it was locked until there are targets', async () => {
    const world = await makeOrderedWorld();
    await billAll(world, 100);
    await arriveAll(world);
    const share = (await call(world, world.payers[0], 'get', '/share')).body as MyShare;
    expect(share.stage).toBe('estimate');
    expect(share.estimateMinor).toBe(world.dueOf(world.payers[0]));
    expect(share.finalMinor).toBeNull();
  });
});
