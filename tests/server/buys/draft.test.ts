import { beforeAll, describe, expect, it } from 'vitest';
import { BuyHeader } from '#shared/schemas/buys.ts';
import { TermsReply } from '#shared/schemas/buyTerms.ts';
import { select, execute, transact } from '#server/config/database.ts';
import type { Agent } from '#tests/support/client.ts';
import { makeWorld, type World } from '#tests/support/world.ts';
import { makeOffer, makeSupplier } from '#tests/support/offers.ts';

let world: World;
let own: Agent;
let base: string;

beforeAll(async () => {
  world = await makeWorld('draft');
  own = await world.people.own.agent();
  base = `/api/v1/clubs/${world.club.slug}/buys`;
});

const draft = async () => BuyHeader.parse((await own.post(base).send({}).expect(201)).body);

describe('drafting a buy', () => {
  it('starts with sensible defaults', async () => {
    await world.club.update({ placeAddress: 'Quillmere library, room 2' });
    const head = await draft();
    expect(head).toMatchObject({
      state: 'draft',
      place: 'Quillmere library, room 2',
      minimumKind: 'none',
      priceLimitPermille: 100,
      dueDays: 5,
      loweringFreezeHours: 24,
      leftOverPayer: 'members',
      spreadMaxPermille: 100,
      unclaimedDays: 60,
      next: { code: 'add_lines', who: 'you' },
    });
    expect(head.name).toMatch(/^[A-Z][a-z]+ salts \d{4}/);
    const zone = { timeZone: 'Europe/Berlin', hour12: false } as const;
    const closes = new Date(head.closesAt ?? '');
    expect(closes.toLocaleTimeString('en-GB', zone)).toBe('20:00:00');
    const splits = new Date(head.splitsAt ?? '');
    expect(splits.toLocaleDateString('en-GB', { ...zone, weekday: 'short' })).toBe('Sat');
    expect(splits.toLocaleTimeString('en-GB', zone)).toBe('14:00:00');
    const again = await draft();
    expect(again.name).not.toBe(head.name);
  });

  it('saves fields one by one and counts the versions', async () => {
    const head = await draft();
    const url = `${base}/${head.id}/terms`;
    const first = await own
      .patch(url)
      .send({ termsVersion: head.termsVersion, name: 'Winter salts' });
    const saved = TermsReply.parse(first.body);
    expect(saved.head).toMatchObject({ name: 'Winter salts', termsVersion: head.termsVersion + 1 });
    expect(saved.effect).toMatchObject({ told: 0 });
    const stale = await own.patch(url).send({ termsVersion: head.termsVersion, dueDays: 7 });
    expect(stale.status).toBe(409);
    expect(stale.body).toMatchObject({ code: 'stale', current: { termsVersion: 2 } });
    expect(stale.body.detail).toContain('Winter salts');
  });

  it('changes nothing and no version when nothing differs', async () => {
    const head = await draft();
    const reply = await own
      .patch(`${base}/${head.id}/terms`)
      .send({ termsVersion: head.termsVersion, dueDays: head.dueDays })
      .expect(200);
    expect(TermsReply.parse(reply.body)).toMatchObject({
      effect: null,
      head: { termsVersion: head.termsVersion },
    });
  });

  it('bounds what the shelf may be charged by the limit of the treasurer', async () => {
    const head = await draft();
    await world.club.update({ shelfLimitMinor: 2000 });
    const over = await own
      .patch(`${base}/${head.id}/terms`)
      .send({ termsVersion: 1, leftOverPayer: 'shelf', shelfLimitMinor: 2001 });
    expect(over.status).toBe(422);
    expect(over.body.errors.shelfLimitMinor).toContain('20.00');
    await own
      .patch(`${base}/${head.id}/terms`)
      .send({ termsVersion: 1, leftOverPayer: 'shelf', shelfLimitMinor: 2000 })
      .expect(200);
  });

  it.each([
    ['dueDays', 91],
    ['priceLimitPermille', 1001],
    ['spreadMaxPermille', 101],
    ['unclaimedDays', 0],
    ['name', '  '],
    ['closesAt', 'tomorrow'],
  ])('refuses %s = %s at its field', async (field, value) => {
    const head = await draft();
    const reply = await own
      .patch(`${base}/${head.id}/terms`)
      .send({ termsVersion: 1, [field]: value });
    expect(reply.status).toBe(422);
    expect(Object.keys(reply.body.errors)).toEqual([field]);
  });
});

describe('lines', () => {
  it('takes all living offers of a salt, and refuses what may not be a line', async () => {
    const head = await draft();
    const supplier = await makeSupplier(world.club, 'Marlbrook Salts');
    const sack = await makeOffer(supplier, 'KNO3', 25_000_000, 9500);
    const url = `${base}/${head.id}/lines`;
    const reply = await own.post(url).send({ termsVersion: 1, saltId: 'KNO3' }).expect(201);
    const { terms } = TermsReply.parse(reply.body);
    expect(terms.lines).toHaveLength(1);
    expect(terms.lines[0]).toMatchObject({
      name: 'Potassium nitrate',
      stepMg: 1000,
      reservePermyriad: 50,
      surplus: 'spread',
      shortage: 'scale',
      reportable: true,
      offerIds: [sack.id],
    });
    expect(terms.blocks).toEqual({});

    const twice = await own.post(url).send({ termsVersion: 2, saltId: 'KNO3' });
    expect(twice.status).toBe(422);
    expect(twice.body.errors).toHaveProperty('saltId');
    const boric = await own.post(url).send({ termsVersion: 2, saltId: 'H3BO3' });
    expect(boric).toMatchObject({ status: 422, body: { code: 'not_a_line' } });
    const unknown = await own.post(url).send({ termsVersion: 2, saltId: 'no such salt' });
    expect(unknown.status).toBe(422);
    const mixed = await own.put(`${url}/${terms.lines[0]?.id}`).send({
      termsVersion: 2,
      stepMg: 1000,
      reservePermyriad: 50,
      surplus: 'spread',
      shortage: 'scale',
      note: '',
      anyOfSupplierId: supplier,
      offerIds: [sack.id],
    });
    expect(mixed.status).toBe(422);
    expect(mixed.body.errors).toHaveProperty('offerIds');
  });

  it('takes a line out of a draft and puts it back', async () => {
    const head = await draft();
    const url = `${base}/${head.id}/lines`;
    const added = await own.post(url).send({ termsVersion: 1, saltId: 'K2SO4' }).expect(201);
    const line = TermsReply.parse(added.body).terms.lines[0];
    const gone = await own.delete(`${url}/${line?.id}`).send({ termsVersion: 2 }).expect(200);
    expect(TermsReply.parse(gone.body).terms.lines).toEqual([]);
    const back = await own.post(`${url}/${line?.id}/restore`).send({ termsVersion: 3 }).expect(200);
    expect(TermsReply.parse(back.body).terms.lines).toHaveLength(1);
  });

  it('puts lines in order and refuses an order of other lines', async () => {
    const head = await draft();
    const url = `${base}/${head.id}/lines`;
    await own.post(url).send({ termsVersion: 1, saltId: 'K2SO4' }).expect(201);
    const added = await own.post(url).send({ termsVersion: 2, saltId: 'KH2PO4' }).expect(201);
    const ids = TermsReply.parse(added.body).terms.lines.map(({ id }) => id);
    const turned = [...ids].reverse();
    const reply = await own
      .put(`${url}/order`)
      .send({ termsVersion: 3, lineIds: turned })
      .expect(200);
    expect(TermsReply.parse(reply.body).terms.lines.map(({ id }) => id)).toEqual(turned);
    await own
      .put(`${url}/order`)
      .send({ termsVersion: 4, lineIds: ids.slice(1) })
      .expect(422);
  });
});

describe('charges', () => {
  const freight = {
    kind: 'freight',
    name: 'Freight',
    amountMinor: 1800,
    basis: 'mass',
    supplierId: null,
    lineIds: null,
    taxRatePpm: 0,
  };

  it('adds, changes, removes and restores', async () => {
    const head = await draft();
    const url = `${base}/${head.id}/charges`;
    const added = await own
      .post(url)
      .send({ termsVersion: 1, ...freight })
      .expect(201);
    const id = TermsReply.parse(added.body).terms.sheet.charges[0]?.id;
    const changed = await own
      .put(`${url}/${id}`)
      .send({ termsVersion: 2, ...freight, amountMinor: 2400 })
      .expect(200);
    expect(TermsReply.parse(changed.body).terms.sheet.charges[0]?.amountMinor).toBe(2400);
    const gone = await own.delete(`${url}/${id}`).send({ termsVersion: 3 }).expect(200);
    expect(TermsReply.parse(gone.body).terms.sheet.charges).toEqual([]);
    await own.post(`${url}/${id}/restore`).send({ termsVersion: 4 }).expect(200);
  });

  it.each([
    ['amountMinor', { amountMinor: -1 }],
    ['amountMinor', { kind: 'rebate' }],
    ['amountMinor', { amountMinor: 0 }],
    ['name', { name: '' }],
    ['supplierId', { supplierId: '00000000-0000-4000-8000-000000000000' }],
    ['lineIds', { lineIds: ['00000000-0000-4000-8000-000000000000'] }],
  ])('refuses at %s: %o', async (field, change) => {
    const head = await draft();
    const reply = await own
      .post(`${base}/${head.id}/charges`)
      .send({ termsVersion: 1, ...freight, ...change });
    expect(reply.status).toBe(422);
    expect(reply.body.errors).toHaveProperty(field);
  });
});

describe('opening', () => {
  async function ready(): Promise<BuyHeader> {
    const head = await draft();
    const supplier = await makeSupplier(world.club, `Supplier of ${head.name}`);
    await makeOffer(supplier, 'MgSO4.7H2O', 25_000_000, 3500);
    const reply = await own
      .post(`${base}/${head.id}/lines`)
      .send({ termsVersion: 1, saltId: 'MgSO4.7H2O' })
      .expect(201);
    return TermsReply.parse(reply.body).head;
  }

  it('refuses with the reason at each field', async () => {
    const head = await draft();
    const url = `${base}/${head.id}`;
    const hour = 3_600_000;
    const at = (ms: number) => new Date(Date.now() + ms).toISOString();
    await own
      .patch(`${url}/terms`)
      .send({ termsVersion: 1, closesAt: at(-hour), splitsAt: at(-2 * hour), minimumKind: 'mass' })
      .expect(200);
    const reply = await own.post(`${url}/open`).send({ termsVersion: 2 });
    expect(reply.status).toBe(422);
    expect(Object.keys(reply.body.errors).sort()).toEqual([
      'closesAt',
      'lines',
      'minimumAmount',
      'splitsAt',
    ]);
  });

  it('opens once when two ask at once, and tells every member with a calendar file', async () => {
    const head = await ready();
    const { termsVersion } = head;
    const url = `${base}/${head.id}/open`;
    const replies = await Promise.all([
      own.post(url).send({ termsVersion }),
      own.post(url).send({ termsVersion }),
    ]);
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
    const mails = await select<{ address: string; attachments: { text: string }[] }>(
      "select address, attachments from outbox where buy_id = :buyId and kind = 'buy_opened'",
      { buyId: head.id },
    );
    expect(mails).toHaveLength(7);
    expect(mails[0]?.attachments[0]?.text).toContain('BEGIN:VEVENT');
    const member = await world.people.member.agent();
    const seen = BuyHeader.parse((await member.get(`${base}/${head.id}`).expect(200)).body);
    expect(seen).toMatchObject({ state: 'open', changes: [] });
  });

  it('discards a draft and takes it up again', async () => {
    const head = await draft();
    const url = `${base}/${head.id}`;
    const gone = await own.delete(url).send({ termsVersion: 1 }).expect(200);
    expect(BuyHeader.parse(gone.body)).toMatchObject({
      state: 'cancelled',
      may: { restore: true },
    });
    await (await world.people.member.agent()).get(url).expect(404);
    const back = await own.post(`${url}/restore`).send({}).expect(200);
    expect(BuyHeader.parse(back.body).state).toBe('draft');
    await own.post(`${url}/cancel`).send({ termsVersion: 3, reason: 'no need' }).expect(409);
  });

  it('copies lines, living offers, charges and policies with new dates', async () => {
    const head = await ready();
    const url = `${base}/${head.id}`;
    await own
      .patch(`${url}/terms`)
      .send({
        termsVersion: head.termsVersion,
        dueDays: 9,
        minimumKind: 'members',
        minimumAmount: 4,
      })
      .expect(200);
    const copy = BuyHeader.parse((await own.post(`${url}/copies`).send({}).expect(201)).body);
    expect(copy).toMatchObject({
      state: 'draft',
      dueDays: 9,
      minimumKind: 'members',
      minimumAmount: 4,
      copiedFrom: { id: head.id },
      counts: { lines: 1 },
    });
    const terms = await own.get(`${base}/${copy.id}/terms`).expect(200);
    expect(terms.body.lines[0].offerIds.length).toBeGreaterThan(0);
    await transact((tx) => execute('update offers set archived_at = now()', {}, tx));
    const later = BuyHeader.parse((await own.post(`${url}/copies`).send({}).expect(201)).body);
    const bare = await own.get(`${base}/${later.id}/terms`).expect(200);
    expect(bare.body.lines[0].offerIds).toEqual([]);
    expect(bare.body.blocks).toHaveProperty(`lines.${bare.body.lines[0].id}.offers`);
  });
});
