import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import type { MyPickup, PickupDesk } from '#shared/schemas/pickup.ts';
import { execute, select, transact } from '#server/config/database.ts';
import { eraseOldRecords } from '#server/services/pickup/records.ts';
import { remindUnclaimed } from '#server/services/pickup/unclaimed.ts';
import type { Agent } from '#tests/support/client.ts';
import type { LockedWorld } from '#tests/support/locked.ts';
import { makePickupWorld } from '#tests/support/pickupWorld.ts';

let world: LockedWorld;
let own: Agent;
let helper: Agent;
let ana: Agent;
let base: string;

beforeAll(async () => {
  world = await makePickupWorld(({ nominalMg }) => nominalMg + 100_000);
  // The split day is today, so that helpers have their rights.
  await world.buy.update({
    splitsAt: new Date(),
    place: 'Old brewery',
    pickupRules: 'Bring a box.',
  });
  own = await world.people.own.agent();
  helper = await world.people.helper.agent();
  ana = await world.payers[0].agent();
  base = `/api/v1/clubs/${world.club.slug}/buys/${world.buy.id}`;
});

async function desk(agent = own): Promise<PickupDesk> {
  return (await agent.get(`${base}/pickup`).expect(200)).body as PickupDesk;
}

async function personOf(index: 0 | 1 | 2, agent = own) {
  const found = (await desk(agent)).people.find(
    ({ membershipId }) => membershipId === world.payers[index].membership.id,
  );
  if (!found) throw new Error('not at the desk');
  return found;
}

async function handoverOf(index: 0 | 1 | 2, changes: object = {}) {
  const { membershipId, portions } = await personOf(index);
  return {
    id: randomUUID(),
    membershipId,
    portionIds: portions.filter(({ handedOverAt }) => !handedOverAt).map(({ id }) => id),
    method: 'name',
    pass: null,
    collectedBy: '',
    legalName: 'Full Legal Name',
    ...changes,
  };
}

const records = async () =>
  select<{ legal_name: string; mg: number; salt_id: string }>(
    'select legal_name, mg, salt_id from precursor_records where buy_id = :buyId order by mg',
    { buyId: world.buy.id },
  );

describe('pickup', () => {
  it('shows helpers whether it is paid, organisers what is owed', async () => {
    expect((await personOf(0)).owedMinor).toBeGreaterThan(0);
    expect(await personOf(0, helper)).toMatchObject({ paid: false, owedMinor: null });
    await (await world.people.member.agent()).get(`${base}/pickup`).expect(403);
  });

  it('lets members choose a slot while there is room, and name who collects', async () => {
    const startsAt = new Date(Date.now() + 3_600_000).toISOString();
    const endsAt = new Date(Date.now() + 7_200_000).toISOString();
    const made = await own
      .post(`${base}/pickup/slots`)
      .send({ startsAt, endsAt, place: '', capacity: 1 })
      .expect(201);
    const slotId = made.body[0].id as string;
    await own
      .post(`${base}/pickup/slots`)
      .send({ startsAt: endsAt, endsAt: startsAt, place: '', capacity: null })
      .expect(422);
    await ana.put(`${base}/pickup/mine/slot`).send({ slotId }).expect(200);
    await ana.put(`${base}/pickup/mine/slot`).send({ slotId }).expect(200);
    const ben = await world.payers[1].agent();
    await ben.put(`${base}/pickup/mine/slot`).send({ slotId }).expect(409);
    const mine = (
      await ana.put(`${base}/pickup/mine/proxy`).send({ name: 'Jory next door' }).expect(200)
    ).body as MyPickup;
    expect(mine).toMatchObject({ slotId, proxyName: 'Jory next door', place: 'Old brewery' });
    await own
      .put(`${base}/pickup/slots/${slotId}`)
      .send({ startsAt, endsAt, place: 'Yard', capacity: 2 })
      .expect(200);
    await own
      .put(`${base}/pickup/slots/${randomUUID()}`)
      .send({ startsAt, endsAt, place: '', capacity: 2 })
      .expect(404);
  });

  it('tells members with slot, place, pass and calendar entry, once', async () => {
    const notice = {
      id: randomUUID(),
      to: [world.payers[0].membership.id],
      note: 'Ring the bell.',
    };
    await own.post(`${base}/pickup/notices`).send(notice).expect(200, { told: 1 });
    await own.post(`${base}/pickup/notices`).send(notice).expect(200);
    const mails = await select<{ text_body: string; attachments: { text: string }[] }>(
      `select text_body, attachments from outbox where buy_id = :buyId and event_key like '%:pickup:%'`,
      { buyId: world.buy.id },
    );
    const { pass } = (await ana.get(`${base}/pickup/mine`).expect(200)).body as MyPickup;
    expect(mails).toHaveLength(1);
    expect(mails[0]?.text_body).toContain(`Your pass: ${pass}`);
    expect(mails[0]?.text_body).toContain('Where: Yard');
    expect(mails[0]?.attachments[0]?.text).toMatch(/UID:pickup-[\s\S]*SUMMARY:.*: pickup/);
    await own
      .post(`${base}/pickup/notices`)
      .send({ ...notice, id: randomUUID(), to: [world.people.member.membership.id] })
      .expect(422);
  });

  it('reads a pass however it is typed, and none that was made up', async () => {
    const { pass } = (await ana.get(`${base}/pickup/mine`)).body as MyPickup;
    const typed = pass?.toLowerCase().replace(/-/g, ' ') ?? '';
    await helper
      .post(`${base}/pickup/pass`)
      .send({ pass: typed })
      .expect(200, { membershipId: world.payers[0].membership.id });
    await helper.post(`${base}/pickup/pass`).send({ pass: 'ABCD-EFGH' }).expect(422);
    await helper.post(`${base}/pickup/pass`).send({ pass: '0000-0000-0000-0000-0' }).expect(404);
  });

  it('hands nothing over while it is owed and nobody vouches', async () => {
    const memberId = world.payers[1].membership.id;
    await own.delete(`${base}/vouched/${memberId}`).expect(200);
    const refused = await helper
      .post(`${base}/handovers`)
      .send(await handoverOf(1))
      .expect(409);
    expect(refused.body).toMatchObject({ code: 'still_owed', current: { owedMinor: null } });
    expect(await records()).toEqual([]);
    await own.put(`${base}/vouched/${memberId}`).send({ reason: 'Pays on Friday.' }).expect(200);
    await helper
      .post(`${base}/handovers`)
      .send(await handoverOf(1))
      .expect(200);
    expect((await personOf(1)).collectedAt).not.toBeNull();
  });

  it('asks for the legal name where recipients are recorded, and records salt, grams and name', async () => {
    const missing = await helper
      .post(`${base}/handovers`)
      .send(await handoverOf(0, { legalName: null }))
      .expect(422);
    expect(missing.body.errors).toHaveProperty('legalName');
    const before = await records();
    const waits = (await personOf(0)).portions.filter(({ saltId }) => saltId === 'KNO3');
    const mg = waits.reduce((sum, portion) => sum + portion.mg, 0);
    const body = await handoverOf(0, { legalName: 'Anastasia Payer' });
    await helper.post(`${base}/handovers`).send(body).expect(200);
    await helper.post(`${base}/handovers`).send(body).expect(200);
    const made = (await records()).filter(({ legal_name }) => legal_name === 'Anastasia Payer');
    expect(made).toEqual([{ legal_name: 'Anastasia Payer', mg, salt_id: 'KNO3' }]);
    expect(await records()).toHaveLength(before.length + 1);
    const steward = await world.people.steward.agent();
    const list = await steward.get(`/api/v1/clubs/${world.club.slug}/precursors`).expect(200);
    expect(list.body.records[0]).toMatchObject({ kind: 'handover', handedBy: 'Helper Hal' });
    await helper.get(`${base}/precursors`).expect(403);
  });

  it('takes a hand-over back with its record, by who made it or an organiser', async () => {
    const [made] = (await personOf(0)).handovers;
    const other = await world.people.cashHelper.agent();
    await other.delete(`${base}/handovers/${made?.id}`).expect(403);
    await own.delete(`${base}/handovers/${made?.id}`).expect(200);
    await own.delete(`${base}/handovers/${made?.id}`).expect(200);
    expect((await records()).some(({ legal_name }) => legal_name === 'Anastasia Payer')).toBe(
      false,
    );
    expect(await personOf(0)).toMatchObject({ collectedAt: null, handovers: [] });
  });

  it('hands a portion over once, when two do it at the same time', async () => {
    const bodies = [await handoverOf(0), await handoverOf(0)];
    const other = await world.people.cashHelper.agent();
    const replies = await Promise.all([
      helper.post(`${base}/handovers`).send(bodies[0]),
      other.post(`${base}/handovers`).send(bodies[1]),
    ]);
    expect(replies.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect((await personOf(0)).handovers).toHaveLength(1);
  });

  it('refuses somebody else’s pass, and portions of others', async () => {
    const { pass } = (await ana.get(`${base}/pickup/mine`)).body as MyPickup;
    expect(pass).toBeNull();
    const cleo = (await (await world.payers[2].agent()).get(`${base}/pickup/mine`))
      .body as MyPickup;
    const body = await handoverOf(2, { method: 'pass', pass: cleo.pass });
    await helper
      .post(`${base}/handovers`)
      .send({ ...body, pass: 'ABCD' })
      .expect(422);
    await helper
      .post(`${base}/handovers`)
      .send({ ...body, portionIds: (await personOf(0)).portions.map(({ id }) => id) })
      .expect(422);
  });

  it('reminds twice, then puts on the shelf what nobody fetched, and keeps the books balanced', async () => {
    const memberId = world.payers[2].membership.id;
    await own.post(`${base}/pickup/members/${memberId}/unclaimed`).expect(409);
    const since = (days: number) =>
      world.buy.update({ pickupAt: new Date(Date.now() - days * 86_400_000) });
    await since(21);
    await remindUnclaimed();
    await remindUnclaimed();
    expect((await personOf(2)).reminders).toBe(1);
    await since(41);
    await remindUnclaimed();
    await remindUnclaimed();
    expect((await personOf(2)).reminders).toBe(2);
    await since(61);
    const { portions } = await personOf(2);
    await own.post(`${base}/pickup/members/${memberId}/unclaimed`).expect(200);
    const stock = await select<{ mg: number; cost_minor: number; owed_to_id: string }>(
      `select mg, cost_minor, owed_to_id from shelf_stock where buy_id = :buyId and origin = 'unclaimed' order by mg`,
      { buyId: world.buy.id },
    );
    expect(stock.map(({ mg }) => mg)).toEqual(portions.map(({ mg }) => mg).sort((a, b) => a - b));
    expect(stock.every((row) => row.owed_to_id === memberId && row.cost_minor > 0)).toBe(true);
    await own.post(`${base}/pickup/members/${memberId}/unclaimed`).expect(404);
  });

  it('erases records when their time is over', async () => {
    expect((await records()).length).toBeGreaterThan(0);
    await transact((tx) =>
      execute(
        `update precursor_records set erase_after = current_date - 2 where buy_id = :id`,
        { id: world.buy.id },
        tx,
      ),
    );
    await eraseOldRecords();
    expect(await records()).toEqual([]);
  });

  it('writes a loss down, with where it was reported', async () => {
    const loss = {
      saltId: 'KNO3',
      mg: 5_000_000,
      lot: 'L-1',
      onDate: '2026-11-30',
      note: 'A bucket is gone.',
      reportedTo: 'Police, case 12',
    };
    await own.post(`${base}/precursors/losses`).send(loss).expect(201);
    await own
      .post(`${base}/precursors/losses`)
      .send({ ...loss, saltId: 'MgSO4.7H2O' })
      .expect(422);
    expect(await records()).toHaveLength(1);
  });
});
