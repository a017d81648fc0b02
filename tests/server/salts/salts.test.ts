import { beforeAll, describe, expect, it } from 'vitest';
import type { ClubSalt, SaltList } from '#shared/schemas/salts.ts';
import { saltsByIds } from '#server/services/salts/saltsOfClub.ts';
import type { Agent } from '#tests/support/client.ts';
import { makeWorld, type World } from '#tests/support/world.ts';

const mix = {
  kind: 'trace_mix',
  name: 'Reed Hill trace',
  formula: null,
  cas: null,
  compositionPpm: { Fe: 71_000, Mn: 18_000, B: 13_000, Cu: 1_000 },
  statements: ['H319', 'H410'],
  signalWord: null,
  storage: 'Dry and dark.',
  note: '',
};

let world: World;
let agent: Agent;
let url: string;

beforeAll(async () => {
  world = await makeWorld('open');
  agent = await world.people.steward.agent();
  url = `/api/v1/clubs/${world.club.slug}/salts`;
});

async function salts(): Promise<ClubSalt[]> {
  const { body } = await agent.get(url).expect(200);
  return (body as SaltList).salts;
}

describe('the club’s salts', () => {
  it('lists the shipped salts with what the rules of care say', async () => {
    const list = await salts();
    const of = (id: string) => list.find((salt) => salt.id === id);
    expect(list.filter((salt) => salt.source === 'catalogue')).toHaveLength(49);
    expect(of('KNO3')).toMatchObject({
      reportable: true,
      classified: true,
      lineRefusal: null,
      checkSheet: false,
    });
    expect(of('NH4NO3')?.lineRefusal).toContain('16 %');
    expect(of('5Ca(NO3)2.NH4NO3.10H2O')).toMatchObject({ reportable: true, lineRefusal: null });
    expect(of('H3BO3')?.lineRefusal).toContain('H360FD');
    expect(of('MgSO4.7H2O')).toMatchObject({ classified: false, checkSheet: true, pictograms: [] });
  });

  it('adds, changes, archives and brings back a mix of its own', async () => {
    const { body } = await agent.post(url).send(mix).expect(201);
    const salt = body as ClubSalt;
    expect(salt).toMatchObject({
      source: 'club',
      signalWord: 'Warning',
      pictograms: ['GHS07', 'GHS09'],
      version: 1,
    });
    await agent
      .put(`${url}/${salt.id}`)
      .send({ ...mix, note: 'Light pink', version: 1 })
      .expect(200);
    const stale = await agent
      .put(`${url}/${salt.id}`)
      .send({ ...mix, version: 1 })
      .expect(409);
    expect(stale.body).toMatchObject({ current: { version: 2, note: 'Light pink' } });
    await agent
      .post(url)
      .send({ ...mix, name: 'reed hill TRACE' })
      .expect(422);
    await agent.post(`${url}/${salt.id}/archive`).send({ version: 2 }).expect(200);
    await agent.post(url).send(mix).expect(201);
    const taken = await agent.post(`${url}/${salt.id}/restore`).send({ version: 3 }).expect(422);
    expect(taken.body).toMatchObject({ errors: { name: expect.any(String) } });
  });

  it.each([
    [{ kind: 'salt' }, 'formula'],
    [{ formula: 'MgSO4.7H2' + 'X' }, 'formula'],
    [{ cas: '7757-79-2' }, 'cas'],
    [{ cas: 'abc' }, 'cas'],
    [{ compositionPpm: {} }, 'compositionPpm'],
    [{ compositionPpm: { Fe: 600_000, Mn: 500_000 } }, 'compositionPpm'],
    [{ compositionPpm: { N: 200_000, K: 100_000 } }, 'compositionPpm.NO3'],
    [{ compositionPpm: { N: 10_000, NO3: 200_000, NH4: 0 } }, 'compositionPpm.N'],
    [{ compositionPpm: { Xx: 1 } }, 'compositionPpm'],
    [{ statements: ['H999'] }, 'statements'],
    [{ statements: ['H272'], signalWord: null }, 'signalWord'],
    [{ name: ' ' }, 'name'],
  ])('refuses %j at %s', async (wrong, field) => {
    const { body } = await agent
      .post(url)
      .send({ ...mix, name: 'Wrong', ...wrong })
      .expect(422);
    expect(Object.keys((body as { errors: object }).errors).join()).toContain(field);
  });

  it.each([
    ['by CAS number', { kind: 'salt', cas: '6484-52-2' }],
    ['by formula', { kind: 'salt', formula: 'NH4NO3' }],
    ['by composition', { compositionPpm: { N: 350_000, NO3: 774_000, NH4: 225_000 } }],
    ['as cobalt', { kind: 'salt', formula: 'CoCl2', compositionPpm: {} }],
  ])('keeps a salt that can’t be a line, and says so: %s', async (how, fields) => {
    const own = { ...mix, name: `Own ${how}`, statements: [], ...fields };
    const { body } = await agent.post(url).send(own).expect(201);
    expect((body as ClubSalt).lineRefusal).toContain(`Own ${how}`);
  });

  it('hides and shows salts, as often as asked', async () => {
    const id = encodeURIComponent('5Ca(NO3)2.NH4NO3.10H2O');
    for (const hidden of [true, true, false]) {
      const { body } = await agent.put(`${url}/${id}/hidden`).send({ hidden }).expect(200);
      expect(body).toMatchObject({ hidden });
    }
    await agent.put(`${url}/Unobtainium/hidden`).send({ hidden: true }).expect(404);
    await agent
      .put(`${url}/KNO3`)
      .send({ ...mix, version: 0 })
      .expect(404);
  });

  it('does not find another club’s own salt', async () => {
    const own = (await salts()).find((salt) => salt.source === 'club');
    const elsewhere = await saltsByIds(world.people.stranger.membership.clubId, [
      own?.id ?? '',
      'KNO3',
    ]);
    expect([...elsewhere.keys()]).toEqual(['KNO3']);
  });
});
