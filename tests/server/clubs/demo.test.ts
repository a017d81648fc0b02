import { describe, expect, it, vi } from 'vitest';
import { browser } from '#tests/support/client.ts';
import { makeAccount, makeClub, makeGuest, makeMember } from '#tests/support/world.ts';

vi.hoisted(() => {
  process.env.TAREWELL_DEMO = '1';
});

describe('one-click demo sign-in', () => {
  it("lists the largest demo club's people with their roles and signs in those alone", async () => {
    const demo = await makeClub({ name: 'Demo club' });
    const small = await makeClub({ name: 'Small demo club' });
    const real = await makeClub({ name: 'Real club' });
    await demo.update({ isDemo: true });
    await small.update({ isDemo: true });
    const steward = await makeMember(demo, 'Stig', ['steward', 'treasurer']);
    const member = await makeMember(demo, 'Mo');
    await makeMember(small, 'Small', ['organiser']);
    await makeMember(demo, 'Asks', [], 'pending');
    await makeGuest(demo, 'Guest', steward);
    const outsider = await makeMember(real, 'Outsider', ['steward']);
    const { body } = await browser().get('/api/v1/session/demo').expect(200);
    expect(body.people).toEqual([
      { email: member.email, name: 'Mo', clubName: 'Demo club', roles: [] },
      {
        email: steward.email,
        name: 'Stig',
        clubName: 'Demo club',
        roles: ['treasurer', 'steward'],
      },
    ]);
    const agent = browser();
    await agent.post('/api/v1/session/demo').send({ email: steward.email }).expect(200);
    expect((await agent.get('/api/v1/session')).body.account.email).toBe(steward.email);
    for (const email of [outsider.email, (await makeAccount('Nobody')).email]) {
      await browser().post('/api/v1/session/demo').send({ email }).expect(404);
    }
  });
});
