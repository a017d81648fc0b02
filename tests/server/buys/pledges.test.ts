import { describe, expect, it } from 'vitest';
import { execute, select, transact } from '#server/config/database.ts';
import { Buy } from '#server/models/Buy.ts';
import { Pledge } from '#server/models/Pledge.ts';
import { MySheet, PledgeReply } from '#shared/schemas/sheet.ts';
import { closesIn, givePledge, makeSheetWorld, pledgeUrl } from '#tests/support/sheetWorld.ts';
import { makeGuest } from '#tests/support/world.ts';

const g = (grams: number, version = 0, upTo: number | null = null) => ({
  wantedMg: grams * 1000,
  upToMg: upTo === null ? null : upTo * 1000,
  version,
});

describe('a pledge', () => {
  it('is made, raised and lowered; only raising moves its turn', async () => {
    const world = await makeSheetWorld();
    const agent = await world.people.member.agent();
    const url = pledgeUrl(world, world.plain, world.people.member);
    const first = PledgeReply.parse((await agent.put(url).send(g(400)).expect(200)).body);
    expect(first.pledge).toMatchObject({ wantedMg: 400_000, upToMg: null, version: 1 });
    expect(first.sheetVersion).toBe(world.buy.sheetVersion + 1);
    const raised = PledgeReply.parse(
      (
        await agent
          .put(url)
          .send(g(600, 1, 900))
          .expect(200)
      ).body,
    );
    expect(raised.pledge).toMatchObject({ wantedMg: 600_000, upToMg: 900_000, version: 2 });
    expect(raised.pledge.at > first.pledge.at).toBe(true);
    const lowered = PledgeReply.parse(
      (
        await agent
          .put(url)
          .send(g(500, 2, 900))
          .expect(200)
      ).body,
    );
    const flexible = PledgeReply.parse(
      (
        await agent
          .put(url)
          .send(g(500, 3, 800))
          .expect(200)
      ).body,
    );
    expect([lowered.pledge.at, flexible.pledge.at]).toEqual([raised.pledge.at, raised.pledge.at]);
    const audit = await select<{ before: unknown; after: unknown; actor_name: string }>(
      `select before, after, actor_name from audit_entries where buy_id = :buyId and action = 'pledges.change' order by id`,
      { buyId: world.buy.id },
    );
    expect(audit).toHaveLength(4);
    expect(audit[1]).toMatchObject({
      actor_name: 'Member Mo',
      before: { wantedMg: 400_000, upToMg: null },
      after: { wantedMg: 600_000, upToMg: 900_000 },
    });
  });

  it('may be repeated, but a stale version is told what it is now', async () => {
    const world = await makeSheetWorld();
    const agent = await world.people.member.agent();
    const url = pledgeUrl(world, world.plain, world.people.member);
    await agent.put(url).send(g(400)).expect(200);
    const again = await agent.put(url).send(g(400)).expect(200);
    expect(again.body.pledge.version).toBe(1);
    const stale = await agent.put(url).send(g(700)).expect(409);
    expect(stale.body).toMatchObject({
      code: 'stale',
      current: { wantedMg: 400_000, version: 1 },
    });
  });

  it("is never refused because of another's", async () => {
    const world = await makeSheetWorld();
    const { member, treasurer, steward } = world.people;
    const people = [member, treasurer, steward];
    const agents = await Promise.all(people.map((person) => person.agent()));
    await Promise.all(
      people.map((person, index) =>
        agents[index]
          ?.put(pledgeUrl(world, world.plain, person))
          .send(g(100))
          .expect(200),
      ),
    );
    const [versions] = await Promise.all([
      Pledge.findAll({ where: { buyId: world.buy.id }, order: ['changedSheetVersion'] }),
    ]);
    const from = world.buy.sheetVersion;
    expect(versions.map((row) => row.changedSheetVersion)).toEqual([from + 1, from + 2, from + 3]);
  });

  it('comes in whole portion steps and says which ones', async () => {
    const world = await makeSheetWorld();
    await world.plain.update({ stepMg: 50_000 });
    const agent = await world.people.member.agent();
    const url = pledgeUrl(world, world.plain, world.people.member);
    const reply = await agent
      .put(url)
      .send(g(120, 0, 130))
      .expect(422);
    expect(reply.body.errors).toEqual({
      wantedMg: 'This line goes in steps of 50\u00a0g: 100\u00a0g or 150\u00a0g.',
      upToMg: 'This line goes in steps of 50\u00a0g: 100\u00a0g or 150\u00a0g.',
    });
    await agent.put(url).send({ wantedMg: 0.5, upToMg: null, version: 0 }).expect(422);
    await agent.put(url).send({ wantedMg: -1000, upToMg: null, version: 0 }).expect(422);
  });

  it('of a classified salt wants its cautions confirmed once', async () => {
    const world = await makeSheetWorld();
    const agent = await world.people.member.agent();
    const url = pledgeUrl(world, world.line, world.people.member);
    const refused = await agent.put(url).send(g(100)).expect(409);
    expect(refused.body.code).toBe('hazard_unconfirmed');
    await agent.post(`${world.url}/hazards`).send({ saltId: 'NaCl' }).expect(422);
    await agent.post(`${world.url}/hazards`).send({ saltId: 'MgSO4.7H2O' }).expect(422);
    await agent.post(`${world.url}/hazards`).send({ saltId: 'KNO3' }).expect(200);
    await agent.post(`${world.url}/hazards`).send({ saltId: 'KNO3' }).expect(200);
    await agent.put(url).send(g(100)).expect(200);
    const mine = MySheet.parse((await agent.get(`${world.url}/sheet/mine`).expect(200)).body);
    expect(mine.confirmed).toEqual(['KNO3']);
  });
});

describe('the end of pledging', () => {
  it('counts by the clock, whether or not the job has run', async () => {
    const world = await makeSheetWorld();
    await closesIn(world, -0.001);
    const agent = await world.people.member.agent();
    const url = pledgeUrl(world, world.plain, world.people.member);
    const reply = await agent.put(url).send(g(400)).expect(409);
    expect(reply.body.code).toBe('buy_locked');
    expect(reply.body.detail).toMatch(/closing time has passed/);
  });

  it.each(['locked', 'ordered', 'pickup', 'settled'] as const)('is past once %s', async (state) => {
    const world = await makeSheetWorld(state);
    const agent = await world.people.member.agent();
    const url = pledgeUrl(world, world.plain, world.people.member);
    expect((await agent.put(url).send(g(400)).expect(409)).body.code).toBe('buy_locked');
  });

  it('rests while frozen', async () => {
    const world = await makeSheetWorld();
    await Buy.update({ frozenAt: new Date() }, { where: { id: world.buy.id } });
    const agent = await world.people.member.agent();
    const url = pledgeUrl(world, world.plain, world.people.member);
    expect((await agent.put(url).send(g(400)).expect(409)).body.code).toBe('buy_frozen');
  });

  it('keeps late lowering to the organiser, but not raising', async () => {
    const world = await makeSheetWorld();
    const { member, own } = world.people;
    await givePledge(world, member, world.plain, 500);
    await closesIn(world, 23);
    const agent = await member.agent();
    const url = pledgeUrl(world, world.plain, member);
    expect((await agent.put(url).send(g(400, 1)).expect(409)).body.code).toBe('closing_soon');
    await agent.put(url).send(g(600, 1)).expect(200);
    await (await own.agent()).put(url).send(g(300, 2)).expect(200);
  });

  it('lets nobody raise who is overdue in another buy', async () => {
    const world = await makeSheetWorld();
    const { member, treasurer } = world.people;
    const other = await Buy.create({
      clubId: world.club.id,
      name: 'Autumn salts',
      state: 'locked',
      responsibleId: world.people.own.membership.id,
      closesAt: new Date(Date.now() - 9e8),
      openedAt: new Date(Date.now() - 9e8),
      dueAt: new Date(Date.now() - 60_000),
    });
    await transact((tx) =>
      execute(
        'insert into buy_members (buy_id, membership_id, locked_minor, due_minor) values (:b, :m, 1000, 1000)',
        { b: other.id, m: member.membership.id },
        tx,
      ),
    );
    await givePledge(world, member, world.plain, 500);
    const agent = await member.agent();
    const url = pledgeUrl(world, world.plain, member);
    const reply = await agent.put(url).send(g(600, 1)).expect(409);
    expect(reply.body.code).toBe('overdue_elsewhere');
    expect(reply.body.detail).toMatch('Autumn salts');
    await agent
      .put(url)
      .send(g(500, 1, 700))
      .expect(409);
    await agent.put(url).send(g(400, 1)).expect(200);
    await transact((tx) =>
      execute(
        'update buy_members set vouched_at = now(), vouched_by_id = :t where buy_id = :b',
        { b: other.id, t: treasurer.membership.id },
        tx,
      ),
    );
    await agent.put(url).send(g(700, 2)).expect(200);
  });
});

describe('pledging for someone', () => {
  it("is the organiser's, audited and told; raising needs the member's yes", async () => {
    const world = await makeSheetWorld();
    const { member, organiser, own } = world.people;
    const url = pledgeUrl(world, world.plain, member);
    await (await organiser.agent()).put(url).send(g(100)).expect(403);
    await (
      await member.agent()
    )
      .put(pledgeUrl(world, world.plain, own))
      .send(g(100))
      .expect(403);
    const organise = await own.agent();
    await organise.put(url).send(g(500)).expect(200);
    const told = await select<{ subject: string }>(
      `select subject from notices where membership_id = :m and kind = 'pledge_changed'`,
      { m: member.membership.id },
    );
    expect(told.map(({ subject }) => subject)).toEqual([
      'Test buy: your pledge of Epsom salt is now 500\u00a0g',
    ]);
    const asked = PledgeReply.parse((await organise.put(url).send(g(900, 1)).expect(200)).body);
    expect(asked).toMatchObject({ proposed: true, pledge: { wantedMg: 500_000, version: 1 } });
    const agent = await member.agent();
    const read = async () => MySheet.parse((await agent.get(`${world.url}/sheet/mine`)).body);
    const [proposal] = (await read()).proposals;
    expect(proposal).toMatchObject({ wantedMg: 900_000, proposedBy: 'Own Organiser' });
    const answer = `${world.url}/proposals/${proposal?.id}`;
    await (await organiser.agent()).post(answer).send({ accept: true }).expect(404);
    await agent.post(answer).send({ accept: true }).expect(200);
    await agent.post(answer).send({ accept: true }).expect(404);
    const after = await read();
    expect(after.proposals).toEqual([]);
    expect(after.pledges[0]).toMatchObject({ wantedMg: 900_000, version: 2 });
    await organise.put(url).send(g(0, 2)).expect(200);
  });

  it('takes a no without changing anything, and a later question in place of an earlier one', async () => {
    const world = await makeSheetWorld();
    const { member, own } = world.people;
    await givePledge(world, member, world.plain, 500);
    const url = pledgeUrl(world, world.plain, member);
    const organise = await own.agent();
    await organise.put(url).send(g(700, 1)).expect(200);
    await organise.put(url).send(g(800, 1)).expect(200);
    const agent = await member.agent();
    const mine = MySheet.parse((await agent.get(`${world.url}/sheet/mine`)).body);
    expect(mine.proposals.map(({ wantedMg }) => wantedMg)).toEqual([800_000]);
    await agent
      .post(`${world.url}/proposals/${mine.proposals[0]?.id}`)
      .send({ accept: false })
      .expect(200);
    const pledge = await Pledge.findOne({ where: { lineId: world.plain.id } });
    expect(pledge).toMatchObject({ wantedMg: 500_000, version: 1 });
  });

  it('goes for guests without a yes, and keeps their signed paper', async () => {
    const world = await makeSheetWorld();
    const { own, member } = world.people;
    const guest = await makeGuest(world.club, 'Guest Gil', own);
    const organise = await own.agent();
    const url = pledgeUrl(world, world.line, { membership: guest });
    await organise.put(url).send(g(200)).expect(200);
    await organise.put(url).send(g(400, 1)).expect(200);
    const paper = `${world.url}/members/${guest.id}/paper`;
    await (await member.agent()).put(paper).send({ saltId: 'KNO3', signed: true }).expect(403);
    await organise.put(paper).send({ saltId: 'KNO3', signed: true }).expect(200);
    const read = async () =>
      MySheet.parse((await organise.get(`${world.url}/sheet/mine`)).body).people.find(
        ({ membershipId }) => membershipId === guest.id,
      );
    expect(await read()).toMatchObject({ guest: true, onPaper: ['KNO3'] });
    await organise.put(paper).send({ saltId: 'KNO3', signed: false }).expect(200);
    expect((await read())?.onPaper).toEqual([]);
    await organise
      .put(`${world.url}/members/${member.membership.id}/paper`)
      .send({ saltId: 'KNO3', signed: true })
      .expect(404);
  });

  it('is not for people of another club or lines of another buy', async () => {
    const world = await makeSheetWorld();
    const other = await makeSheetWorld();
    const organise = await world.people.own.agent();
    const stranger = pledgeUrl(world, world.plain, other.people.member);
    await organise.put(stranger).send(g(100)).expect(404);
    const elsewhere = pledgeUrl(world, other.plain, world.people.own);
    await organise.put(elsewhere).send(g(100)).expect(404);
  });
});
