import { beforeEach, describe, expect, it } from 'vitest';
import { HandOns } from '#shared/schemas/handOns.ts';
import type { ShareSheet } from '#shared/domain/shares/shareTypes.ts';
import { execute, select, transact } from '#server/config/database.ts';
import { loadPledges } from '#server/services/buys/loadSheetTerms.ts';
import {
  accountSum,
  booksOf,
  makeLockedWorld,
  passDueDay,
  type LockedWorld,
} from '#tests/support/locked.ts';
import type { Agent } from '#tests/support/client.ts';
import type { Person } from '#tests/support/world.ts';

let world: LockedWorld;
let ana: Person;
let ben: Person;
let url: string;

beforeEach(async () => {
  world = await makeLockedWorld();
  [ana, ben] = world.payers;
  url = `/api/v1/clubs/${world.club.slug}/buys/${world.buy.id}/hand-ons`;
});

const offered = async (from: Person, to: Person, lineId: string) => {
  const agent = await from.agent();
  const reply = await agent.post(url).send({ lineId, toId: to.membership.id }).expect(201);
  const handOn = HandOns.parse(reply.body).handOns.find(({ state }) => state === 'offered');
  if (!handOn) throw new Error('not offered');
  return handOn;
};
const answer = (agent: Agent, id: string, accept = true, cautionsRead = true) =>
  agent.post(`${url}/${id}/answer`).send({ accept, cautionsRead });
const newest = async (kind: string) => {
  const [row] = await select<{ sheet: ShareSheet }>(
    'select sheet from snapshots where buy_id = :buyId and kind = :kind order by created_at desc limit 1',
    { buyId: world.buy.id, kind },
  );
  return row?.sheet;
};
const dueOf = async (person: Person) => {
  const [row] = await select<{ due: number | null; final: number | null }>(
    'select due_minor as due, final_minor as final from buy_members where buy_id = :buyId and membership_id = :id',
    { buyId: world.buy.id, id: person.membership.id },
  );
  return row;
};

describe('handing on a line', () => {
  it('moves pledge, grams and what is due to the one who accepts', async () => {
    const { mg, amountMinor, id } = await offered(ana, ben, world.second.id);
    expect(mg).toBe(
      world.sheet.members[0]?.lines.find(({ lineId }) => lineId === world.second.id)?.mg,
    );
    const before = world.sheet.totalMinor;
    await answer(await ben.agent(), id).expect(200);
    const pledges = await loadPledges(world.buy.id);
    const onLine = pledges.filter(({ lineId }) => lineId === world.second.id);
    expect(onLine.map(({ membershipId, wantedMg }) => [membershipId, wantedMg])).toContainEqual([
      ben.membership.id,
      2_000_000,
    ]);
    const sheet = await newest('estimate');
    const members = sheet?.members ?? [];
    const total = (person: Person) =>
      members.find(({ memberId }) => memberId === person.membership.id)?.totalMinor;
    expect(total(ana)).toBe(world.dueOf(ana) - (amountMinor ?? 0));
    expect(total(ben)).toBe(world.dueOf(ben) + (amountMinor ?? 0));
    const sum = members.reduce((all, { totalMinor }) => all + totalMinor, 0);
    expect(sum + (sheet?.shelf.totalMinor ?? 0)).toBe(before);
    expect((await dueOf(ana))?.due).toBe(total(ana));
    expect((await dueOf(ben))?.due).toBe(total(ben));
  });

  it('makes one pledge of two where the taker has one already', async () => {
    const { id } = await offered(ana, ben, world.line.id);
    await answer(await ben.agent(), id).expect(200);
    const pledges = (await loadPledges(world.buy.id)).filter(
      ({ lineId }) => lineId === world.line.id,
    );
    expect(pledges.map(({ membershipId, wantedMg }) => [membershipId, wantedMg])).toEqual([
      [ben.membership.id, 21_000_000],
      [world.payers[2].membership.id, 2_000_000],
    ]);
  });

  it('takes in a member who had no part in the buy', async () => {
    const { member } = world.people;
    const { id, amountMinor } = await offered(ana, member, world.second.id);
    await answer(await member.agent(), id).expect(200);
    expect((await dueOf(member))?.due).toBe(amountMinor);
  });

  it('posts the money between the two once the final share is posted', async () => {
    await transact(async (tx) => {
      await execute(
        `insert into snapshots (buy_id, kind, terms_version, request, sheet)
         select buy_id, 'final', terms_version, request, sheet from snapshots where buy_id = :buyId and kind = 'estimate'`,
        { buyId: world.buy.id },
        tx,
      );
      await execute(
        `update buy_members set final_minor = locked_minor where buy_id = :buyId`,
        { buyId: world.buy.id },
        tx,
      );
    });
    await world.buy.update({ state: 'pickup' });
    const before = await dueOf(ana);
    const { id, amountMinor } = await offered(ana, ben, world.second.id);
    await answer(await ben.agent(), id).expect(200);
    expect(await accountSum(world.club.id, 'member', ana.membership.id)).toBe(-(amountMinor ?? 0));
    expect(await accountSum(world.club.id, 'member', ben.membership.id)).toBe(amountMinor);
    expect((await dueOf(ana))?.final).toBe((before?.final ?? 0) - (amountMinor ?? 0));
    expect(await booksOf(world.club.id)).toEqual({ sum: 0, unbalanced: 0 });
  });

  it('asks the taker to confirm the cautions of a classified salt, once', async () => {
    const { id, needsConfirmation } = await offered(ana, world.people.member, world.line.id);
    expect(needsConfirmation).toBe(true);
    const agent = await world.people.member.agent();
    const bare = await answer(agent, id, true, false);
    expect(bare).toMatchObject({ status: 409, body: { code: 'hazard_unconfirmed' } });
    await answer(agent, id).expect(200);
  });

  it('is refused to somebody who is overdue', async () => {
    await passDueDay(world.buy.id);
    const { id } = await offered(ana, ben, world.second.id);
    const reply = await answer(await ben.agent(), id);
    expect(reply).toMatchObject({ status: 409, body: { code: 'overdue_elsewhere' } });
  });

  it('moves once when accepted twice at the same time', async () => {
    const { id } = await offered(ana, ben, world.second.id);
    const agent = await ben.agent();
    const replies = await Promise.all([answer(agent, id), answer(agent, id)]);
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
    const rows = await select<{ n: number }>(
      "select count(*)::int as n from audit_entries where buy_id = :buyId and action = 'buys.handOn'",
      { buyId: world.buy.id },
    );
    expect(rows[0]?.n).toBe(1);
  });

  it('is nobody else’s to answer or to take back', async () => {
    const { id } = await offered(ana, ben, world.second.id);
    const cleo = await world.payers[2].agent();
    await answer(cleo, id).expect(404);
    await cleo.delete(`${url}/${id}`).send({}).expect(404);
    const seen = HandOns.parse((await cleo.get(url).expect(200)).body);
    expect(seen.handOns).toEqual([]);
  });

  it('refuses a line twice, to oneself, to a guest’s place, and one that isn’t there', async () => {
    const agent = await ana.agent();
    const post = (lineId: string, toId: string) => agent.post(url).send({ lineId, toId });
    await offered(ana, ben, world.second.id);
    expect(await post(world.second.id, world.payers[2].membership.id)).toMatchObject({
      status: 409,
      body: { code: 'already_there' },
    });
    expect((await post(world.line.id, ana.membership.id)).body.errors).toHaveProperty('toId');
    const other = await (await ben.agent()).post(url).send({
      lineId: world.second.id,
      toId: ana.membership.id,
    });
    expect(other.body.errors).toHaveProperty('lineId');
    await world.buy.update({ state: 'open' });
    expect((await post(world.line.id, ben.membership.id)).status).toBe(409);
  });

  it('can be declined, and offered to somebody else', async () => {
    const { id } = await offered(ana, ben, world.second.id);
    await answer(await ben.agent(), id, false).expect(200);
    const again = await offered(ana, world.payers[2], world.second.id);
    const agent = await ana.agent();
    const reply = await agent.delete(`${url}/${again.id}`).send({}).expect(200);
    expect(HandOns.parse(reply.body).handOns.map(({ state }) => state)).toEqual([
      'withdrawn',
      'declined',
    ]);
  });
});
