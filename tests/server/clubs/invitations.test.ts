import { describe, expect, it } from 'vitest';
import { execute, select, transact } from '#server/config/database.ts';
import { Membership } from '#server/models/Membership.ts';
import { Pledge } from '#server/models/Pledge.ts';
import { browser, signedIn } from '#tests/support/client.ts';
import { lastMail, mailsTo } from '#tests/support/mails.ts';
import { makeAccount, makeClub, makeGuest, makeMember, makeWorld } from '#tests/support/world.ts';

async function clubWithSteward() {
  const club = await makeClub({ name: 'Quillmere' });
  const steward = await makeMember(club, 'Stig', ['steward', 'organiser', 'treasurer']);
  const agent = await steward.agent();
  const url = `/api/v1/clubs/${club.slug}/invitations`;
  const link = async () =>
    String((await agent.post(url).send({ kind: 'link' }).expect(201)).body.path).replace(
      '/join/',
      '',
    );
  const mail = async (email: string) => {
    await agent.post(url).send({ kind: 'email', email }).expect(201);
    return (await lastMail(email)).token;
  };
  return { club, steward, agent, url, link, mail };
}

async function newcomer(name: string) {
  const account = await makeAccount(name);
  const agent = await signedIn(account.email);
  return {
    account,
    agent,
    accept: (token: string, displayName = name) =>
      agent.post(`/api/v1/invitations/${token}/accept`).send({ displayName }),
  };
}

describe('a join link', () => {
  it('shows the club to anyone who has it, and is told only once', async () => {
    const { club, agent, url, link } = await clubWithSteward();
    const token = await link();
    const { body } = await browser().get(`/api/v1/invitations/${token}`).expect(200);
    expect(body).toMatchObject({
      club: { slug: club.slug, name: 'Quillmere' },
      kind: 'link',
      invitedBy: 'Stig',
      needsApproval: true,
      already: null,
    });
    const list = await agent.get(url).expect(200);
    expect(JSON.stringify(list.body)).not.toContain(token);
  });

  it('asks a steward, who lets in or turns down', async () => {
    const { club, agent, link } = await clubWithSteward();
    const token = await link();
    const one = await newcomer('Ann');
    const two = await newcomer('Ben');
    expect((await one.accept(token, 'Ann P.').expect(200)).body.status).toBe('pending');
    expect((await one.accept(token).expect(200)).body.status).toBe('pending');
    await two.accept(token).expect(200);
    await one.agent.get(`/api/v1/clubs/${club.slug}`).expect(404);
    const members = `/api/v1/clubs/${club.slug}/members`;
    const { body } = await agent.get(members).expect(200);
    const id = (name: string) =>
      (body.members as { id: string; displayName: string }[]).find(
        (row) => row.displayName === name,
      )?.id;
    await agent
      .post(`${members}/${id('Ann P.')}/approve`)
      .send({})
      .expect(200);
    await agent
      .post(`${members}/${id('Ann P.')}/approve`)
      .send({})
      .expect(409);
    await one.agent.get(`/api/v1/clubs/${club.slug}`).expect(200);
    await agent
      .post(`${members}/${id('Ben')}/refuse`)
      .send({})
      .expect(200);
    await two.agent.get(`/api/v1/clubs/${club.slug}`).expect(404);
    expect(await Membership.count({ where: { accountId: two.account.id } })).toBe(0);
    expect((await mailsTo(one.account.email)).at(-1)?.subject).toBe('You are in Quillmere');
    expect((await mailsTo(two.account.email)).at(-1)?.subject).toBe('Quillmere has answered');
  });

  it('lets in at once where the club says so, but never who was removed', async () => {
    const { club, agent, link } = await clubWithSteward();
    await agent
      .patch(`/api/v1/clubs/${club.slug}`)
      .send({ version: 1, joinNeedsApproval: false })
      .expect(200);
    const token = await link();
    const one = await newcomer('Cleo');
    expect((await one.accept(token).expect(200)).body.status).toBe('active');
    const member = await Membership.findOne({
      where: { accountId: one.account.id },
      rejectOnEmpty: true,
    });
    await agent.delete(`/api/v1/clubs/${club.slug}/members/${member.id}`).expect(200);
    expect((await one.accept(token).expect(200)).body.status).toBe('pending');
    await agent.post(`/api/v1/clubs/${club.slug}/members/${member.id}/refuse`).send({}).expect(200);
    await member.reload();
    expect(member.status).toBe('removed');
  });

  it('lasts 14 days and can be revoked', async () => {
    const { club, agent, url, link } = await clubWithSteward();
    const [old, revoked] = [await link(), await link()];
    const [life] = await select<{ days: number }>(
      `select round(extract(epoch from expires_at - created_at) / 86400)::integer as days
       from invitations where club_id = :id limit 1`,
      { id: club.id },
    );
    expect(life?.days).toBe(14);
    const list = await agent.get(url).expect(200);
    await agent.delete(`${url}/${list.body.invitations[0].id}`).expect(200);
    await browser().get(`/api/v1/invitations/${revoked}`).expect(409);
    await browser().get(`/api/v1/invitations/${old}`).expect(200);
    await transact((tx) =>
      execute(
        `update invitations set expires_at = now() - interval '1 second' where club_id = :id`,
        { id: club.id },
        tx,
      ),
    );
    const { body } = await (await newcomer('Dan')).accept(old).expect(409);
    expect(body.code).toBe('token_spent');
    expect((await agent.get(url)).body.invitations[0].expired).toBe(true);
  });
});

describe('an e-mailed invitation', () => {
  it('works once and lets in at once', async () => {
    const { mail } = await clubWithSteward();
    const token = await mail('ed@quillmere.example');
    const [one, two] = [await newcomer('Ed'), await newcomer('Eve')];
    const replies = await Promise.all([one.accept(token), two.accept(token)]);
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect(replies.find(({ status }) => status === 200)?.body.status).toBe('active');
  });

  it('is refused for members and for who is invited already', async () => {
    const { agent, url, steward, mail } = await clubWithSteward();
    await mail('fay@quillmere.example');
    for (const email of ['FAY@quillmere.example', steward.email]) {
      const { body } = await agent.post(url).send({ kind: 'email', email }).expect(422);
      expect(Object.keys(body.errors)).toEqual(['email']);
    }
    await agent.post(url).send({ kind: 'email', email: 'no address' }).expect(422);
  });

  it('is sent again under a new link', async () => {
    const { agent, url, mail } = await clubWithSteward();
    const first = await mail('gil@quillmere.example');
    const { id } = (await agent.get(url)).body.invitations[0];
    await agent.post(`${url}/${id}/resend`).send({}).expect(200);
    const { token } = await lastMail('gil@quillmere.example');
    expect(token).not.toBe(first);
    await browser().get(`/api/v1/invitations/${first}`).expect(409);
    await browser().get(`/api/v1/invitations/${token}`).expect(200);
  });

  it('stays within its club', async () => {
    const { agent, url, mail } = await clubWithSteward();
    const other = await clubWithSteward();
    await mail('hue@quillmere.example');
    const { id } = (await agent.get(url)).body.invitations[0];
    await other.agent.delete(`${other.url}/${id}`).expect(404);
    await other.agent.post(`${other.url}/${id}/resend`).send({}).expect(404);
  });
});

describe('inviting a guest', () => {
  it('keeps their history under the account that accepts', async () => {
    const { club, people, buy, line } = await makeWorld();
    const guest = await makeGuest(club, 'Guest Gwen', people.steward);
    await Pledge.create({
      buyId: buy.id,
      lineId: line.id,
      membershipId: guest.id,
      wantedMg: 250_000,
      at: new Date(),
    });
    const agent = await people.steward.agent();
    const url = `/api/v1/clubs/${club.slug}/invitations`;
    const body = { kind: 'email', email: 'gwen@quillmere.example', guestId: guest.id };
    await agent.post(url).send(body).expect(201);
    await agent
      .post(url)
      .send({ ...body, email: 'gwen2@quillmere.example' })
      .expect(422);
    const { token } = await lastMail('gwen@quillmere.example');
    const gwen = await newcomer('Gwen');
    await gwen.accept(token, 'Gwen').expect(200);
    await guest.reload();
    expect(guest).toMatchObject({
      accountId: gwen.account.id,
      isGuest: false,
      displayName: 'Gwen',
      status: 'active',
    });
    expect(await Pledge.count({ where: { membershipId: guest.id } })).toBe(1);
    await gwen.agent.get(`/api/v1/clubs/${club.slug}/buys/${buy.id}`).expect(200);
  });

  it('is refused to an account that has a membership of its own', async () => {
    const { club, people } = await makeWorld();
    const guest = await makeGuest(club, 'Guest Hugo', people.steward);
    await (
      await people.steward.agent()
    )
      .post(`/api/v1/clubs/${club.slug}/invitations`)
      .send({ kind: 'email', email: 'hugo@quillmere.example', guestId: guest.id })
      .expect(201);
    const { token } = await lastMail('hugo@quillmere.example');
    const former = await makeMember(club, 'Former', [], 'left');
    const { body } = await (
      await former.agent()
    )
      .post(`/api/v1/invitations/${token}/accept`)
      .send({ displayName: 'Hugo' })
      .expect(409);
    expect(body.code).toBe('already_there');
  });
});
