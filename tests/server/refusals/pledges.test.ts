import { describe, expect, it } from 'vitest';
import { describeRights } from '#tests/support/rights.ts';
import { givePledge, makeSheetWorld, pledgeUrl } from '#tests/support/sheetWorld.ts';

const owned = [
  '/lines/:line/pledges/:member',
  '/proposals/:proposal',
  '/hazards',
  '/members/:member/paper',
].map((path) => `/clubs/:club/buys/:buy${path}`);

describeRights('pledges', (route) => owned.includes(route.path), {
  'PUT /clubs/:club/buys/:buy/lines/:line/pledges/:member': 'everyone',
  'POST /clubs/:club/buys/:buy/proposals/:proposal': 'everyone',
  'POST /clubs/:club/buys/:buy/hazards': 'everyone',
  'PUT /clubs/:club/buys/:buy/members/:member/paper': ['own'],
});

describe("somebody else's pledge", () => {
  const parts = ['member', 'organiser', 'treasurer', 'steward', 'helper', 'cashHelper'] as const;
  it.each(parts)('%s may not change', async (part) => {
    const world = await makeSheetWorld();
    await givePledge(world, world.people.own, world.plain, 100);
    const agent = await world.people[part].agent();
    const reply = await agent
      .put(pledgeUrl(world, world.plain, world.people.own))
      .send({ wantedMg: 0, upToMg: null, version: 1 })
      .expect(403);
    expect(reply.body.code).toBe('forbidden');
  });

  it('in a draft is not there', async () => {
    const world = await makeSheetWorld('draft');
    const { member, own } = world.people;
    const body = { wantedMg: 1000, upToMg: null, version: 0 };
    await (
      await member.agent()
    )
      .put(pledgeUrl(world, world.plain, member))
      .send(body)
      .expect(404);
    const reply = await (
      await own.agent()
    )
      .put(pledgeUrl(world, world.plain, own))
      .send(body)
      .expect(409);
    expect(reply.body.code).toBe('wrong_state');
  });
});
