import { describe, expect, it } from 'vitest';
import { Buy } from '#server/models/Buy.ts';
import { Club } from '#server/models/Club.ts';
import { Line } from '#server/models/Line.ts';
import { Pledge } from '#server/models/Pledge.ts';
import { plansSettled, requestPlan } from '#server/services/sheet/planning.ts';
import { estimateOf } from '#shared/domain/buys/requests.ts';
import { MySheet, SheetChanges, SheetReply } from '#shared/schemas/sheet.ts';
import type { Agent } from '#tests/support/client.ts';
import {
  givePledge,
  makeSheetWorld,
  pledgeUrl,
  type SheetWorld,
} from '#tests/support/sheetWorld.ts';

const read = async (agent: Agent, world: SheetWorld) =>
  SheetReply.parse((await agent.get(`${world.url}/sheet`).expect(200)).body);

async function planned(world: SheetWorld): Promise<void> {
  requestPlan(world.buy.id);
  await plansSettled();
}

describe('reading the sheet', () => {
  it('shows terms, all pledges and the plan', async () => {
    const world = await makeSheetWorld();
    await givePledge(world, world.people.member, world.line, 1200, 1500);
    await givePledge(world, world.people.treasurer, world.plain, 400);
    await planned(world);
    const sheet = await read(await world.people.steward.agent(), world);
    expect(sheet.reader).toBe('full');
    expect(
      sheet.terms.lines.map(({ saltId, salt }) => [saltId, salt.classified, salt.reportable]),
    ).toEqual([
      ['KNO3', true, true],
      ['MgSO4.7H2O', false, false],
    ]);
    expect(sheet.terms.lines[0]?.salt.cautions[0]?.tone).toBe('danger');
    expect(sheet.terms.offers).toHaveLength(3);
    expect(
      sheet.members.map(({ name, pledges }) => [name, pledges.map((cells) => cells.slice(0, 4))]),
    ).toEqual([
      ['Member Mo', [[0, 1_200_000, 1_500_000, 1]]],
      ['Treasurer Tam', [[1, 400_000, null, 1]]],
    ]);
    expect(sheet.plan).toMatchObject({
      forVersion: world.buy.sheetVersion,
      plan: {
        feasible: true,
        exact: true,
        packs: { [world.offers.small]: 2, [world.offers.plain]: 1 },
        totalMinor: 3650,
      },
    });
    expect(sheet.organisers).toEqual([
      { membershipId: world.people.own.membership.id, name: 'Own Organiser' },
    ]);
    expect(JSON.stringify(sheet)).not.toMatch(/email|paid|balance/i);
  });

  it('answers 304 to its own version and new bytes after a change', async () => {
    const world = await makeSheetWorld();
    const agent = await world.people.member.agent();
    const first = await agent.get(`${world.url}/sheet`).expect(200);
    const etag = first.headers.etag ?? '';
    expect(etag).toMatch(new RegExp(`^"${world.buy.sheetVersion}--1-full-`));
    await agent.get(`${world.url}/sheet`).set('If-None-Match', etag).expect(304);
    await agent
      .put(pledgeUrl(world, world.plain, world.people.member))
      .send({ wantedMg: 5000, upToMg: null, version: 0 })
      .expect(200);
    const second = await agent.get(`${world.url}/sheet`).set('If-None-Match', etag).expect(200);
    expect(SheetReply.parse(second.body).members).toHaveLength(1);
    await plansSettled();
    const third = await read(agent, world);
    expect(third.plan?.forVersion).toBe(third.sheetVersion);
  });

  it('sends the same bytes plain and packed', async () => {
    const world = await makeSheetWorld();
    await givePledge(world, world.people.member, world.plain, 400);
    const agent = await world.people.member.agent();
    const plain = await agent.get(`${world.url}/sheet`).set('Accept-Encoding', 'identity');
    const packed = await agent.get(`${world.url}/sheet`).set('Accept-Encoding', 'gzip');
    expect(plain.headers['content-encoding']).toBeUndefined();
    expect(packed.headers['content-encoding']).toBe('gzip');
    expect(packed.text).toBe(plain.text);
  });

  it('leaves out pledges that were dropped and lines that were removed', async () => {
    const world = await makeSheetWorld();
    const gone = await givePledge(world, world.people.member, world.line, 100);
    await gone.update({ droppedAt: new Date() });
    await givePledge(world, world.people.treasurer, world.plain, 100);
    await Line.update({ removedAt: new Date() }, { where: { id: world.plain.id } });
    const sheet = await read(await world.people.own.agent(), world);
    expect(sheet.members).toEqual([]);
    expect(sheet.terms.lines).toHaveLength(1);
  });

  it('is for the organisers alone while it is a draft', async () => {
    const world = await makeSheetWorld('draft');
    await (await world.people.member.agent()).get(`${world.url}/sheet`).expect(404);
    await read(await world.people.own.agent(), world);
  });
});

describe('a club that shows only the total of a reportable salt', () => {
  async function hiding() {
    const world = await makeSheetWorld();
    await Club.update({ hideReportableGrams: true }, { where: { id: world.club.id } });
    const { member, treasurer } = world.people;
    await givePledge(world, member, world.line, 1200, 1500);
    await givePledge(world, treasurer, world.line, 300);
    await givePledge(world, treasurer, world.plain, 250);
    await planned(world);
    return world;
  }

  it('gives members totals, and their own grams and share apart', async () => {
    const world = await hiding();
    const agent = await world.people.member.agent();
    const sheet = await read(agent, world);
    expect(sheet.reader).toBe('totals');
    expect(sheet.members.map(({ name, pledges }) => [name, pledges.length])).toEqual([
      ['Treasurer Tam', 1],
    ]);
    expect(sheet.totals).toEqual([
      { lineId: world.line.id, wantedMg: 1_500_000, roomMg: 300_000, members: 2 },
    ]);
    const mine = MySheet.parse((await agent.get(`${world.url}/sheet/mine`)).body);
    expect(mine.pledges[0]).toMatchObject({ lineId: world.line.id, wantedMg: 1_200_000 });
    expect(mine.share?.totalMinor).toBeGreaterThan(0);
  });

  it('shows its organiser and stewards every gram', async () => {
    const world = await hiding();
    for (const person of [world.people.own, world.people.steward]) {
      const sheet = await read(await person.agent(), world);
      expect(sheet).toMatchObject({ reader: 'full', totals: [] });
      expect(sheet.members).toHaveLength(2);
    }
    const other = await read(await world.people.organiser.agent(), world);
    expect(other.reader).toBe('totals');
  });

  it('tells members nothing more by way of changes', async () => {
    const world = await hiding();
    const agent = await world.people.steward.agent();
    const member = await world.people.helper.agent();
    const url = `${world.url}/changes?since=0&terms=${world.buy.termsVersion}`;
    const all = SheetChanges.parse((await agent.get(url).expect(200)).body);
    expect(all.whole === false && all.pledges.length).toBe(3);
    const few = SheetChanges.parse((await member.get(url).expect(200)).body);
    expect(few.whole && few.sheet.reader).toBe('totals');
  });
});

describe('changes since a version', () => {
  it('are the changed pledges alone, withdrawn ones as nothing', async () => {
    const world = await makeSheetWorld();
    const { member, treasurer } = world.people;
    await givePledge(world, treasurer, world.plain, 250);
    const agent = await member.agent();
    const since = world.buy.sheetVersion;
    const url = pledgeUrl(world, world.plain, member);
    await agent.put(url).send({ wantedMg: 5000, upToMg: null, version: 0 }).expect(200);
    await agent.put(url).send({ wantedMg: 0, upToMg: null, version: 1 }).expect(200);
    const query = `since=${since}&terms=${world.buy.termsVersion}`;
    const reply = await agent.get(`${world.url}/changes?${query}`).expect(200);
    expect(SheetChanges.parse(reply.body)).toMatchObject({
      whole: false,
      sheetVersion: since + 2,
      pledges: [{ name: 'Member Mo', wantedMg: 0, upToMg: null, version: 2 }],
    });
  });

  it('are the whole sheet after a change of terms, from the future, and beyond 200', async () => {
    const world = await makeSheetWorld();
    const agent = await world.people.member.agent();
    const ask = async (since: number, terms: number) =>
      SheetChanges.parse(
        (await agent.get(`${world.url}/changes?since=${since}&terms=${terms}`).expect(200)).body,
      ).whole;
    const { sheetVersion, termsVersion } = world.buy;
    expect(await ask(sheetVersion, termsVersion)).toBe(false);
    expect(await ask(sheetVersion, termsVersion + 1)).toBe(true);
    expect(await ask(sheetVersion + 9, termsVersion)).toBe(true);
    await agent.get(`${world.url}/changes`).expect(422);
    const lines = await Line.bulkCreate(
      Array.from({ length: 201 }, (_, index) => ({
        buyId: world.buy.id,
        saltId: `own-${index}`,
        position: index + 2,
      })),
    );
    await Pledge.bulkCreate(
      lines.map((line) => ({
        buyId: world.buy.id,
        lineId: line.id,
        membershipId: world.people.own.membership.id,
        wantedMg: 1000,
        at: new Date(),
        changedSheetVersion: 7,
      })),
    );
    await Buy.update({ sheetVersion: 8 }, { where: { id: world.buy.id } });
    expect(await ask(6, termsVersion)).toBe(true);
    expect(await ask(7, termsVersion)).toBe(false);
  });
});

describe('the plan', () => {
  it('follows in the background, once for changes that come together, and agrees with the browser', async () => {
    const world = await makeSheetWorld();
    const { member, own, treasurer, steward } = world.people;
    await Promise.all(
      [member, own, treasurer, steward].map(async (person, index) =>
        (await person.agent())
          .put(pledgeUrl(world, world.plain, person))
          .send({ wantedMg: (index + 1) * 1_000_000, upToMg: null, version: 0 })
          .expect(200),
      ),
    );
    await plansSettled();
    const sheet = await read(await member.agent(), world);
    expect(sheet.plan?.forVersion).toBe(sheet.sheetVersion);
    expect(sheet.plan?.plan.packs).toEqual({ [world.offers.plain]: 3 });
    const pledges = sheet.members.flatMap(({ membershipId, pledges: cells }) =>
      cells.map(([place, wantedMg, upToMg, version, at]) => ({
        membershipId,
        lineId: sheet.terms.lines[place]?.id ?? '',
        wantedMg,
        upToMg,
        version,
        at: new Date(at).toISOString(),
      })),
    );
    const estimate = sheet.plan && estimateOf(sheet.terms, pledges, sheet.plan.plan);
    expect(estimate?.totalMinor).toBe(3 * 1450 + 1000);
  });

  it('gives way to packs that the organiser chose, until they no longer cover the pledges', async () => {
    const world = await makeSheetWorld();
    const { member, own } = world.people;
    await givePledge(world, member, world.plain, 400);
    const organise = await own.agent();
    const put = (packs: Record<string, number> | null, termsVersion: number) =>
      organise.put(`${world.url}/packs`).send({ packs, termsVersion });
    const from = world.buy.termsVersion;
    const short = await put({ [world.offers.small]: 1 }, from).expect(422);
    expect(Object.keys(short.body.errors)).toEqual([`lines.${world.plain.id}`]);
    await put({ [crypto.randomUUID()]: 1 }, from).expect(422);
    await put({ [world.offers.plain]: 2 }, from).expect(200);
    await put(null, from).expect(409);
    await planned(world);
    const agent = await member.agent();
    expect((await read(agent, world)).planOverride).toEqual({ [world.offers.plain]: 2 });
    await agent
      .put(pledgeUrl(world, world.plain, member))
      .send({ wantedMg: 20_000_000, upToMg: null, version: 1 })
      .expect(200);
    await plansSettled();
    await planned(world);
    const after = await read(agent, world);
    expect(after.planOverride).toBeNull();
    expect(after.plan?.plan.packs).toEqual({ [world.offers.plain]: 5 });
  });
});
