import { describe, expect, it } from 'vitest';
import supertest from 'supertest';
import { browser, signedIn, testApp, testPassword } from '#tests/support/client.ts';
import { makeAccount, makeClub, makeMember } from '#tests/support/world.ts';

describe('session', () => {
  it('says that nobody is here yet', async () => {
    const { body } = await browser().get('/api/v1/session').expect(200);
    expect(body).toEqual({ account: null, memberships: [], demo: false, firstRun: true });
  });

  it('signs in under a new session id, reads, and signs out', async () => {
    const club = await makeClub({ name: 'Quillmere' });
    const person = await makeMember(club, 'Imke', ['steward']);
    const agent = browser();
    const first = await agent
      .post('/api/v1/session')
      .send({ email: person.email.toUpperCase(), password: testPassword })
      .expect(200);
    expect(first.body.memberships[0]).toMatchObject({
      clubSlug: club.slug,
      roles: { steward: true },
    });
    const cookie = first.headers['set-cookie']?.[0];
    expect(cookie).toMatch(/HttpOnly/);
    expect(cookie).toMatch(/SameSite=Lax/);
    const second = await agent
      .post('/api/v1/session')
      .send({ email: person.email, password: testPassword });
    expect(second.headers['set-cookie']?.[0]).not.toBe(cookie);
    await agent.delete('/api/v1/session').expect(200);
    const after = await agent.get('/api/v1/session').expect(200);
    expect(after.body.account).toBeNull();
  });

  it('refuses a wrong password and an unknown address with the same words', async () => {
    const account = await makeAccount('Ravi');
    const wrong = await browser()
      .post('/api/v1/session')
      .send({ email: account.email, password: 'not the right one' })
      .expect(401);
    const unknown = await browser()
      .post('/api/v1/session')
      .send({ email: 'nobody@quillmere.example', password: 'not the right one' })
      .expect(401);
    expect({ ...unknown.body, requestId: '' }).toEqual({ ...wrong.body, requestId: '' });
    expect(wrong.headers['content-type']).toMatch('application/problem+json');
  });

  it('limits tries on one account', async () => {
    const account = await makeAccount('Noor');
    for (let attempt = 0; attempt < 10; attempt += 1) {
      await browser()
        .post('/api/v1/session')
        .send({ email: account.email, password: 'no' })
        .expect(401);
    }
    const limited = await browser()
      .post('/api/v1/session')
      .send({ email: account.email, password: testPassword })
      .expect(429);
    expect(limited.body.code).toBe('too_many');
  });

  it('refuses writes from elsewhere', async () => {
    const agent = await signedIn((await makeAccount('Pim')).email);
    for (const headers of [
      { 'Sec-Fetch-Site': 'cross-site', Origin: 'https://elsewhere.example' },
      { 'Sec-Fetch-Site': 'same-origin', Origin: 'null' },
      { 'Sec-Fetch-Site': 'same-site', Origin: 'http://sub.127.0.0.1' },
    ]) {
      const reply = await agent.delete('/api/v1/session').set(headers).expect(403);
      expect(reply.body.code).toBe('foreign_origin');
    }
    await supertest(testApp()).delete('/api/v1/session').expect(403);
  });

  it('names the field that is wrong', async () => {
    const reply = await browser()
      .post('/api/v1/session')
      .send({ email: 'nope', extra: 1 })
      .expect(422);
    expect(Object.keys(reply.body.errors)).toEqual(expect.arrayContaining(['email', 'password']));
  });
});
