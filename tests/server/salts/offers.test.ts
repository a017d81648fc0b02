import { beforeAll, describe, expect, it } from 'vitest';
import type { Offer, Supplier } from '#shared/schemas/suppliers.ts';
import { execute, select, transact } from '#server/config/database.ts';
import { Buy } from '#server/models/Buy.ts';
import { Pledge } from '#server/models/Pledge.ts';
import type { Agent } from '#tests/support/client.ts';
import { makeWorld, type World } from '#tests/support/world.ts';

const shipping = {
  kind: 'byMass',
  steps: [
    { upTo: 5_000_000, minor: 690 },
    { upTo: null, minor: 1290 },
  ],
};
const supplierBody = {
  name: 'Brook & Stone',
  contact: '',
  email: '',
  website: '',
  note: '',
  shipping,
  freeShippingFromMinor: 20_000,
  minimumOrderMinor: null,
};
const offerBody = {
  saltId: 'KNO3',
  label: '',
  packMg: 25_000_000,
  priceMinor: 8400,
  priceIncludesTax: true,
  taxRatePpm: 190_000,
  stockPacks: null,
  multipleOf: 1,
  link: '',
};

let world: World;
let agent: Agent;
let base: string;

beforeAll(async () => {
  world = await makeWorld('open');
  agent = await world.people.organiser.agent();
  base = `/api/v1/clubs/${world.club.slug}`;
});

async function add(name: string): Promise<Supplier> {
  const reply = await agent
    .post(`${base}/suppliers`)
    .send({ ...supplierBody, name })
    .expect(201);
  return reply.body as Supplier;
}

describe('suppliers', () => {
  it('keeps what was filled in and refuses a name twice', async () => {
    const supplier = await add('First supplier');
    expect(supplier).toMatchObject({
      shipping,
      freeShippingFromMinor: 20_000,
      offers: 0,
      version: 1,
    });
    const twice = await agent
      .post(`${base}/suppliers`)
      .send({ ...supplierBody, name: 'first SUPPLIER' })
      .expect(422);
    expect(twice.body).toMatchObject({ errors: { name: expect.stringContaining('already') } });
  });

  it.each([
    [{ name: '' }, 'name'],
    [{ email: 'no address' }, 'email'],
    [{ website: 'javascript:alert(1)' }, 'website'],
    [{ minimumOrderMinor: -1 }, 'minimumOrderMinor'],
    [{ shipping: { kind: 'flat', minor: 1.5 } }, 'shipping.minor'],
    [{ shipping: { kind: 'byMass', steps: [] } }, 'shipping.steps'],
    [
      {
        shipping: {
          kind: 'byValue',
          steps: [
            { upTo: 500, minor: 1 },
            { upTo: 500, minor: 2 },
          ],
        },
      },
      'shipping.steps.1.upTo',
    ],
    [
      {
        shipping: {
          kind: 'byMass',
          steps: [
            { upTo: null, minor: 1 },
            { upTo: 500, minor: 2 },
          ],
        },
      },
      'shipping.steps.0.upTo',
    ],
  ])('refuses %j at %s', async (wrong, field) => {
    const reply = await agent
      .post(`${base}/suppliers`)
      .send({ ...supplierBody, name: 'Wrong', ...wrong })
      .expect(422);
    expect(Object.keys((reply.body as { errors: object }).errors)).toContain(field);
  });

  it('answers 409 with the newest to a stale change, archives and brings back', async () => {
    const supplier = await add('Archived supplier');
    const url = `${base}/suppliers/${supplier.id}`;
    const changed = { ...supplierBody, name: 'Archived supplier', note: 'Closed on Mondays' };
    await agent
      .put(url)
      .send({ ...changed, version: 1 })
      .expect(200);
    const stale = await agent
      .put(url)
      .send({ ...changed, note: 'Other', version: 1 })
      .expect(409);
    expect(stale.body).toMatchObject({
      code: 'stale',
      current: { version: 2, note: 'Closed on Mondays' },
    });
    const gone = await agent.post(`${url}/archive`).send({ version: 2 }).expect(200);
    expect((gone.body as Supplier).archivedAt).not.toBeNull();
    await agent.post(`${url}/offers`).send(offerBody).expect(409);
    const back = await agent.post(`${url}/restore`).send({ version: 3 }).expect(200);
    expect(back.body).toMatchObject({ archivedAt: null, version: 4 });
  });

  it('leaves the shelf alone', async () => {
    const [shelf] = await select<{ id: string }>(
      `insert into suppliers (club_id, name, is_shelf, shipping)
       values (:clubId, 'Shelf', true, '{"kind":"flat","minor":0}') returning id`,
      { clubId: world.club.id },
    );
    const url = `${base}/suppliers/${shelf?.id}`;
    await agent
      .put(url)
      .send({ ...supplierBody, version: 1 })
      .expect(403);
    await agent.post(`${url}/archive`).send({ version: 1 }).expect(403);
    await agent.post(`${url}/offers`).send(offerBody).expect(403);
    const page = await agent.get(url).expect(200);
    expect(page.body).toMatchObject({ may: { edit: false } });
  });
});

describe('offers', () => {
  it('keeps every price an offer had, with who set it', async () => {
    const supplier = await add('Price supplier');
    const offers = `${base}/suppliers/${supplier.id}/offers`;
    const { body: offer } = await agent.post(offers).send(offerBody).expect(201);
    const url = `${offers}/${(offer as Offer).id}`;
    await agent
      .put(url)
      .send({ ...offerBody, link: 'https://brook.example/kno3', version: 1 })
      .expect(200);
    await agent
      .put(url)
      .send({ ...offerBody, priceMinor: 9100, version: 2 })
      .expect(200);
    const { body } = await agent.get(`${url}/prices`).expect(200);
    expect(
      (body as { prices: { priceMinor: number }[] }).prices.map((one) => one.priceMinor),
    ).toEqual([9100, 8400]);
    expect(body).toMatchObject({
      prices: [{ setBy: 'Organiser Ola' }, { setBy: 'Organiser Ola' }],
    });
    await agent
      .put(url)
      .send({ ...offerBody, priceMinor: 1, version: 2 })
      .expect(409);
  });

  it.each([
    [{ saltId: 'Unobtainium' }, 'saltId'],
    [{ packMg: 0 }, 'packMg'],
    [{ priceMinor: -1 }, 'priceMinor'],
    [{ taxRatePpm: 1_000_001 }, 'taxRatePpm'],
    [{ stockPacks: -1 }, 'stockPacks'],
    [{ multipleOf: 0 }, 'multipleOf'],
    [{ link: 'brook.example' }, 'link'],
  ])('refuses %j at %s', async (wrong, field) => {
    const { body } = await agent.get(`${base}/suppliers`).expect(200);
    const supplier = (body as { suppliers: Supplier[] }).suppliers.find(
      (one) => one.name === 'Price supplier',
    );
    const reply = await agent
      .post(`${base}/suppliers/${supplier?.id}/offers`)
      .send({ ...offerBody, label: 'wrong', ...wrong })
      .expect(422);
    expect(Object.keys((reply.body as { errors: object }).errors)).toEqual([field]);
  });

  it('refuses the same pack twice, also when one comes back', async () => {
    const supplier = await add('Twice supplier');
    const offers = `${base}/suppliers/${supplier.id}/offers`;
    const { body: first } = await agent.post(offers).send(offerBody).expect(201);
    await agent.post(offers).send(offerBody).expect(422);
    await agent
      .post(offers)
      .send({ ...offerBody, label: 'Prills' })
      .expect(201);
    const url = `${offers}/${(first as Offer).id}`;
    await agent.post(`${url}/archive`).send({ version: 1 }).expect(200);
    await agent.post(offers).send(offerBody).expect(201);
    const back = await agent.post(`${url}/restore`).send({ version: 2 }).expect(422);
    expect(back.body).toMatchObject({ errors: { label: expect.any(String) } });
    await agent
      .put(url)
      .send({ ...offerBody, version: 2 })
      .expect(409);
  });

  it('hides another club’s supplier', async () => {
    const stranger = await world.people.stranger.agent();
    const { body } = await stranger.get('/api/v1/session').expect(200);
    const other = (body as { memberships: { clubSlug: string }[] }).memberships[0]?.clubSlug;
    const supplier = await add('Secret supplier');
    await stranger.get(`/api/v1/clubs/${other}/suppliers/${supplier.id}`).expect(404);
    await stranger
      .put(`/api/v1/clubs/${other}/suppliers/${supplier.id}`)
      .send({ ...supplierBody, version: 1 })
      .expect(404);
  });
});

describe('a change under an open buy', () => {
  it('counts a change of terms, says what changed and tells who pledged', async () => {
    const supplier = await add('Open supplier');
    const offers = `${base}/suppliers/${supplier.id}/offers`;
    const { body } = await agent
      .post(offers)
      .send({ ...offerBody, label: 'Open' })
      .expect(201);
    const offer = body as Offer;
    await transact((tx) =>
      execute(
        'insert into line_offers (line_id, offer_id) values (:lineId, :offerId)',
        { lineId: world.line.id, offerId: offer.id },
        tx,
      ),
    );
    await Pledge.create({
      buyId: world.buy.id,
      lineId: world.line.id,
      membershipId: world.people.member.membership.id,
      wantedMg: 600_000,
      at: new Date(),
    });
    const before = await Buy.findByPk(world.buy.id, { rejectOnEmpty: true });
    const { body: again } = await agent.get(`${base}/suppliers/${supplier.id}`).expect(200);
    expect(again).toMatchObject({ offers: [{ openBuys: 1 }] });

    await agent
      .put(`${offers}/${offer.id}`)
      .send({ ...offerBody, label: 'Open', priceMinor: 9100, version: 1 })
      .expect(200);
    const after = await Buy.findByPk(world.buy.id, { rejectOnEmpty: true });
    expect(after.termsVersion).toBe(before.termsVersion + 1);
    expect(after.sheetVersion).toBe(before.sheetVersion + 1);
    const [change] = await select<{ summary: string }>(
      'select summary from terms_changes where buy_id = :buyId order by terms_version desc limit 1',
      { buyId: world.buy.id },
    );
    expect(change?.summary).toBe(
      'Price of 25 kg potassium nitrate (Open) at Open supplier rose from €84.00 to €91.00.'.replace(
        '25 kg',
        '25\u00a0kg',
      ),
    );
    const mails = await select<{ address: string }>(
      "select address from outbox where buy_id = :buyId and kind = 'terms_changed'",
      { buyId: world.buy.id },
    );
    expect(mails.map((mail) => mail.address)).toEqual([world.people.member.email]);

    // A link is no term.
    await agent
      .put(`${offers}/${offer.id}`)
      .send({
        ...offerBody,
        label: 'Open',
        priceMinor: 9100,
        link: 'https://brook.example',
        version: 2,
      })
      .expect(200);
    const same = await Buy.findByPk(world.buy.id, { rejectOnEmpty: true });
    expect(same.termsVersion).toBe(after.termsVersion);

    // A supplier's shipping is.
    await agent
      .put(`${base}/suppliers/${supplier.id}`)
      .send({
        ...supplierBody,
        name: 'Open supplier',
        shipping: { kind: 'flat', minor: 500 },
        version: 1,
      })
      .expect(200);
    const shipped = await Buy.findByPk(world.buy.id, { rejectOnEmpty: true });
    expect(shipped.termsVersion).toBe(after.termsVersion + 1);
  });

  it('lets changes of many offers at once follow one another', async () => {
    const supplier = await add('Busy supplier');
    const offers = `${base}/suppliers/${supplier.id}/offers`;
    await Promise.all(
      [1, 2, 3, 4, 5].map((n) =>
        agent
          .post(offers)
          .send({ ...offerBody, label: 'same' })
          .then(({ status }) => ({ n, status })),
      ),
    ).then((replies) => {
      expect(replies.filter(({ status }) => status === 201)).toHaveLength(1);
      expect(replies.filter(({ status }) => status === 422)).toHaveLength(4);
    });
  });
});
