import { randomUUID } from 'node:crypto';
import { expect } from 'vitest';
import { shareRequestOf } from '#shared/domain/buys/requests.ts';
import { shareOut } from '#shared/domain/shares/shareOut.ts';
import type { OrdersReply } from '#shared/schemas/orders.ts';
import { execute, transact } from '#server/config/database.ts';
import { systemActor } from '#server/services/actorName.ts';
import { loadPledges, loadSheetTerms } from '#server/services/buys/loadSheetTerms.ts';
import { postTransaction } from '#server/services/ledger/postTransaction.ts';
import { costsOfBuy } from '#server/services/orders/costsOfBuy.ts';
import type { LockedWorld } from './locked.ts';
import type { Person } from './world.ts';

/** Today, for bodies that name a day. */
export const today = () => new Date().toISOString().slice(0, 10);
/** Where the world's buy is. */
export const base = (world: LockedWorld) => `/api/v1/clubs/${world.club.slug}/buys/${world.buy.id}`;

/** The treasurer records a transfer; the whole due unless told. */
export async function pay(world: LockedWorld, person: Person, amountMinor = world.dueOf(person)) {
  const treasurer = await world.people.treasurer.agent();
  await treasurer
    .post(`/api/v1/clubs/${world.club.slug}/payments`)
    .send({
      key: randomUUID(),
      memberId: person.membership.id,
      buyId: world.buy.id,
      method: 'transfer',
      amountMinor,
      receivedOn: today(),
      reference: '',
    })
    .expect(201);
}

/** The orders as the buy's organiser sees them. */
export async function orders(world: LockedWorld): Promise<OrdersReply> {
  const own = await world.people.own.agent();
  return (await own.get(`${base(world)}/orders`).expect(200)).body;
}

/** The organiser places an order as the page would. */
export async function place(world: LockedWorld, supplierId: string, fields: object = {}) {
  const own = await world.people.own.agent();
  const now = await orders(world);
  const order = now.orders.find((each) => each.supplierId === supplierId);
  return own.post(`${base(world)}/orders/${supplierId}/place`).send({
    version: order?.version,
    termsVersion: now.termsVersion,
    placedOn: today(),
    reference: 'Q-118',
    note: '',
    ...fields,
  });
}

/** Checks one price for all of a supplier's packs; `set` takes it over. */
export async function quote(
  world: LockedWorld,
  supplierId: string,
  priceMinor: number,
  shippingMinor?: number,
) {
  const own = await world.people.own.agent();
  const now = await orders(world);
  const order = now.orders.find((each) => each.supplierId === supplierId);
  const body = {
    prices: order?.packs.map(({ offerId }) => ({ offerId, priceMinor })) ?? [],
    shippingMinor: shippingMinor ?? order?.shippingMinor ?? 0,
  };
  return {
    check: await own.post(`${base(world)}/orders/${supplierId}/check`).send(body),
    set: () =>
      own.put(`${base(world)}/orders/${supplierId}/prices`).send({
        ...body,
        version: order?.version,
        termsVersion: now.termsVersion,
      }),
  };
}

/** Posts a final share as the split does: each member, the shelf, and the buy's account against them. */
export async function postFinal(world: LockedWorld): Promise<void> {
  const costs = await costsOfBuy(world.buy.id);
  expect(costs.ready).toBe(true);
  const request = shareRequestOf(
    await loadSheetTerms(world.buy.id),
    await loadPledges(world.buy.id),
    costs.received,
    'final',
  );
  const sheet = shareOut(request);
  const lost = new Map(costs.lost.map(({ memberId, minor }) => [memberId, minor]));
  await transact(async (tx) => {
    const finals = sheet.members.map(({ memberId, totalMinor }) => ({
      memberId,
      minor: totalMinor + (lost.get(memberId) ?? 0),
    }));
    await postTransaction(tx, {
      clubId: world.club.id,
      eventType: 'final_share',
      eventId: world.buy.id,
      onDate: today(),
      memo: 'Final shares',
      buyId: world.buy.id,
      by: systemActor('test'),
      postings: [
        ...finals.map(({ memberId, minor }) => ({
          account: { kind: 'member' as const, refId: memberId },
          amountMinor: minor,
        })),
        { account: { kind: 'shelf' as const }, amountMinor: sheet.shelf.totalMinor },
        {
          account: { kind: 'buy' as const, refId: world.buy.id },
          amountMinor: 0 - costs.totalMinor,
        },
      ],
    });
    for (const { memberId, minor } of finals) {
      await execute(
        'update buy_members set final_minor = :minor where buy_id = :buyId and membership_id = :memberId',
        { minor, memberId, buyId: world.buy.id },
        tx,
      );
    }
    await execute(
      `insert into snapshots (buy_id, kind, terms_version, request, sheet, extra)
       values (:buyId, 'final', 1, :request, :sheet, :extra)`,
      {
        buyId: world.buy.id,
        request: JSON.stringify(request),
        sheet: JSON.stringify(sheet),
        extra: JSON.stringify({ lost: costs.lost, excess: [], names: costs.names }),
      },
      tx,
    );
    await execute("update buys set state = 'pickup' where id = :id", { id: world.buy.id }, tx);
  });
}
