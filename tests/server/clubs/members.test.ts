import { describe, expect, it } from 'vitest';
import { execute, select, transact } from '#server/config/database.ts';
import type { Member } from '#shared/schemas/members.ts';
import { postTransaction } from '#server/services/ledger/postTransaction.ts';
import { Buy } from '#server/models/Buy.ts';
import { Line } from '#server/models/Line.ts';
import { Pledge } from '#server/models/Pledge.ts';
import { mailsTo } from '#tests/support/mails.ts';
import { makeClub, makeGuest, makeMember, makeWorld, type Person } from '#tests/support/world.ts';

const none = { organiser: false, treasurer: false, steward: false };

async function membersSeenBy(person: Person, slug: string): Promise<Map<string, Member>> {
  const { body } = await (await person.agent()).get(`/api/v1/clubs/${slug}/members`).expect(200);
  return new Map((body.members as Member[]).map((member) => [member.displayName, member]));
}

describe('who sees what of members', () => {
  it('shows addresses and balances only to those who may see them', async () => {
    const { club, people, buy, line } = await makeWorld();
    await Pledge.create({
      buyId: buy.id,
      lineId: line.id,
      membershipId: people.member.membership.id,
      wantedMg: 100_000,
      at: new Date(),
    });
    await transact((tx) =>
      postTransaction(tx, {
        clubId: club.id,
        eventType: 'test',
        eventId: 'one',
        onDate: '2026-12-01',
        memo: '',
        by: { membershipId: null, name: 'test' },
        postings: [
          { account: { kind: 'bank' }, amountMinor: 700 },
          { account: { kind: 'member', refId: people.member.membership.id }, amountMinor: -700 },
        ],
      }),
    );
    const seen = async (person: Person) => {
      const members = await membersSeenBy(person, club.slug);
      const { email, balanceMinor } = members.get('Member Mo') ?? {};
      const other = members.get('Helper Hal');
      return [email !== null, balanceMinor, other?.email !== null, other?.balanceMinor];
    };
    expect(await seen(people.member)).toEqual([true, -700, false, null]);
    expect(await seen(people.helper)).toEqual([false, null, true, 0]);
    expect(await seen(people.organiser)).toEqual([false, null, false, null]);
    expect(await seen(people.own)).toEqual([true, null, false, null]);
    expect(await seen(people.treasurer)).toEqual([true, -700, true, 0]);
    expect(await seen(people.steward)).toEqual([true, null, true, null]);
  });

  it('lists those who ask, and former members, for stewards only', async () => {
    const club = await makeClub();
    const steward = await makeMember(club, 'Steward', ['steward']);
    const member = await makeMember(club, 'Member');
    await makeMember(club, 'Asks', [], 'pending');
    await makeMember(club, 'Gone', [], 'removed');
    expect([...(await membersSeenBy(steward, club.slug)).keys()]).toEqual([
      'Asks',
      'Gone',
      'Member',
      'Steward',
    ]);
    expect([...(await membersSeenBy(member, club.slug)).keys()]).toEqual(['Member', 'Steward']);
  });

  it('gives those who ask no way in', async () => {
    const club = await makeClub();
    const pending = await makeMember(club, 'Asks', [], 'pending');
    await (await pending.agent()).get(`/api/v1/clubs/${club.slug}/members`).expect(404);
  });
});

describe('roles', () => {
  it('changes them over the version that was seen, and tells the member', async () => {
    const club = await makeClub();
    const steward = await makeMember(club, 'Steward', ['steward', 'organiser', 'treasurer']);
    const member = await makeMember(club, 'Member');
    const agent = await steward.agent();
    const url = `/api/v1/clubs/${club.slug}/members/${member.membership.id}/roles`;
    await agent
      .put(url)
      .send({ roles: { ...none, treasurer: true }, version: 1 })
      .expect(200);
    const stale = await agent.put(url).send({ roles: none, version: 1 }).expect(409);
    expect(stale.body).toMatchObject({
      code: 'stale',
      current: { version: 2, roles: { treasurer: true } },
    });
    expect((await mailsTo(member.email)).at(-1)?.text_body).toContain('you are now treasurer');
    const [audit] = await select<{ before: unknown; after: unknown; actor_name: string }>(
      `select before, after, actor_name from audit_entries where club_id = :id and action = 'clubs.roles'`,
      { id: club.id },
    );
    expect(audit).toEqual({
      actor_name: 'Steward',
      before: none,
      after: { ...none, treasurer: true },
    });
  });

  it('protects the last of each role, naming it', async () => {
    const club = await makeClub();
    const only = await makeMember(club, 'Only One', ['steward', 'treasurer']);
    await makeMember(club, 'Organiser', ['organiser']);
    const agent = await only.agent();
    const url = `/api/v1/clubs/${club.slug}/members/${only.membership.id}`;
    const { body } = await agent.put(`${url}/roles`).send({ roles: none, version: 1 }).expect(409);
    expect(body.code).toBe('last_of_role');
    expect(body.detail).toContain("Only One is the club's last treasurer and steward.");
    await agent.delete(url).expect(409);
    await agent.post(`/api/v1/clubs/${club.slug}/leave`).send({}).expect(409);
  });

  it('keeps a steward when two take the role from each other at once', async () => {
    for (let round = 0; round < 5; round += 1) {
      const club = await makeClub();
      const people = [
        await makeMember(club, 'A', ['steward', 'organiser', 'treasurer']),
        await makeMember(club, 'B', ['steward', 'organiser', 'treasurer']),
      ] as const;
      const agents = await Promise.all(people.map((person) => person.agent()));
      const acts = [
        agents[0]?.delete(`/api/v1/clubs/${club.slug}/members/${people[1].membership.id}`),
        agents[1]?.delete(`/api/v1/clubs/${club.slug}/members/${people[0].membership.id}`),
      ];
      const replies = await Promise.all(acts);
      expect(replies.map((reply) => reply?.status).sort()).not.toEqual([200, 200]);
      const [left] = await select<{ stewards: number }>(
        `select count(*)::integer as stewards from memberships where club_id = :id and status = 'active' and is_steward`,
        { id: club.id },
      );
      expect(left?.stewards).toBe(1);
    }
  });

  it('gives guests none', async () => {
    const club = await makeClub();
    const steward = await makeMember(club, 'Steward', ['steward']);
    const guest = await makeGuest(club, 'Guest', steward);
    await (
      await steward.agent()
    )
      .put(`/api/v1/clubs/${club.slug}/members/${guest.id}/roles`)
      .send({ roles: { ...none, organiser: true }, version: 1 })
      .expect(409);
  });
});

describe('leaving and removal', () => {
  it('withdraws pledges in open buys, keeps those from the lock on, and ends access at once', async () => {
    const { club, people, buy, line } = await makeWorld('open');
    const { member, steward } = people;
    const locked = await Buy.create({
      clubId: club.id,
      name: 'Locked buy',
      state: 'locked',
      responsibleId: people.own.membership.id,
      closesAt: new Date(),
      openedAt: new Date(),
    });
    const lockedLine = await Line.create({ buyId: locked.id, saltId: 'KNO3', position: 0 });
    const pledge = (buyId: string, lineId: string) =>
      Pledge.create({
        buyId,
        lineId,
        membershipId: member.membership.id,
        wantedMg: 400_000,
        upToMg: 500_000,
        at: new Date(),
      });
    const open = await pledge(buy.id, line.id);
    const stays = await pledge(locked.id, lockedLine.id);
    const before = await Buy.findByPk(buy.id, { rejectOnEmpty: true });
    const agent = await member.agent();
    await agent.get(`/api/v1/clubs/${club.slug}`).expect(200);
    await (
      await steward.agent()
    )
      .delete(`/api/v1/clubs/${club.slug}/members/${member.membership.id}`)
      .expect(200);
    await agent.get(`/api/v1/clubs/${club.slug}`).expect(404);
    await open.reload();
    await stays.reload();
    await buy.reload();
    expect(open).toMatchObject({ wantedMg: 0, upToMg: null, version: 2 });
    expect(buy.sheetVersion).toBe(before.sheetVersion + 1);
    expect(open.changedSheetVersion).toBe(buy.sheetVersion);
    expect(stays).toMatchObject({ wantedMg: 400_000, version: 1 });
    expect((await mailsTo(member.email)).at(-1)?.subject).toContain('no longer in');
    const again = await (
      await steward.agent()
    )
      .delete(`/api/v1/clubs/${club.slug}/members/${member.membership.id}`)
      .expect(409);
    expect(again.body.code).toBe('wrong_state');
  });

  it('waits until a buy has passed on to another organiser', async () => {
    const { club, people } = await makeWorld('open');
    const { body } = await (
      await people.own.agent()
    )
      .post(`/api/v1/clubs/${club.slug}/leave`)
      .send({})
      .expect(409);
    expect(body.detail).toContain('Test buy');
  });

  it('passes a draft to its co-organiser, and discards one that nobody else sees', async () => {
    const { club, people } = await makeWorld('open');
    const leaver = await makeMember(club, 'Leaver', ['organiser']);
    const draft = (name: string) =>
      Buy.create({ clubId: club.id, name, responsibleId: leaver.membership.id });
    const [shared, alone] = [await draft('Shared draft'), await draft('Lone draft')];
    await transact((tx) =>
      execute(
        'insert into buy_organisers (buy_id, membership_id) values (:buyId, :memberId)',
        { buyId: shared.id, memberId: people.organiser.membership.id },
        tx,
      ),
    );
    await (await leaver.agent()).post(`/api/v1/clubs/${club.slug}/leave`).send({}).expect(200);
    await shared.reload();
    await alone.reload();
    expect(shared).toMatchObject({
      state: 'draft',
      responsibleId: people.organiser.membership.id,
      termsVersion: 2,
    });
    expect(alone.state).toBe('cancelled');
  });

  it("leaves another club's members alone", async () => {
    const { club, people } = await makeWorld();
    await (
      await people.steward.agent()
    )
      .delete(`/api/v1/clubs/${club.slug}/members/${people.stranger.membership.id}`)
      .expect(404);
  });
});

describe('guests', () => {
  it('are added and changed with somebody who vouches', async () => {
    const club = await makeClub();
    const steward = await makeMember(club, 'Steward', ['steward']);
    const elsewhere = await makeMember(await makeClub(), 'Elsewhere');
    const agent = await steward.agent();
    const url = `/api/v1/clubs/${club.slug}/guests`;
    const guest = { displayName: 'Wim', contact: '06 555', vouchedById: steward.membership.id };
    const wrong = await agent
      .post(url)
      .send({ ...guest, vouchedById: elsewhere.membership.id })
      .expect(422);
    expect(Object.keys(wrong.body.errors)).toEqual(['vouchedById']);
    const { body } = await agent.post(url).send(guest).expect(201);
    const made = (body.members as Member[]).find(({ displayName }) => displayName === 'Wim');
    expect(made).toMatchObject({
      isGuest: true,
      contact: '06 555',
      vouchedBy: { name: 'Steward' },
    });
    const change = { ...guest, displayName: 'Wim B.', version: 1 };
    await agent.put(`${url}/${made?.id}`).send(change).expect(200);
    await agent.put(`${url}/${made?.id}`).send(change).expect(409);
    await agent.put(`${url}/${steward.membership.id}`).send(change).expect(404);
  });
});

describe('the own name', () => {
  it('is one per club', async () => {
    const club = await makeClub();
    const member = await makeMember(club, 'Member');
    const agent = await member.agent();
    await agent.patch(`/api/v1/clubs/${club.slug}/me`).send({ displayName: '  ' }).expect(422);
    await agent.patch(`/api/v1/clubs/${club.slug}/me`).send({ displayName: 'Mo' }).expect(200);
    expect((await membersSeenBy(member, club.slug)).has('Mo')).toBe(true);
    expect((await agent.get('/api/v1/account')).body.displayName).toBe('Member');
  });
});
