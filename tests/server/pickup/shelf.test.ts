import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Shelf } from '#shared/schemas/shelf.ts';
import { select } from '#server/config/database.ts';
import type { Agent } from '#tests/support/client.ts';
import type { LockedWorld } from '#tests/support/locked.ts';
import { makePickupWorld } from '#tests/support/pickupWorld.ts';
import { makeGuest } from '#tests/support/world.ts';

let world: LockedWorld;
let organiser: Agent;
let url: string;

beforeAll(async () => {
  world = await makePickupWorld(({ nominalMg }) => nominalMg);
  organiser = await world.people.organiser.agent();
  url = `/api/v1/clubs/${world.club.slug}/shelf`;
});

const shelf = async (agent = organiser) => (await agent.get(url).expect(200)).body as Shelf;

async function lotOf(saltId: string) {
  const lot = (await shelf()).stock.find((each) => each.saltId === saltId);
  if (!lot) throw new Error('nothing on the shelf');
  return lot;
}

const sale = (changes: object = {}) => ({
  id: randomUUID(),
  membershipId: world.people.member.membership.id,
  mg: 50_000,
  legalName: 'Mo Member',
  paperSigned: true,
  ...changes,
});

async function memberBalance(): Promise<number> {
  const [row] = await select<{ sum: number | null }>(
    `select sum(p.amount_minor)::bigint as sum from ledger_postings p join ledger_accounts a on a.id = p.account_id
     where a.kind = 'member' and a.ref_id = :id`,
    { id: world.people.member.membership.id },
  );
  return row?.sum ?? 0;
}

describe('shelf', () => {
  it('shows members what lies there, and sales only to those who sell', async () => {
    const seen = await shelf(await world.people.member.agent());
    expect(seen.stock.length).toBeGreaterThan(0);
    expect(seen).toMatchObject({ people: [], sales: [], may: { price: false, sell: false } });
    expect((await shelf()).people.length).toBeGreaterThan(5);
  });

  it('sells at the set price, on the buyer’s account, and takes it back', async () => {
    const lot = await lotOf('KNO3');
    await organiser.post(`${url}/${lot.id}/sales`).send(sale()).expect(409);
    await organiser
      .put(`${url}/${lot.id}`)
      .send({ priceMinorPerKg: 450, version: lot.version + 1 })
      .expect(409);
    await organiser
      .put(`${url}/${lot.id}`)
      .send({ priceMinorPerKg: 450, version: lot.version })
      .expect(200);
    const body = sale();
    await organiser.post(`${url}/${lot.id}/sales`).send(body).expect(200);
    await organiser.post(`${url}/${lot.id}/sales`).send(body).expect(200);
    expect(await memberBalance()).toBe(23);
    expect((await lotOf('KNO3')).mg).toBe(lot.mg - 50_000);
    await organiser.delete(`${url}/sales/${body.id}`).expect(200);
    await organiser.delete(`${url}/sales/${body.id}`).expect(200);
    expect(await memberBalance()).toBe(0);
    expect((await lotOf('KNO3')).mg).toBe(lot.mg);
  });

  it('asks for the legal name and the signed paper as for any hand-over', async () => {
    const lot = await lotOf('KNO3');
    const guest = await makeGuest(world.club, 'Guest Gus', world.people.own);
    const refused = await organiser
      .post(`${url}/${lot.id}/sales`)
      .send(sale({ membershipId: guest.id, paperSigned: false, legalName: null }))
      .expect(422);
    expect(refused.body.errors).toHaveProperty('paperSigned');
    const named = await organiser
      .post(`${url}/${lot.id}/sales`)
      .send(sale({ membershipId: guest.id, legalName: null }))
      .expect(422);
    expect(named.body.errors).toHaveProperty('legalName');
    await organiser
      .post(`${url}/${lot.id}/sales`)
      .send(sale({ membershipId: guest.id, legalName: 'Gustav Guest' }))
      .expect(200);
    const [record] = await select<{ legal_name: string; mg: number }>(
      'select legal_name, mg from precursor_records where membership_id = :id',
      { id: guest.id },
    );
    expect(record).toEqual({ legal_name: 'Gustav Guest', mg: 50_000 });
  });

  it('never sells more than there is, however many sell at once', async () => {
    const lot = await lotOf('MgSO4.7H2O');
    await organiser
      .put(`${url}/${lot.id}`)
      .send({ priceMinorPerKg: 300, version: lot.version })
      .expect(200);
    const each = Math.floor(lot.mg / 2);
    const replies = await Promise.all(
      Array.from({ length: 5 }, () =>
        organiser.post(`${url}/${lot.id}/sales`).send(sale({ mg: each })),
      ),
    );
    expect(replies.filter(({ status }) => status === 200)).toHaveLength(2);
    expect(replies.filter(({ status }) => status === 409)).toHaveLength(3);
  });

  it('is sold by organisers and today’s helpers alone', async () => {
    const lot = await lotOf('KNO3');
    await (
      await world.people.member.agent()
    )
      .post(`${url}/${lot.id}/sales`)
      .send(sale())
      .expect(403);
    const helper = await world.people.helper.agent();
    await world.buy.update({ splitsAt: new Date() });
    await helper
      .post(`${url}/${lot.id}/sales`)
      .send(sale({ mg: 1000 }))
      .expect(200);
    await world.buy.update({ splitsAt: new Date(Date.now() - 2 * 86_400_000), splitEndsAt: null });
    await helper
      .post(`${url}/${lot.id}/sales`)
      .send(sale({ mg: 1000 }))
      .expect(403);
  });
});
