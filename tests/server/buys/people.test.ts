import { beforeEach, describe, expect, it } from 'vitest';
import { BuyHeader } from '#shared/schemas/buys.ts';
import { select } from '#server/config/database.ts';
import { Pledge } from '#server/models/Pledge.ts';
import type { Agent } from '#tests/support/client.ts';
import { makeGuest, makeWorld, type World } from '#tests/support/world.ts';

let world: World;
let own: Agent;
let url: string;

beforeEach(async () => {
  world = await makeWorld('open');
  own = await world.people.own.agent();
  url = `/api/v1/clubs/${world.club.slug}/buys/${world.buy.id}`;
});

const read = async (agent: Agent) => BuyHeader.parse((await agent.get(url).expect(200)).body);
const idOf = (part: keyof World['people']) => world.people[part].membership.id;
const audit = (action: string) =>
  select<{ subject_id: string }>(
    'select subject_id from audit_entries where buy_id = :buyId and action = :action',
    { buyId: world.buy.id, action },
  );

describe('co-organisers and helpers', () => {
  it('names an organiser, who may then organise, and takes them off again', async () => {
    const other = await world.people.organiser.agent();
    await other.patch(`${url}/terms`).send({ termsVersion: 1, place: 'x' }).expect(403);
    await own
      .put(`${url}/organisers/${idOf('organiser')}`)
      .send({})
      .expect(200);
    await other.patch(`${url}/terms`).send({ termsVersion: 1, place: 'Room 1' }).expect(200);
    await own
      .delete(`${url}/organisers/${idOf('organiser')}`)
      .send({})
      .expect(200);
    await other.patch(`${url}/terms`).send({ termsVersion: 2, place: 'x' }).expect(403);
    expect(await audit('buys.nameCoOrganiser')).toHaveLength(1);
    expect(await audit('buys.dropCoOrganiser')).toHaveLength(1);
  });

  it('refuses a member without the role, a guest, and somebody of another club', async () => {
    const member = await own.put(`${url}/organisers/${idOf('member')}`).send({});
    expect(member).toMatchObject({ status: 422 });
    const guest = await makeGuest(world.club, 'Guest Gil', world.people.own);
    const asHelper = await own.put(`${url}/helpers/${guest.id}`).send({ takesCash: false });
    expect(asHelper.body.errors).toHaveProperty('member');
    await own
      .put(`${url}/helpers/${idOf('stranger')}`)
      .send({ takesCash: false })
      .expect(404);
  });

  it('names a helper with cash, once, and changes it', async () => {
    const put = (takesCash: boolean) =>
      own
        .put(`${url}/helpers/${idOf('member')}`)
        .send({ takesCash })
        .expect(200);
    await put(true);
    await put(true);
    const head = BuyHeader.parse((await put(false)).body);
    const helper = head.helpers.find(({ membershipId }) => membershipId === idOf('member'));
    expect(helper?.takesCash).toBe(false);
    expect(await audit('buys.nameHelper')).toHaveLength(2);
    await own
      .delete(`${url}/helpers/${idOf('member')}`)
      .send({})
      .expect(200);
    await own
      .delete(`${url}/helpers/${idOf('member')}`)
      .send({})
      .expect(404);
  });
});

describe('responsibility', () => {
  const offer = () =>
    own
      .put(`${url}/responsibility/offer`)
      .send({ toId: idOf('organiser') })
      .expect(200);

  it('passes on acceptance; the former holder stays co-organiser and members are told', async () => {
    await Pledge.create({
      buyId: world.buy.id,
      lineId: world.line.id,
      membershipId: idOf('member'),
      wantedMg: 1000,
      at: new Date(),
    });
    await offer();
    const other = await world.people.organiser.agent();
    expect((await read(other)).may.answerResponsibility).toBe(true);
    expect((await read(other)).responsible.name).toBe('Own Organiser');
    await other.post(`${url}/responsibility/answer`).send({ accept: true }).expect(200);
    const head = await read(other);
    expect(head).toMatchObject({ responsible: { name: 'Organiser Ola' }, offeredTo: null });
    expect(head.coOrganisers.map(({ name }) => name)).toEqual(['Own Organiser']);
    const mails = await select<{ address: string }>(
      "select address from outbox where buy_id = :buyId and event_key like '%:responsible:%'",
      { buyId: world.buy.id },
    );
    expect(mails.map(({ address }) => address).sort()).toEqual(
      [world.people.member.email, world.people.own.email].sort(),
    );
    expect(await audit('buys.passResponsibility')).toHaveLength(1);
  });

  it('stays where it is when declined or taken back', async () => {
    await offer();
    const other = await world.people.organiser.agent();
    await other.post(`${url}/responsibility/answer`).send({ accept: false }).expect(200);
    await other.post(`${url}/responsibility/answer`).send({ accept: true }).expect(404);
    await offer();
    await own.delete(`${url}/responsibility/offer`).send({}).expect(200);
    await other.post(`${url}/responsibility/answer`).send({ accept: true }).expect(404);
    expect((await read(own)).responsible.name).toBe('Own Organiser');
  });

  it('shows a draft to the organiser who is asked to take it over', async () => {
    await world.buy.update({ state: 'draft', openedAt: null });
    const other = await world.people.organiser.agent();
    await other.get(url).expect(404);
    await offer();
    await other.get(url).expect(200);
    await other.post(`${url}/responsibility/answer`).send({ accept: true }).expect(200);
    expect((await read(other)).may.edit).toBe(true);
  });

  it('is passed on by a steward, with a reason', async () => {
    const steward = await world.people.steward.agent();
    const bare = await steward
      .put(`${url}/responsibility`)
      .send({ toId: idOf('organiser'), reason: '' });
    expect(bare.body.errors).toHaveProperty('reason');
    const noRole = await steward
      .put(`${url}/responsibility`)
      .send({ toId: idOf('member'), reason: 'ill' });
    expect(noRole.status).toBe(422);
    const reply = await steward
      .put(`${url}/responsibility`)
      .send({ toId: idOf('organiser'), reason: 'Own is in hospital.' })
      .expect(200);
    expect(BuyHeader.parse(reply.body).responsible.name).toBe('Organiser Ola');
  });

  it('answers once when accepted and taken back at the same time', async () => {
    await offer();
    const other = await world.people.organiser.agent();
    const [answered] = await Promise.all([
      other.post(`${url}/responsibility/answer`).send({ accept: true }),
      own.delete(`${url}/responsibility/offer`).send({}),
    ]);
    const head = await read(own);
    expect(head.responsible.name).toBe(answered.status === 200 ? 'Organiser Ola' : 'Own Organiser');
  });
});
