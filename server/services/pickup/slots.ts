import type { PickupSlot, SlotBody } from '#shared/schemas/pickup.ts';
import { execute, select } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { tellBuyChanged } from '../orders/tellBuy.ts';
import { notFound, wrongState } from '../problem.ts';
import { slotsOf } from './readDesk.ts';

const states = ['locked', 'ordered', 'arrived', 'splitting', 'pickup'] as const;

async function audited(
  actor: BuyActor,
  buy: Buy,
  action: string,
  subjectId: string | undefined,
  after: Record<string, unknown>,
  tx: Parameters<typeof writeAudit>[0],
): Promise<void> {
  await writeAudit(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    by: byActor(actor),
    action,
    subject: subjectId ? { type: 'slot', id: subjectId } : { type: 'slot' },
    after,
  });
  tellBuyChanged(buy, 'terms', tx);
}

/** Adds a time of hand-over. */
export async function addSlot(actor: BuyActor, body: SlotBody): Promise<PickupSlot[]> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    await execute(
      `insert into pickup_slots (buy_id, starts_at, ends_at, place, capacity)
       values (:buyId, :startsAt, :endsAt, :place, :capacity)`,
      { buyId: buy.id, ...body },
      tx,
    );
    await audited(actor, buy, 'pickup.addSlot', undefined, { ...body }, tx);
    return slotsOf(buy.id, tx);
  });
}

/**
 * Changes a time of hand-over.
 * @throws DomainProblem 404, or 409 when more have chosen it than would have room
 */
export async function changeSlot(
  actor: BuyActor,
  slotId: string,
  body: SlotBody,
): Promise<PickupSlot[]> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const slot = (await slotsOf(buy.id, tx)).find(({ id }) => id === slotId);
    if (!slot) throw notFound('This slot');
    if (body.capacity !== null && slot.taken > body.capacity) {
      throw wrongState(`${slot.taken} people have chosen this slot already.`);
    }
    await execute(
      'update pickup_slots set starts_at = :startsAt, ends_at = :endsAt, place = :place, capacity = :capacity where id = :slotId',
      { ...body, slotId },
      tx,
    );
    await audited(actor, buy, 'pickup.changeSlot', slotId, { ...body }, tx);
    return slotsOf(buy.id, tx);
  });
}

/** Removes a time of hand-over; whoever chose it has none again. */
export async function removeSlot(actor: BuyActor, slotId: string): Promise<PickupSlot[]> {
  return withBuy(actor.buy.id, { states }, async (buy, tx) => {
    if (!(await slotsOf(buy.id, tx)).some(({ id }) => id === slotId)) throw notFound('This slot');
    await execute('update buy_members set slot_id = null where slot_id = :slotId', { slotId }, tx);
    await execute('delete from pickup_slots where id = :slotId', { slotId }, tx);
    await audited(actor, buy, 'pickup.removeSlot', slotId, {}, tx);
    return slotsOf(buy.id, tx);
  });
}

/**
 * Chooses one's slot, or none.
 * @throws DomainProblem 404, or 409 when it is full
 */
export async function chooseSlot(actor: BuyActor, slotId: string | null): Promise<void> {
  await withBuy(actor.buy.id, { states }, async (buy, tx) => {
    if (slotId !== null) {
      const slot = (await slotsOf(buy.id, tx)).find(({ id }) => id === slotId);
      if (!slot) throw notFound('This slot');
      const [own] = await select<{ slot_id: string | null }>(
        'select slot_id from buy_members where buy_id = :buyId and membership_id = :membershipId',
        { buyId: buy.id, membershipId: actor.membershipId },
        tx,
      );
      if (own?.slot_id !== slotId && slot.capacity !== null && slot.taken >= slot.capacity) {
        throw wrongState('This slot is full. Choose another.', { slotId });
      }
    }
    await execute(
      `insert into buy_members (buy_id, membership_id, slot_id) values (:buyId, :membershipId, :slotId)
       on conflict (buy_id, membership_id) do update set slot_id = excluded.slot_id, version = buy_members.version + 1, updated_at = now()`,
      { buyId: buy.id, membershipId: actor.membershipId, slotId },
      tx,
    );
    tellBuyChanged(buy, 'terms', tx);
  });
}

/** Names who may collect instead of oneself, or nobody. */
export async function nameProxy(actor: BuyActor, name: string | null): Promise<void> {
  await withBuy(actor.buy.id, { states }, async (buy, tx) => {
    await execute(
      `insert into buy_members (buy_id, membership_id, proxy_name) values (:buyId, :membershipId, :name)
       on conflict (buy_id, membership_id) do update set proxy_name = excluded.proxy_name, version = buy_members.version + 1, updated_at = now()`,
      { buyId: buy.id, membershipId: actor.membershipId, name: name || null },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'pickup.nameProxy',
      subject: { type: 'membership', id: actor.membershipId },
      after: { proxy: name || null },
    });
  });
}
