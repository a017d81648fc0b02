import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { Club } from '#server/models/Club.ts';
import { Membership } from '#server/models/Membership.ts';
import { BuyChanged, BuyLookers, BuyPlan } from '#shared/schemas/live.ts';
import type { SheetChanges } from '#shared/schemas/sheet.ts';
import { listen, type LiveClient } from '#tests/support/live.ts';
import { startProcess } from '#tests/support/otherProcess.ts';
import { givePledge, makeSheetWorld, type SheetWorld } from '#tests/support/sheetWorld.ts';
import type { Person } from '#tests/support/world.ts';

let live: Awaited<ReturnType<typeof listen>>;
beforeAll(async () => {
  live = await listen();
});
afterAll(() => live.close());

const room = (world: SheetWorld) => ({ club: world.club.slug, buy: world.buy.id });
const path = (world: SheetWorld, person: Person, line = world.plain) =>
  `/clubs/${world.club.slug}/buys/${world.buy.id}/lines/${line.id}/pledges/${person.membership.id}`;

async function enter(world: SheetWorld, person: Person) {
  const browser = await live.signIn(person.email);
  const client = await live.open(browser.cookie);
  const answer = await client.emitWithAck('buy:join', room(world));
  return { ...browser, client, answer };
}

/** Collects what a client hears of one event. */
function hear<T>(client: LiveClient, event: 'buy:changed' | 'buy:plan' | 'buy:lookers'): T[] {
  const heard: T[] = [];
  client.on(event, (message: unknown) => void heard.push(message as T));
  return heard;
}

describe('one room a buy', () => {
  it('carries one small message per change, and the plan after it', async () => {
    const world = await makeSheetWorld();
    const { member, treasurer } = world.people;
    const mine = await enter(world, member);
    const theirs = await enter(world, treasurer);
    expect(theirs.answer).toMatchObject({ ok: true, sheetVersion: world.buy.sheetVersion });
    const changes = hear<BuyChanged>(theirs.client, 'buy:changed');
    const plans = hear<BuyPlan>(theirs.client, 'buy:plan');
    const reply = await mine.call('PUT', path(world, member), {
      wantedMg: 400_000,
      upToMg: null,
      version: 0,
    });
    expect(reply.status).toBe(200);
    await expect.poll(() => plans.length, { timeout: 5000 }).toBe(1);
    expect(changes).toHaveLength(1);
    const change = BuyChanged.parse(changes[0]);
    expect(change).toMatchObject({
      kind: 'pledge',
      sheetVersion: world.buy.sheetVersion + 1,
      pledge: { name: 'Member Mo', wantedMg: 400_000, version: 1 },
    });
    expect(JSON.stringify(change).length).toBeLessThan(400);
    expect(BuyPlan.parse(plans[0])).toMatchObject({
      forVersion: world.buy.sheetVersion + 1,
      plan: { packs: { [world.offers.plain]: 1 } },
    });
  });

  it('says who is looking, once a person, and when they leave', async () => {
    const world = await makeSheetWorld();
    const { member, treasurer } = world.people;
    const first = await enter(world, treasurer);
    const lookers = hear<BuyLookers>(first.client, 'buy:lookers');
    const names = () =>
      lookers
        .at(-1)
        ?.lookers.map(({ name }) => name)
        .sort();
    const second = await enter(world, member);
    await enter(world, member);
    await expect.poll(names).toEqual(['Member Mo', 'Treasurer Tam']);
    second.client.disconnect();
    await expect.poll(names).toEqual(['Member Mo', 'Treasurer Tam']);
    BuyLookers.parse(lookers.at(-1));
  });

  it('shows the lock to everyone within the second', async () => {
    const world = await makeSheetWorld();
    const { member, own } = world.people;
    await givePledge(world, member, world.plain, 400);
    const theirs = await enter(world, member);
    const changes = hear<BuyChanged>(theirs.client, 'buy:changed');
    const organiser = await enter(world, own);
    const path = `/clubs/${world.club.slug}/buys/${world.buy.id}/lock`;
    const { status } = await organiser.call('POST', path, { termsVersion: world.buy.termsVersion });
    expect(status).toBe(200);
    await expect.poll(() => changes.length, { timeout: 1000 }).toBe(1);
    expect(BuyChanged.parse(changes[0])).toMatchObject({ kind: 'state', state: 'locked' });
  });

  it('tells what was missed to who comes back', async () => {
    const world = await makeSheetWorld();
    const { member, treasurer } = world.people;
    const away = await enter(world, treasurer);
    const since = world.buy.sheetVersion;
    away.client.disconnect();
    const active = await enter(world, member);
    for (const version of [0, 1, 2]) {
      const body = { wantedMg: (version + 1) * 1000, upToMg: null, version };
      await active.call('PUT', path(world, member), body);
    }
    const back = await enter(world, treasurer);
    expect(back.answer).toMatchObject({ ok: true, sheetVersion: since + 3 });
    const url = `/clubs/${world.club.slug}/buys/${world.buy.id}/changes`;
    const reply = await back.call('GET', `${url}?since=${since}&terms=${world.buy.termsVersion}`);
    const changes = (await reply.json()) as SheetChanges;
    expect(changes.whole === false && changes.pledges.map(({ wantedMg }) => wantedMg)).toEqual([
      3000,
    ]);
  });

  it('names nobody where the club shows only totals', async () => {
    const world = await makeSheetWorld();
    const { own, treasurer } = world.people;
    await Club.update({ hideReportableGrams: true }, { where: { id: world.club.id } });
    await givePledge(world, own, world.line, 700);
    const theirs = await enter(world, treasurer);
    const changes = hear<BuyChanged>(theirs.client, 'buy:changed');
    const organiser = await live.signIn(own.email);
    const { buy, club } = world;
    await organiser.call('POST', `/clubs/${club.slug}/buys/${buy.id}/hazards`, { saltId: 'KNO3' });
    const body = { wantedMg: 900_000, upToMg: 1_000_000, version: 1 };
    expect((await organiser.call('PUT', path(world, own, world.line), body)).status).toBe(200);
    await expect.poll(() => changes.length).toBe(1);
    expect(changes[0]).toEqual({
      kind: 'pledge',
      buyId: buy.id,
      sheetVersion: buy.sheetVersion + 1,
      pledge: null,
      total: { lineId: world.line.id, wantedMg: 900_000, roomMg: 100_000, members: 1 },
    });
  });
});

describe('whom the room refuses', () => {
  it('lets nobody connect who is not signed in, or from elsewhere', async () => {
    await expect(live.open('')).rejects.toThrow(/signed_out/);
    await expect(live.open('tarewell.sid=made-up')).rejects.toThrow(/signed_out/);
  });

  it('is not there for strangers, for those who wait or left, for drafts, and for made-up buys', async () => {
    const world = await makeSheetWorld();
    const draft = await makeSheetWorld('draft');
    const { stranger, member, treasurer } = world.people;
    const refused = { ok: false, code: 'not_found' };
    expect((await enter(world, stranger)).answer).toEqual(refused);
    expect((await enter(draft, draft.people.member)).answer).toEqual(refused);
    expect((await enter(draft, draft.people.own)).answer).toMatchObject({ ok: true });
    await Membership.update({ status: 'pending' }, { where: { id: member.membership.id } });
    expect((await enter(world, member)).answer).toEqual(refused);
    await Membership.update({ status: 'left' }, { where: { id: treasurer.membership.id } });
    expect((await enter(world, treasurer)).answer).toEqual(refused);
    const own = await enter(world, world.people.own);
    const ask = (body: unknown) => own.client.emitWithAck('buy:join', body as never);
    expect(await ask({ club: world.club.slug, buy: crypto.randomUUID() })).toEqual(refused);
    expect(await ask({ club: world.club.slug, buy: draft.buy.id })).toEqual(refused);
    expect(await ask({ club: 7 })).toEqual({ ok: false, code: 'invalid' });
  });

  it('sends nothing to a socket that was refused', async () => {
    const world = await makeSheetWorld();
    const { stranger, member } = world.people;
    const outside = await enter(world, stranger);
    const heard = hear<BuyChanged>(outside.client, 'buy:changed');
    const inside = await enter(world, member);
    const seen = hear<BuyChanged>(inside.client, 'buy:changed');
    const body = { wantedMg: 400_000, upToMg: null, version: 0 };
    await inside.call('PUT', path(world, member), body);
    await expect.poll(() => seen.length).toBe(1);
    await new Promise((resolve) => setTimeout(resolve, 150));
    expect(heard).toEqual([]);
  });
});

describe('several processes', () => {
  it('hear of each other, each message once', async () => {
    const world = await makeSheetWorld();
    const { member, treasurer } = world.people;
    const other = await startProcess();
    try {
      const here = await enter(world, treasurer);
      const heard = hear<BuyChanged>(here.client, 'buy:changed');
      const browser = await live.signIn(member.email);
      const reply = await fetch(`${other.origin}/api/v1${path(world, member)}`, {
        method: 'PUT',
        headers: {
          'Content-Type': 'application/json',
          'Sec-Fetch-Site': 'same-origin',
          Cookie: browser.cookie,
        },
        body: JSON.stringify({ wantedMg: 400_000, upToMg: null, version: 0 }),
      });
      expect(reply.status).toBe(200);
      await expect.poll(() => heard.length, { timeout: 5000 }).toBe(1);
      await new Promise((resolve) => setTimeout(resolve, 200));
      expect(heard).toMatchObject([{ kind: 'pledge', pledge: { wantedMg: 400_000 } }]);
    } finally {
      await other.stop();
    }
  });
});
