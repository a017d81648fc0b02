import { beforeAll, describe, expect, it } from 'vitest';
import { shareOut } from '#shared/domain/shares/shareOut.ts';
import type { BuyHeader } from '#shared/schemas/buys.ts';
import type { FinalPreview, MyShare, SplitSheet, TargetsPreview } from '#shared/schemas/splits.ts';
import { select } from '#server/config/database.ts';
import { finalOf } from '#server/services/splits/finalOf.ts';
import type { Agent } from '#tests/support/client.ts';
import { accountSum, booksOf, type LockedWorld } from '#tests/support/locked.ts';
import { billAll, makeOrderedWorld, shelfOf, weighingOf } from '#tests/support/splitWorld.ts';

describe('from the packs to the final share', () => {
  let world: LockedWorld;
  let own: Agent;
  let base: string;

  beforeAll(async () => {
    world = await makeOrderedWorld();
    own = await world.people.own.agent();
    base = `/api/v1/clubs/${world.club.slug}/buys/${world.buy.id}`;
  });

  const get = async <T>(path: string, agent = own) =>
    (await agent.get(base + path).expect(200)).body as T;
  const post = async <T>(path: string, body: object = {}, agent = own) =>
    (
      await agent
        .post(base + path)
        .send(body)
        .expect(200)
    ).body as T;
  const head = () => get<BuyHeader>('');

  it('makes a bag for each pack received, and one marked missing for each that is not', async () => {
    const { orders } = await get<SplitSheet>('/split');
    expect(orders).toHaveLength(2);
    const other = orders.find(({ supplierId }) => supplierId === world.suppliers.other);
    await post(`/orders/${world.suppliers.other}/arrival`, {
      version: other?.version,
      packs: [{ offerId: world.offers.magnesium, packs: 2 }],
      note: 'One more than ordered.',
    });
    const salts = orders.find(({ supplierId }) => supplierId === world.suppliers.salts);
    await post(`/orders/${world.suppliers.salts}/arrival`, {
      version: salts?.version,
      packs: [{ offerId: world.offers.sack, packs: 1 }],
      note: '',
    });
    const { bags } = await get<SplitSheet>('/split');
    const magnesium = bags.filter(({ lineId }) => lineId === world.second.id);
    expect(magnesium.map(({ number, extra, missing }) => [number, extra, missing])).toEqual([
      [1, false, false],
      [2, true, false],
    ]);
    await own
      .post(`${base}/orders/${world.suppliers.other}/arrival`)
      .send({
        version: 9,
        packs: [{ offerId: world.offers.magnesium, packs: 1 }],
        note: '',
      })
      .expect(409);
  });

  it('weighs bags with an assumed and with a weighed empty bag', async () => {
    const { bags } = await get<SplitSheet>('/split');
    for (const bag of bags) {
      const isSack = bag.lineId === world.line.id;
      await own
        .put(`${base}/bags/${bag.id}`)
        .send({
          version: bag.version,
          grossMg: isSack ? 25_100_000 : 5_060_000,
          tareMg: isSack ? null : 60_000,
          lot: isSack ? 'KN-77' : `MG-${bag.number}`,
          missing: bag.extra,
          damage: '',
          note: '',
          ...(bag.extra ? { grossMg: null, tareMg: null } : {}),
        })
        .expect(200);
    }
    const again = (await get<SplitSheet>('/split')).bags;
    const sack = again.find(({ lineId }) => lineId === world.line.id);
    expect(sack).toMatchObject({ tareAssumed: true, netMg: 24_974_500, lot: 'KN-77' });
    const extra = again.find((bag) => bag.extra);
    expect(extra).toMatchObject({ missing: true, netMg: null });
  });

  it('shows the targets first, then makes them count', async () => {
    const before = await head();
    expect(before.state).toBe('ordered');
    await own.get(`${base}/targets`).expect(409);
    const arrived = await post<BuyHeader>('/arrive', { termsVersion: before.termsVersion });
    expect(arrived.state).toBe('arrived');

    const preview = await get<TargetsPreview>('/targets');
    expect(preview).toMatchObject({ blocked: null, standing: false });
    const nitrate = preview.lines.find(({ lineId }) => lineId === world.line.id);
    // 25 kg less what the empty sack is assumed to weigh: 1 974.5 g over, 115 g of it the reserve.
    expect(nitrate).toMatchObject({ countedMg: 24_974_500, wantedMg: 23_000_000 });
    expect(nitrate?.targetMg).toBe(24_859_000);
    expect(nitrate?.shelfMg).toBe(115_500);

    await own
      .post(`${base}/targets`)
      .send({ termsVersion: arrived.termsVersion, basis: 'x' })
      .expect(409);
    await own
      .post(`${base}/start-splitting`)
      .send({ termsVersion: arrived.termsVersion })
      .expect(409);
    const { targetVersion } = await post<BuyHeader>('/targets', {
      termsVersion: arrived.termsVersion,
      basis: preview.basis,
    });
    expect(targetVersion).toBe(1);
    const { portions } = await get<SplitSheet>('/split');
    expect(portions.map(({ code }) => code)).toEqual(['0016', '0024', '0032', '0049', '0057']);
    expect(portions.every(({ state, targetVersion: of }) => state === 'waiting' && of === 1)).toBe(
      true,
    );
  });

  it('works the targets out again while nothing is weighed, keeping the codes', async () => {
    const { bags, portions: before } = await get<SplitSheet>('/split');
    const sack = bags.find(({ lineId }) => lineId === world.line.id);
    await own
      .put(`${base}/bags/${sack?.id}`)
      .send({
        version: sack?.version,
        grossMg: 20_100_000,
        tareMg: 100_000,
        lot: 'KN-77',
        missing: false,
        damage: 'Torn',
        note: '',
      })
      .expect(200);
    const { termsVersion } = await head();
    await own.post(`${base}/start-splitting`).send({ termsVersion }).expect(409);
    const preview = await get<TargetsPreview>('/targets');
    const line = preview.lines.find(({ lineId }) => lineId === world.line.id);
    expect(line?.text).toContain('Everyone gets 86.9 % of what they asked for.');
    await post('/targets', { termsVersion, basis: preview.basis });
    const { portions } = await get<SplitSheet>('/split');
    expect(portions.map(({ code }) => code)).toEqual(before.map(({ code }) => code));
    const nitrate = portions.filter(({ lineId }) => lineId === world.line.id);
    expect(nitrate.reduce((sum, { targetMg }) => sum + targetMg, 0)).toBe(20_000_000);
    expect(nitrate.map(({ targetVersion }) => targetVersion)).toEqual([2, 2, 2]);
    const magnesium = portions.filter(({ lineId }) => lineId === world.second.id);
    expect(magnesium.map(({ targetVersion }) => targetVersion)).toEqual([1, 1]);
  });

  it('weighs every portion, closes every bag and posts the final share once', async () => {
    const { termsVersion } = await head();
    await post('/start-splitting', { termsVersion });
    const helper = await world.people.helper.agent();
    const split = await get<SplitSheet>('/split');
    for (const [index, portion] of split.portions.entries()) {
      const readingMg = index === 0 ? portion.targetMg - 400_000 : portion.targetMg + 200;
      await post('/weighings', weighingOf(split, portion, { readingMg, secondLook: true }), helper);
    }
    const weighed = (await get<SplitSheet>('/split')).portions;
    expect(weighed[0]).toMatchObject({ state: 'done', chargedMg: weighed[0]?.weighedMg });
    expect(weighed[1]?.chargedMg).toBe(weighed[1]?.targetMg);

    let preview = await get<FinalPreview>('/final');
    expect(preview.blocked).toEqual([
      '2 bags are still to close.',
      expect.stringContaining('The bill of Grainmoor Salts and Tidewell Supply is missing.'),
    ]);
    for (const bag of (await get<SplitSheet>('/split')).bags.filter(({ missing }) => !missing)) {
      const left = (bag.netMg ?? 0) - bag.portionsMg;
      const body = { version: bag.version, shelfMg: left - 5_000, tareMg: null };
      await post(`/bags/${bag.id}/close`, { ...body, unaccountedNote: '' }, helper);
    }
    await billAll(world, 300);
    preview = await get<FinalPreview>('/final');
    expect(preview.blocked).toEqual([]);
    const cost = 9500 + 1200 + 1150 + 690 + 300;
    expect(preview.costMinor).toBe(cost);

    const { termsVersion: seen } = await head();
    await own.post(`${base}/finish-splitting`).send({ termsVersion: seen, basis: 'x' }).expect(409);
    const done = await post<BuyHeader>('/finish-splitting', {
      termsVersion: seen,
      basis: preview.basis,
    });
    expect(done.state).toBe('pickup');
    await own
      .post(`${base}/finish-splitting`)
      .send({ termsVersion: done.termsVersion, basis: preview.basis })
      .expect(409);

    expect(await accountSum(world.club.id, 'buy', world.buy.id)).toBe(0);
    expect(await booksOf(world.club.id)).toMatchObject({ sum: 0, unbalanced: 0 });
    const final = await finalOf(world.buy.id);
    expect(final?.sheet).toEqual(shareOut(final!.request));
    expect(final?.sheet.totalMinor).toBe(cost);
    const [posted] = await select<{ count: number }>(
      `select count(*)::int as count from ledger_transactions where event_type = 'final_share' and event_id = :id`,
      { id: world.buy.id },
    );
    expect(posted?.count).toBe(1);
    for (const { memberId, totalMinor } of final?.sheet.members ?? []) {
      expect(await accountSum(world.club.id, 'member', memberId)).toBe(totalMinor);
    }
  });

  it('keeps what is left on the shelf by bag and lot, at nil cost, and tells each member', async () => {
    const shelf = await shelfOf(world.buy.id);
    expect(shelf).toEqual([
      { salt_id: 'KNO3', lot: 'KN-77', mg: 394_600, cost_minor: 0 },
      { salt_id: 'MgSO4.7H2O', lot: 'MG-1', mg: 1_694_600, cost_minor: 0 },
    ]);
    const notices = await select<{ subject: string }>(
      `select subject from notices where buy_id = :buyId and kind = 'final_share'`,
      { buyId: world.buy.id },
    );
    expect(notices).toHaveLength(3);
    const mine = await get<MyShare>('/share', await world.payers[0].agent());
    expect(mine.stage).toBe('final');
    const costs = mine.lines.map(({ cost }) => cost?.minor ?? 0);
    const charges = mine.charges.map(({ minor }) => minor);
    expect([...costs, ...charges].reduce((a, b) => a + b, 0)).toBe(mine.finalMinor);
    expect(mine.lines[0]?.cost?.why[0]).toMatch(/g of .* of .*: /);
  });
});
