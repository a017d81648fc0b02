import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Problem } from '#shared/schemas/problem.ts';
import type { BuyHeader } from '#shared/schemas/buys.ts';
import type { Portion, SplitChange, SplitSheet, TargetsPreview } from '#shared/schemas/splits.ts';
import { select } from '#server/config/database.ts';
import type { Agent } from '#tests/support/client.ts';
import type { LockedWorld } from '#tests/support/locked.ts';
import { makeSplitWorld, weighingOf } from '#tests/support/splitWorld.ts';

let world: LockedWorld;
let own: Agent;
let helper: Agent;
let other: Agent;
let base: string;

beforeAll(async () => {
  world = await makeSplitWorld();
  own = await world.people.own.agent();
  helper = await world.people.helper.agent();
  other = await world.people.cashHelper.agent();
  base = `/api/v1/clubs/${world.club.slug}/buys/${world.buy.id}`;
});

const split = async () => (await own.get(`${base}/split`).expect(200)).body as SplitSheet;
const portionAt = async (index: number) => {
  const sheet = await split();
  const portion = sheet.portions[index];
  if (!portion) throw new Error('no portion');
  return { sheet, portion };
};
const post = (agent: Agent, path: string, body: object = {}) => agent.post(base + path).send(body);
const again = async (id: string) => (await split()).portions.find((each) => each.id === id)!;
const undo = async (portion: Portion) => {
  const { weighing } = await again(portion.id);
  if (weighing) await post(own, `/weighings/${weighing.id}/undo`).expect(200);
};

describe('claiming', () => {
  it('gives a portion to one of two who claim it at once, and tells the other who has it', async () => {
    const { portion } = await portionAt(0);
    const replies = await Promise.all([
      post(helper, `/portions/${portion.id}/claim`, { station: 'Table 1' }),
      post(other, `/portions/${portion.id}/claim`, { station: 'Table 2' }),
    ]);
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
    const lost = replies.find(({ status }) => status === 409)?.body as Problem;
    const has = (await again(portion.id)).claimedBy;
    expect(lost).toMatchObject({
      code: 'stale',
      detail: `${has?.name} is weighing this portion.`,
      current: { id: portion.id, state: 'claimed' },
    });
  });

  it('is given back by who has it or an organiser, by nobody else', async () => {
    const { portion } = await portionAt(0);
    const holder = portion.claimedBy?.name === 'Helper Hal' ? helper : other;
    const stranger = holder === helper ? other : helper;
    await post(stranger, `/portions/${portion.id}/release`).expect(403);
    await post(stranger, '/weighings', weighingOf(await split(), portion)).expect(409);
    await post(own, `/portions/${portion.id}/release`).expect(200);
    expect((await again(portion.id)).state).toBe('waiting');
    await post(holder, `/portions/${portion.id}/release`).expect(200);
  });
});

describe('weighing', () => {
  it('counts once, however often it is sent', async () => {
    const { sheet, portion } = await portionAt(0);
    const weighing = weighingOf(sheet, portion, { readingMg: portion.targetMg + 40_000 });
    const replies = await Promise.all([1, 2, 3].map(() => post(helper, '/weighings', weighing)));
    expect(replies.map(({ status }) => status)).toEqual([200, 200, 200]);
    const [kept] = await select<{ count: number; charged: number }>(
      'select count(*)::int as count, sum(charged_mg)::bigint as charged from weighings where portion_id = :id',
      { id: portion.id },
    );
    // Within the band the target is charged, whatever the needle said.
    expect(kept).toEqual({ count: 1, charged: portion.targetMg });
    const bag = (await split()).bags.find(({ id }) => id === weighing.bagId);
    expect(bag?.portionsMg).toBe(portion.targetMg + 40_000);
    const twice = await post(helper, '/weighings', { ...weighing, readingMg: portion.targetMg });
    expect([twice.status, (twice.body as Problem).code]).toEqual([409, 'already_there']);
  });

  it('shows both facts when a portion is weighed twice', async () => {
    const { sheet, portion } = await portionAt(0);
    const reply = await post(other, '/weighings', weighingOf(sheet, portion)).expect(409);
    expect(reply.body).toMatchObject({
      code: 'stale',
      current: { weighing: { readingMg: portion.targetMg + 40_000, by: { name: 'Helper Hal' } } },
    });
    expect((reply.body as Problem).detail).toContain('Helper Hal weighed it already on Table 1');
  });

  it('is taken back by who made it or an organiser; sending it late again keeps it undone', async () => {
    const { sheet, portion } = await portionAt(0);
    const id = portion.weighing?.id;
    await post(other, `/weighings/${id}/undo`).expect(403);
    await post(helper, `/weighings/${id}/undo`).expect(200);
    await post(helper, `/weighings/${id}/undo`).expect(200);
    const late = weighingOf(sheet, portion, { id, readingMg: portion.targetMg + 40_000 });
    await post(helper, '/weighings', late).expect(200);
    expect((await again(portion.id)).state).toBe('waiting');
    const bag = (await split()).bags.find(({ lineId }) => lineId === portion.lineId);
    expect(bag?.portionsMg).toBe(0);
  });

  it('keeps nothing above the band', async () => {
    const { sheet, portion } = await portionAt(1);
    const band = Math.floor((portion.targetMg * 5) / 1000);
    const reply = await post(
      helper,
      '/weighings',
      weighingOf(sheet, portion, { readingMg: portion.targetMg + band + 1, secondLook: true }),
    ).expect(422);
    expect((reply.body as Problem).errors?.readingMg).toContain('too much: scoop some back.');
  });

  it('keeps what is below the band after a second look, and charges that', async () => {
    const { sheet, portion } = await portionAt(1);
    const readingMg = portion.targetMg - Math.floor((portion.targetMg * 5) / 1000) - 1;
    const first = await post(helper, '/weighings', weighingOf(sheet, portion, { readingMg }));
    expect((first.body as Problem).errors?.secondLook).toBeDefined();
    const kept = weighingOf(sheet, portion, { readingMg, secondLook: true });
    await post(helper, '/weighings', kept).expect(200);
    expect(await again(portion.id)).toMatchObject({ chargedMg: readingMg, weighedMg: readingMg });
    await undo(portion);
  });

  it('refuses a target that changed meanwhile, with both facts', async () => {
    const { sheet, portion } = await portionAt(1);
    const old = weighingOf(sheet, portion, { targetVersion: portion.targetVersion - 1 });
    await post(helper, '/weighings', old).expect(409);
    const reply = await post(
      helper,
      '/weighings',
      weighingOf(sheet, portion, { targetMg: portion.targetMg - 1000 }),
    ).expect(409);
    expect(reply.body).toMatchObject({
      code: 'stale',
      current: { targetMg: portion.targetMg, targetVersion: portion.targetVersion },
    });
  });

  it.each([
    ['a division coarser than the step', { divisionMg: 5000 }, 'divisionMg'],
    ['a capacity that is too small', { capacityMg: 2_000_000 }, 'capacityMg'],
    ['another salt’s bag', { bagId: 'other' }, 'bagId'],
    ['no reading', { readingMg: 0 }, 'readingMg'],
  ])('refuses %s', async (_what, changes, field) => {
    const { sheet, portion } = await portionAt(1);
    const wrong = sheet.bags.find(({ lineId }) => lineId !== portion.lineId)?.id;
    const body = 'bagId' in changes ? { bagId: wrong } : changes;
    const reply = await post(helper, '/weighings', weighingOf(sheet, portion, body)).expect(422);
    expect(Object.keys((reply.body as Problem).errors ?? {})).toContain(field);
  });
});

describe('cutting', () => {
  it('cuts a share for a small scale, weighs its parts and adds them up', async () => {
    const { portion } = await portionAt(2);
    const cut = await post(helper, `/portions/${portion.id}/cut`, {
      version: portion.version,
      capacityMg: 1_000_000,
    }).expect(200);
    const parts = (cut.body as SplitChange).portions;
    expect(parts.length).toBe(Math.ceil(portion.targetMg / 1_000_000));
    expect(parts.reduce((sum, { targetMg }) => sum + targetMg, 0)).toBe(portion.targetMg);
    expect(parts.map(({ part, parts: of }) => `${part}/${of}`)).toEqual(
      parts.map((_part, index) => `${index + 1}/${parts.length}`),
    );
    expect(new Set(parts.map(({ code }) => code)).size).toBe(parts.length);
    await post(helper, `/portions/${portion.id}/cut`, {
      version: portion.version,
      capacityMg: 500_000,
    }).expect(409);
    await post(helper, `/portions/${portion.id}/cut`, {
      version: parts[0]?.version,
      capacityMg: 500,
    }).expect(422);
  });

  it('joins what is not weighed yet', async () => {
    const { sheet, portion } = await portionAt(2);
    const weighed = sheet.portions.filter(
      ({ lineId, member }) =>
        lineId === portion.lineId && member.membershipId === portion.member.membershipId,
    )[1]!;
    await post(helper, '/weighings', weighingOf(sheet, weighed)).expect(200);
    const { version } = await again(portion.id);
    await post(helper, `/portions/${portion.id}/join`, { version }).expect(200);
    const living = (await split()).portions.filter(
      ({ lineId, member, state }) =>
        lineId === portion.lineId &&
        member.membershipId === portion.member.membershipId &&
        state !== 'void',
    );
    expect(living.map(({ state, part, parts }) => [state, part, parts])).toEqual([
      ['waiting', 1, 2],
      ['done', 2, 2],
    ]);
  });
});

describe('taking out and working targets out anew', () => {
  it('takes a portion out with a reason and puts it back', async () => {
    const { portion } = await portionAt(0);
    await post(own, `/portions/${portion.id}/void`, {
      version: portion.version,
      reason: '',
    }).expect(422);
    await post(own, `/portions/${portion.id}/void`, {
      version: portion.version,
      reason: 'Ana can’t come.',
    }).expect(200);
    const gone = await again(portion.id);
    expect(gone).toMatchObject({ state: 'void', voidReason: 'Ana can’t come.' });
    await post(helper, '/weighings', weighingOf(await split(), portion)).expect(409);
    await post(own, `/portions/${portion.id}/restore`, { version: gone.version }).expect(200);
    expect((await again(portion.id)).state).toBe('waiting');
  });

  it('shares only what is left, among those of whom nothing is weighed', async () => {
    const { sheet, portion } = await portionAt(0);
    const bag = sheet.bags.find(({ lineId }) => lineId === portion.lineId)!;
    await post(helper, `/bags/${bag.id}/spills`, {
      id: randomUUID(),
      mg: 5_000_000,
      note: 'The sack tore.',
    }).expect(200);
    const preview = (await own.get(`${base}/targets`).expect(200)).body as TargetsPreview;
    const line = preview.lines.find(({ lineId }) => lineId === portion.lineId)!;
    const kept = line.members.filter((member) => member.kept);
    expect(kept.map(({ member }) => member.name)).toEqual(['Cleo Payer']);
    expect(kept[0]?.targetMg).toBe(kept[0]?.standingMg);
    const { termsVersion } = (await own.get(base).expect(200)).body as BuyHeader;
    await post(own, '/targets', { termsVersion, basis: preview.basis }).expect(200);
    const now = (await split()).portions.filter(
      ({ lineId, state }) => lineId === portion.lineId && state !== 'void',
    );
    const leaves = bag.nominalMg - 5_000_000;
    expect(now.reduce((sum, { targetMg }) => sum + targetMg, 0)).toBeLessThanOrEqual(leaves);
    // Whoever holds the old target in hand is told.
    const reply = await post(helper, '/weighings', weighingOf(sheet, portion)).expect(409);
    expect((reply.body as Problem).detail).toMatch(
      /^The target changed from .* to .* while you weighed\.$/,
    );
  });
});

describe('bags', () => {
  it('notes a spill once, takes it back, and never more than the bag held', async () => {
    const { sheet } = await portionAt(0);
    const bag = sheet.bags.find(({ lineId }) => lineId === world.second.id)!;
    const spill = { id: randomUUID(), mg: 30_000, note: '' };
    await post(helper, `/bags/${bag.id}/spills`, spill).expect(200);
    await post(helper, `/bags/${bag.id}/spills`, spill).expect(200);
    const spilled = (await split()).bags.find(({ id }) => id === bag.id);
    expect(spilled).toMatchObject({ spilledMg: 30_000, spills: [{ mg: 30_000 }] });
    await post(helper, `/bags/${bag.id}/spills`, { ...spill, mg: 40_000 }).expect(409);
    await post(helper, `/bags/${bag.id}/spills`, {
      id: randomUUID(),
      mg: 9_000_000,
      note: '',
    }).expect(422);
    await post(other, `/spills/${spill.id}/undo`).expect(403);
    await post(helper, `/spills/${spill.id}/undo`).expect(200);
  });

  it('closes only with a note when more than 1 % is unaccounted for, either way', async () => {
    const { sheet } = await portionAt(0);
    const bag = sheet.bags.find(({ lineId }) => lineId === world.second.id)!;
    const body = { version: bag.version, tareMg: null, unaccountedNote: '' };
    const less = (bag.netMg ?? 0) - 60_000;
    const more = (bag.netMg ?? 0) + 60_000;
    for (const shelfMg of [less, more]) {
      const reply = await post(helper, `/bags/${bag.id}/close`, { ...body, shelfMg }).expect(422);
      expect((reply.body as Problem).errors).toHaveProperty('unaccountedNote');
    }
    await post(helper, `/bags/${bag.id}/close`, {
      ...body,
      shelfMg: more,
      unaccountedNote: 'It drew water.',
    }).expect(200);
    await post(helper, `/bags/${bag.id}/close`, { ...body, shelfMg: less }).expect(409);
    const closed = (await split()).bags.find(({ id }) => id === bag.id)!;
    const portion = (await split()).portions.find(({ lineId }) => lineId === world.second.id)!;
    const weighing = weighingOf(await split(), portion);
    await post(helper, '/weighings', weighing).expect(409);
    await post(helper, `/bags/${bag.id}/reopen`, { version: closed.version }).expect(200);
    await post(helper, '/weighings', weighing).expect(200);
  });

  it('refuses a bag that another changed', async () => {
    const bag = (await split()).bags[0]!;
    const body = {
      version: bag.version,
      grossMg: bag.grossMg,
      tareMg: 70_000,
      lot: 'L-9',
      missing: false,
      damage: '',
      note: '',
    };
    await own.put(`${base}/bags/${bag.id}`).send(body).expect(200);
    const reply = await own
      .put(`${base}/bags/${bag.id}`)
      .send({ ...body, tareMg: 1 })
      .expect(409);
    expect(reply.body).toMatchObject({ code: 'stale', current: { tareMg: 70_000, lot: 'L-9' } });
    const heavy = { ...body, version: bag.version + 1, tareMg: (bag.grossMg ?? 0) + 1 };
    await own.put(`${base}/bags/${bag.id}`).send(heavy).expect(422);
  });
});
