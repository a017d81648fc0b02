import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { testPassword } from '#tests/support/client.ts';
import { closed, listen } from '#tests/support/live.ts';
import { makeWorld, type World } from '#tests/support/world.ts';

describe('sockets of who may no longer listen', () => {
  let live: Awaited<ReturnType<typeof listen>>;
  let world: World;
  beforeAll(async () => {
    live = await listen();
    world = await makeWorld('open');
  });
  afterAll(() => live.close());

  const room = () => ({ club: world.club.slug, buy: world.buy.id });
  const members = () => `/clubs/${world.club.slug}/members`;

  it('close when a member is removed, who then joins no room', async () => {
    const { member, steward } = world.people;
    const browser = await live.signIn(member.email);
    const client = await live.open(browser.cookie);
    expect(await client.emitWithAck('buy:join', room())).toMatchObject({ ok: true });
    const end = closed(client);
    const acting = await live.signIn(steward.email);
    const reply = await acting.call('DELETE', `${members()}/${member.membership.id}`);
    expect(reply.status).toBe(200);
    await end;
    const again = await live.open(browser.cookie);
    expect(await again.emitWithAck('buy:join', room())).toEqual({ ok: false, code: 'not_found' });
  });

  it('close when a role is lost, but not when one is given', async () => {
    const { organiser, steward } = world.people;
    const client = await live.open((await live.signIn(organiser.email)).cookie);
    const acting = await live.signIn(steward.email);
    const roles = { organiser: true, treasurer: true, steward: false };
    const url = `${members()}/${organiser.membership.id}/roles`;
    await acting.call('PUT', url, { roles, version: 1 });
    expect(client.connected).toBe(true);
    const end = closed(client);
    await acting.call('PUT', url, { roles: { ...roles, treasurer: false }, version: 2 });
    await end;
  });

  it('close elsewhere when the password is changed, but not here', async () => {
    const { member } = world.people;
    const [here, elsewhere] = [await live.signIn(member.email), await live.signIn(member.email)];
    const [stays, goes] = [await live.open(here.cookie), await live.open(elsewhere.cookie)];
    const end = closed(goes);
    const body = { current: testPassword, password: 'rain on the greenhouse roof' };
    expect((await here.call('PUT', '/account/password', body)).status).toBe(200);
    await end;
    expect(stays.connected).toBe(true);
  });

  it('close in every place at sign-out everywhere, and in one place at sign-out', async () => {
    const { treasurer } = world.people;
    const [one, two] = [await live.signIn(treasurer.email), await live.signIn(treasurer.email)];
    const [first, second] = [await live.open(one.cookie), await live.open(two.cookie)];
    const ended = closed(first);
    await one.call('DELETE', '/session');
    await ended;
    expect(second.connected).toBe(true);
    const three = await live.signIn(treasurer.email);
    const end = closed(second);
    await three.call('DELETE', '/account/sessions');
    await end;
    await expect(live.open(two.cookie)).rejects.toThrow('signed_out');
  });
});
