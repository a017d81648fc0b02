import { describe, expect, it } from 'vitest';
import { execute, select, transact } from '#server/config/database.ts';
import { Pledge } from '#server/models/Pledge.ts';
import { browser, signedIn, testPassword } from '#tests/support/client.ts';
import { lastMail, mailsTo } from '#tests/support/mails.ts';
import { makeAccount, makeClub, makeMember, makeWorld } from '#tests/support/world.ts';

const goodPassword = 'rain on the greenhouse roof';

async function resetLink(email: string): Promise<string> {
  await browser().post('/api/v1/resets').send({ email }).expect(200);
  return (await lastMail(email)).token;
}

describe('signing up', () => {
  it('makes an account and signs it in', async () => {
    const agent = browser();
    const { body } = await agent
      .post('/api/v1/accounts')
      .send({
        displayName: 'Imke Oosterveld',
        email: 'imke@quillmere.example',
        password: goodPassword,
      })
      .expect(201);
    expect(body.account).toMatchObject({
      email: 'imke@quillmere.example',
      displayName: 'Imke Oosterveld',
    });
    expect((await agent.get('/api/v1/session')).body.account.email).toBe('imke@quillmere.example');
  });

  it.each([
    ['too short', 'ninechars', 'Use at least 10 characters.'],
    ['too long', 'x'.repeat(129), 'Use at most 128 characters.'],
    ['common', 'Password123', 'Many people use this one, so it is guessed first. Choose another.'],
    [
      'one character only',
      'zzzzzzzzzzzz',
      'Many people use this one, so it is guessed first. Choose another.',
    ],
  ])('refuses a password that is %s', async (_why, password, message) => {
    const { body } = await browser()
      .post('/api/v1/accounts')
      .send({ displayName: 'Ravi', email: 'ravi@quillmere.example', password })
      .expect(422);
    expect(body.errors).toEqual({ password: message });
  });

  it('counts characters, not bytes, and asks for no composition', async () => {
    await browser()
      .post('/api/v1/accounts')
      .send({
        displayName: 'Liên',
        email: 'lien@quillmere.example',
        password: 'ướtđấtngậpước'.slice(0, 10),
      })
      .expect(201);
    await browser()
      .post('/api/v1/accounts')
      .send({
        displayName: 'Liên',
        email: 'lien2@quillmere.example',
        password: '🌱🌱🌱🌱🌱🪴🪴🪴🪴',
      })
      .expect(422);
  });

  it('refuses an address twice, whatever its case', async () => {
    const account = await makeAccount('Noor');
    const { body } = await browser()
      .post('/api/v1/accounts')
      .send({ displayName: 'Noor', email: account.email.toUpperCase(), password: goodPassword })
      .expect(409);
    expect(body.code).toBe('already_there');
    expect(body.errors.email).toBeTruthy();
  });

  it('keeps an argon2id hash', async () => {
    const [row] = await select<{ password_hash: string }>(
      `select password_hash from accounts where email = 'imke@quillmere.example'`,
    );
    expect(row?.password_hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  });
});

describe('reset', () => {
  it('answers alike for every address and mails only those with an account', async () => {
    const account = await makeAccount('Pim');
    const known = await browser().post('/api/v1/resets').send({ email: account.email }).expect(200);
    const unknown = await browser()
      .post('/api/v1/resets')
      .send({ email: 'nobody@quillmere.example' })
      .expect(200);
    expect(unknown.body).toEqual(known.body);
    expect(await mailsTo('nobody@quillmere.example')).toHaveLength(0);
    expect(await mailsTo(account.email)).toHaveLength(1);
  });

  it('sets a new password once, ends every session, and tells the owner', async () => {
    const account = await makeAccount('Bea');
    const elsewhere = await signedIn(account.email);
    const token = await resetLink(account.email);
    expect((await browser().get(`/api/v1/resets/${token}`).expect(200)).body.email).toBe(
      account.email,
    );
    const agent = browser();
    await agent.post(`/api/v1/resets/${token}`).send({ password: goodPassword }).expect(200);
    expect((await agent.get('/api/v1/session')).body.account.email).toBe(account.email);
    expect((await elsewhere.get('/api/v1/session')).body.account).toBeNull();
    const again = await browser()
      .post(`/api/v1/resets/${token}`)
      .send({ password: goodPassword })
      .expect(409);
    expect(again.body.code).toBe('token_spent');
    await browser().get(`/api/v1/resets/${token}`).expect(409);
    await browser()
      .post('/api/v1/session')
      .send({ email: account.email, password: testPassword })
      .expect(401);
    await browser()
      .post('/api/v1/session')
      .send({ email: account.email, password: goodPassword })
      .expect(200);
    expect((await mailsTo(account.email)).at(-1)?.subject).toBe('Your password was changed');
  });

  it('gives the link to one of two who use it at once', async () => {
    const account = await makeAccount('Cas');
    const token = await resetLink(account.email);
    const replies = await Promise.all(
      ['one good long phrase', 'another good long phrase'].map((password) =>
        browser().post(`/api/v1/resets/${token}`).send({ password }),
      ),
    );
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
  });

  it('keeps the link when the password is refused', async () => {
    const account = await makeAccount('Dov');
    const token = await resetLink(account.email);
    await browser().post(`/api/v1/resets/${token}`).send({ password: 'qwertyuiop' }).expect(422);
    await browser().post(`/api/v1/resets/${token}`).send({ password: goodPassword }).expect(200);
  });

  it('ends after an hour, and when a newer one is asked for', async () => {
    const account = await makeAccount('Eva');
    const first = await resetLink(account.email);
    const second = await resetLink(account.email);
    await browser().get(`/api/v1/resets/${first}`).expect(409);
    await browser().get(`/api/v1/resets/${second}`).expect(200);
    const [life] = await select<{ minutes: number }>(
      `select round(extract(epoch from expires_at - created_at) / 60)::integer as minutes from account_tokens
       where account_id = :id`,
      { id: account.id },
    );
    expect(life?.minutes).toBe(60);
    await transact((tx) =>
      execute(
        `update account_tokens set expires_at = now() - interval '1 second' where account_id = :id`,
        { id: account.id },
        tx,
      ),
    );
    await browser().post(`/api/v1/resets/${second}`).send({ password: goodPassword }).expect(409);
  });

  it('keeps no token in the database', async () => {
    const account = await makeAccount('Flo');
    const token = await resetLink(account.email);
    const [row] = await select<{ found: boolean }>(
      'select exists (select 1 from account_tokens where token_hash = :token) as found',
      { token },
    );
    expect(row?.found).toBe(false);
  });

  it('is limited by account, whether or not there is one', async () => {
    for (const email of [(await makeAccount('Gus')).email, 'noone@quillmere.example']) {
      const statuses = [];
      for (let attempt = 0; attempt < 4; attempt += 1) {
        statuses.push((await browser().post('/api/v1/resets').send({ email })).status);
      }
      expect(statuses).toEqual([200, 200, 200, 429]);
    }
  });
});

describe('the own account', () => {
  it('changes the password, given the current one, and signs out other places', async () => {
    const account = await makeAccount('Hal');
    const here = await signedIn(account.email);
    const elsewhere = await signedIn(account.email);
    const wrong = await here
      .put('/api/v1/account/password')
      .send({ current: 'not it at all', password: goodPassword })
      .expect(422);
    expect(wrong.body.errors).toEqual({ current: 'This is not your password.' });
    expect((await here.get('/api/v1/account')).body.otherSessions).toBe(1);
    await here
      .put('/api/v1/account/password')
      .send({ current: testPassword, password: goodPassword })
      .expect(200);
    expect((await here.get('/api/v1/account').expect(200)).body.otherSessions).toBe(0);
    await elsewhere.get('/api/v1/account').expect(401);
  });

  it('changes the address once it is confirmed at the new one, and tells the old one', async () => {
    const account = await makeAccount('Ida');
    const agent = await signedIn(account.email);
    const wanted = 'ida.new@quillmere.example';
    await agent
      .post('/api/v1/account/email')
      .send({ email: wanted, password: 'wrong' })
      .expect(422);
    await agent
      .post('/api/v1/account/email')
      .send({ email: wanted, password: testPassword })
      .expect(200);
    const before = await agent.get('/api/v1/account').expect(200);
    expect(before.body).toMatchObject({ email: account.email, pendingEmail: wanted });
    const { token } = await lastMail(wanted);
    expect((await browser().get(`/api/v1/email-confirmations/${token}`)).body.email).toBe(wanted);
    await browser().post(`/api/v1/email-confirmations/${token}`).send({}).expect(200);
    await browser().post(`/api/v1/email-confirmations/${token}`).send({}).expect(409);
    expect((await agent.get('/api/v1/account')).body).toMatchObject({
      email: wanted,
      pendingEmail: null,
    });
    expect((await mailsTo(account.email)).at(-1)?.subject).toBe('Your address was changed');
  });

  it("doesn't tell whether another account has the address", async () => {
    const account = await makeAccount('Jon');
    const other = await makeAccount('Kim');
    const agent = await signedIn(account.email);
    await agent
      .post('/api/v1/account/email')
      .send({ email: other.email, password: testPassword })
      .expect(200);
    const mail = (await mailsTo(other.email)).at(-1);
    expect(mail?.subject).toBe('This address has an account already');
    expect(mail?.text_body).not.toMatch(/confirm-email/);
  });

  it('lets a confirmation lose against an account made meanwhile', async () => {
    const account = await makeAccount('Leo');
    const agent = await signedIn(account.email);
    const wanted = 'leo.new@quillmere.example';
    await agent
      .post('/api/v1/account/email')
      .send({ email: wanted, password: testPassword })
      .expect(200);
    const { token } = await lastMail(wanted);
    await makeAccount('Somebody', wanted);
    await browser().post(`/api/v1/email-confirmations/${token}`).send({}).expect(409);
    expect((await agent.get('/api/v1/account')).body.email).toBe(account.email);
  });

  it('signs out everywhere', async () => {
    const account = await makeAccount('Mia');
    const [one, two] = [await signedIn(account.email), await signedIn(account.email)];
    await one.delete('/api/v1/account/sessions').expect(200);
    await one.get('/api/v1/account').expect(401);
    await two.get('/api/v1/account').expect(401);
    const [left] = await select<{ count: number }>(
      `select count(*)::integer as count from session where sess -> 'passport' ->> 'user' = :id`,
      { id: account.id },
    );
    expect(left?.count).toBe(0);
  });
});

describe('deleting an account', () => {
  it('is refused for a wrong password, and while the person is last in a role', async () => {
    const club = await makeClub();
    const person = await makeMember(club, 'Nia', ['steward']);
    const agent = await person.agent();
    await agent.delete('/api/v1/account').send({ password: 'wrong' }).expect(422);
    const { body } = await agent
      .delete('/api/v1/account')
      .send({ password: testPassword })
      .expect(409);
    expect(body.code).toBe('last_of_role');
    expect(body.detail).toContain('last steward');
    await agent.get('/api/v1/account').expect(200);
  });

  it('is refused while the person owes for a locked buy; then a name that the buy needs stays', async () => {
    const { club, people, buy, line } = await makeWorld('locked');
    const { member } = people;
    await Pledge.create({
      buyId: buy.id,
      lineId: line.id,
      membershipId: member.membership.id,
      wantedMg: 100_000,
      at: new Date(),
    });
    const due = (minor: number) =>
      transact((tx) =>
        execute(
          `insert into buy_members (buy_id, membership_id, locked_minor, due_minor) values (:buyId, :id, 1496, :minor)
           on conflict (buy_id, membership_id) do update set due_minor = :minor`,
          { buyId: buy.id, id: member.membership.id, minor },
          tx,
        ),
      );
    const agent = await member.agent();
    await due(1496);
    const { body } = await agent
      .delete('/api/v1/account')
      .send({ password: testPassword })
      .expect(409);
    expect(body.code).toBe('still_owed');
    expect(body.detail).toContain(club.name);
    await due(0);
    await agent.delete('/api/v1/account').send({ password: testPassword }).expect(200);
    await member.membership.reload();
    expect(member.membership).toMatchObject({ status: 'left', displayName: 'Member Mo' });
    expect(await Pledge.count({ where: { wantedMg: 100_000 } })).toBe(1);
  });

  it('leaves the clubs, ends the sessions, frees the address and forgets the name', async () => {
    const club = await makeClub();
    await makeMember(club, 'Other', ['organiser', 'treasurer', 'steward']);
    const person = await makeMember(club, 'Oda');
    const agent = await person.agent();
    await agent.delete('/api/v1/account').send({ password: testPassword }).expect(200);
    expect((await agent.get('/api/v1/session')).body.account).toBeNull();
    await person.membership.reload();
    expect(person.membership).toMatchObject({ status: 'left', displayName: 'Former member' });
    await browser()
      .post('/api/v1/accounts')
      .send({ displayName: 'Oda again', email: person.email, password: goodPassword })
      .expect(201);
  });
});
