import { beforeEach, describe, expect, it } from 'vitest';
import { BuyHeader } from '#shared/schemas/buys.ts';
import { TermsReply } from '#shared/schemas/buyTerms.ts';
import { execute, select, transact } from '#server/config/database.ts';
import { Pledge } from '#server/models/Pledge.ts';
import type { Agent } from '#tests/support/client.ts';
import { makeOffer, makeSupplier } from '#tests/support/offers.ts';
import { makeWorld, type World } from '#tests/support/world.ts';

let world: World;
let own: Agent;
let url: string;
let offer: { id: string };

/** An open buy in which the member wants 10 kg of potassium nitrate from a 25 kg sack. */
beforeEach(async () => {
  world = await makeWorld('open');
  own = await world.people.own.agent();
  url = `/api/v1/clubs/${world.club.slug}/buys/${world.buy.id}`;
  const supplier = await makeSupplier(world.club, 'Marlbrook Salts', 1000);
  offer = await makeOffer(supplier, 'KNO3', 25_000_000, 9500);
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
    wantedMg: 10_000_000,
    at: new Date(),
  });
});

const told = (kind: string) =>
  select<{ address: string; text_body: string }>(
    'select address, text_body from outbox where buy_id = :buyId and kind = :kind order by created_at',
    { buyId: world.buy.id, kind },
  );

const line = { reservePermyriad: 50, surplus: 'spread', shortage: 'scale', note: '' } as const;

describe('terms while people are in', () => {
  it('lists a change with its effect and tells everyone who pledged what they would pay', async () => {
    const charge = {
      kind: 'bags',
      name: 'Bags',
      amountMinor: 240,
      basis: 'member',
      supplierId: null,
      lineIds: null,
      taxRatePpm: 0,
    };
    const preview = await own
      .post(`${url}/charges`)
      .send({ termsVersion: 1, preview: true, ...charge })
      .expect(201);
    expect(TermsReply.parse(preview.body)).toMatchObject({
      effect: { told: 1, beforeMinor: 10_500, afterMinor: 10_740 },
      head: { termsVersion: 1 },
    });
    expect(await told('terms_changed')).toHaveLength(0);

    const saved = await own
      .post(`${url}/charges`)
      .send({ termsVersion: 1, ...charge })
      .expect(201);
    expect(TermsReply.parse(saved.body).head.changes[0]).toMatchObject({
      termsVersion: 2,
      by: 'Own Organiser',
    });
    const [mail] = await told('terms_changed');
    expect(mail?.address).toBe(world.people.member.email);
    expect(mail?.text_body).toMatch(/You would pay: €107\.40, before €105\.00/);
  });

  it('lets the portion step become only a divisor of itself', async () => {
    const put = (stepMg: number, termsVersion: number) =>
      own
        .put(`${url}/lines/${world.line.id}`)
        .send({ termsVersion, ...line, anyOfSupplierId: null, offerIds: [offer.id], stepMg });
    const coarser = await put(2000, 1);
    expect(coarser.status).toBe(422);
    expect(coarser.body.errors.stepMg).toContain('multiple');
    const finer = TermsReply.parse(await put(500, 1).then((reply) => reply.body));
    expect(finer.terms.lines[0]?.stepMg).toBe(500);
    expect(finer.effect?.summary).toContain('portions in steps of');
  });

  it('withdraws pledges of a line that leaves, with a notice', async () => {
    const supplier = await makeSupplier(world.club, 'Tidewell');
    await makeOffer(supplier, 'K2SO4', 5_000_000, 2000);
    await own.post(`${url}/lines`).send({ termsVersion: 1, saltId: 'K2SO4' }).expect(201);
    const reply = await own
      .delete(`${url}/lines/${world.line.id}`)
      .send({ termsVersion: 2 })
      .expect(200);
    expect(TermsReply.parse(reply.body).head.counts).toMatchObject({ lines: 1, members: 0 });
    const [pledge] = await Pledge.findAll({ where: { lineId: world.line.id } });
    expect(pledge).toMatchObject({ wantedMg: 10_000_000, version: 2 });
    expect(pledge?.droppedAt).not.toBeNull();
    const mails = await told('terms_changed');
    expect(mails.at(-1)?.text_body).toContain('Pledges on it are withdrawn');
  });

  it('keeps a line of an open buy from being without an offer', async () => {
    const bare = await own
      .put(`${url}/lines/${world.line.id}`)
      .send({ termsVersion: 1, ...line, stepMg: 1000, anyOfSupplierId: null, offerIds: [] });
    expect(bare.status).toBe(422);
    expect(bare.body.errors).toHaveProperty('offerIds');
    const unoffered = await own.post(`${url}/lines`).send({ termsVersion: 1, saltId: 'KH2PO4' });
    expect(unoffered.status).toBe(422);
  });

  it('keeps the dates in order and in the future', async () => {
    const past = await own
      .patch(`${url}/terms`)
      .send({ termsVersion: 1, closesAt: new Date(Date.now() - 1000).toISOString() });
    expect(past.status).toBe(422);
    expect(past.body.errors).toHaveProperty('closesAt');
    const after = await own
      .patch(`${url}/terms`)
      .send({ termsVersion: 1, closesAt: new Date(Date.now() + 30 * 86_400_000).toISOString() });
    expect(after.body.errors).toHaveProperty('splitsAt');
  });

  it('lets one of two changes through when both saw the same version', async () => {
    const replies = await Promise.all([
      own.patch(`${url}/terms`).send({ termsVersion: 1, place: 'Room 4' }),
      own.patch(`${url}/terms`).send({ termsVersion: 1, place: 'Room 5' }),
    ]);
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
  });
});

describe('terms after the lock', () => {
  beforeEach(async () => {
    await world.buy.update({ state: 'locked', lockedAt: new Date() });
  });

  it('freezes all but split day, place, pickup rules and note, which everyone is told', async () => {
    for (const change of [{ dueDays: 9 }, { name: 'Another' }, { priceLimitPermille: 200 }]) {
      const reply = await own.patch(`${url}/terms`).send({ termsVersion: 1, ...change });
      expect(reply).toMatchObject({ status: 409, body: { code: 'wrong_state' } });
    }
    await own.post(`${url}/lines`).send({ termsVersion: 1, saltId: 'K2SO4' }).expect(409);
    await own
      .patch(`${url}/terms`)
      .send({ termsVersion: 1, place: 'The old boathouse', pickupRules: 'Bring a box.' })
      .expect(200);
    const [mail] = await told('terms_changed');
    expect(mail?.text_body).toContain('The old boathouse');
  });
});

describe('cancelling', () => {
  it('wants a reason, keeps pledges as history and tells payers and treasurers of the deposits', async () => {
    const member = world.people.member.membership;
    await transact(async (tx) => {
      const { postTransaction } = await import('#server/services/ledger/postTransaction.ts');
      await postTransaction(tx, {
        clubId: world.club.id,
        buyId: world.buy.id,
        eventType: 'payment',
        eventId: 'paid early',
        onDate: '2026-01-02',
        memo: 'Deposit',
        by: { membershipId: null, name: 'test' },
        postings: [
          { account: { kind: 'bank' }, amountMinor: 1496 },
          { account: { kind: 'member', refId: member.id }, amountMinor: -1496 },
        ],
      });
    });
    const bare = await own.post(`${url}/cancel`).send({ termsVersion: 1, reason: '' });
    expect(bare.body.errors).toHaveProperty('reason');
    const reply = await own
      .post(`${url}/cancel`)
      .send({ termsVersion: 1, reason: 'The supplier closed.' })
      .expect(200);
    expect(BuyHeader.parse(reply.body)).toMatchObject({
      state: 'cancelled',
      cancelReason: 'The supplier closed.',
    });
    const [pledge] = await Pledge.findAll({ where: { lineId: world.line.id } });
    expect(pledge).toMatchObject({ wantedMg: 10_000_000, droppedAt: null });
    const mails = await told('cancelled');
    const to = (email: string) => mails.find(({ address }) => address === email)?.text_body;
    expect(to(world.people.member.email)).toContain('€14.96');
    expect(to(world.people.treasurer.email)).toContain('Member Mo: €14.96');
    const treasurer = await world.people.treasurer.agent();
    const seen = BuyHeader.parse((await treasurer.get(url)).body);
    expect(seen.next).toMatchObject({ code: 'refund', who: 'you' });
    await own.post(`${url}/cancel`).send({ termsVersion: 2, reason: 'again' }).expect(409);
  });

  it('is not possible once it is ordered', async () => {
    await world.buy.update({ state: 'ordered' });
    const reply = await own.post(`${url}/cancel`).send({ termsVersion: 1, reason: 'too late' });
    expect(reply).toMatchObject({ status: 409, body: { code: 'wrong_state' } });
  });
});
