import { randomUUID } from 'node:crypto';
import type { Bag, Portion, SplitSheet } from '#shared/schemas/splits.ts';
import { select } from '#server/config/database.ts';
import { findBuyActorAt, type BuyActor } from '#server/services/actors.ts';
import { clubToday } from '#server/services/ledger/clubDay.ts';
import { confirmBill } from '#server/services/orders/confirmBill.ts';
import { enterBill } from '#server/services/orders/enterBill.ts';
import { loadOrderBook } from '#server/services/orders/orderBook.ts';
import { placeOrder } from '#server/services/orders/placeOrder.ts';
import { vouchFor } from '#server/services/orders/vouch.ts';
import { applyTargets } from '#server/services/splits/applyTargets.ts';
import { countBag } from '#server/services/splits/countBag.ts';
import { markArrived } from '#server/services/splits/markArrived.ts';
import { previewTargets } from '#server/services/splits/previewTargets.ts';
import { readSplit } from '#server/services/splits/readSplit.ts';
import { recordArrival } from '#server/services/splits/recordArrival.ts';
import { startSplitting } from '#server/services/splits/startSplitting.ts';
import { makeLockedWorld, type LockedWorld } from './locked.ts';
import type { Person, World } from './world.ts';

/** A person before the buy, as routes would find them. */
export async function actorFor(world: World, person: Person): Promise<BuyActor> {
  const actor = await findBuyActorAt(person.account.id, world.club.slug, world.buy.id, 'test');
  if (!actor) throw new Error('no such actor');
  return actor;
}

/** A locked world whose members are vouched for and whose orders are placed. */
export async function makeOrderedWorld(): Promise<LockedWorld> {
  const world = await makeLockedWorld();
  const own = await actorFor(world, world.people.own);
  for (const { memberId } of world.sheet.members) await vouchFor(own, memberId, 'Known for years.');
  const placedOn = await clubToday(world.club.id);
  for (const { supplierId } of (await loadOrderBook(world.buy.id)).orders) {
    const book = await loadOrderBook(world.buy.id);
    const order = book.orders.find((each) => each.supplierId === supplierId);
    await world.buy.reload();
    await placeOrder(own, supplierId, {
      version: order?.version ?? 0,
      termsVersion: world.buy.termsVersion,
      placedOn,
      reference: '',
      note: '',
    });
  }
  await world.buy.reload();
  return world;
}

/** The split as a person sees it. */
export async function splitOf(world: World, person = world.people.own): Promise<SplitSheet> {
  return readSplit(await actorFor(world, person));
}

/** The bill of each supplier, as ordered plus `moreMinor` for the goods of the first, entered and confirmed. */
export async function billAll(world: LockedWorld, moreMinor = 0): Promise<void> {
  const own = await actorFor(world, world.people.own);
  const treasurer = await actorFor(world, world.people.treasurer);
  const billedOn = await clubToday(world.club.id);
  let more = moreMinor;
  for (const order of (await loadOrderBook(world.buy.id)).orders) {
    const { id } = await enterBill(own, {
      version: 0,
      supplierId: order.supplierId,
      payee: '',
      number: 'R-1',
      billedOn,
      goods: order.packs.map(({ offerId, packs, priceMinor }) => ({
        offerId,
        packs,
        amountMinor: packs * priceMinor + more,
        taxRatePpm: 190_000,
      })),
      charges:
        order.shippingMinor === 0
          ? []
          : [
              {
                kind: 'freight',
                name: 'Freight',
                amountMinor: order.shippingMinor,
                taxRatePpm: 190_000,
                basis: 'mass',
                chargeId: null,
              },
            ],
      taxMinor: 0,
      paidBy: 'club',
      advancedById: null,
    });
    more = 0;
    await confirmBill(treasurer, id, { version: 1, paidFrom: 'bank' });
  }
}

/** Marks every order as complete and weighs each bag: gross so that net is `netMg(bag)`, tare weighed. */
export async function arriveAll(
  world: LockedWorld,
  netMg: (bag: Bag) => number = ({ nominalMg }) => nominalMg,
): Promise<void> {
  const own = await actorFor(world, world.people.own);
  for (const order of (await splitOf(world)).orders) {
    await recordArrival(own, order.supplierId, {
      version: order.version,
      packs: order.packs.map(({ offerId, ordered }) => ({ offerId, packs: ordered })),
      note: '',
    });
  }
  for (const bag of (await splitOf(world)).bags) {
    await countBag(own, bag.id, {
      version: bag.version,
      grossMg: netMg(bag) + 60_000,
      tareMg: 60_000,
      lot: `L-${bag.number}`,
      missing: false,
      damage: '',
      note: '',
    });
  }
  await world.buy.reload();
  await markArrived(own, world.buy.termsVersion);
  await world.buy.reload();
}

/** Makes the targets that the bags give. */
export async function makeTargets(world: World): Promise<void> {
  const own = await actorFor(world, world.people.own);
  const { basis } = await previewTargets(own);
  await world.buy.reload();
  await applyTargets(own, { termsVersion: world.buy.termsVersion, basis });
  await world.buy.reload();
}

/** A world whose split has begun: billed, arrived, with targets. */
export async function makeSplitWorld(netMg?: (bag: Bag) => number): Promise<LockedWorld> {
  const world = await makeOrderedWorld();
  await billAll(world);
  await arriveAll(world, netMg);
  await makeTargets(world);
  await startSplitting(await actorFor(world, world.people.own), world.buy.termsVersion);
  await world.buy.reload();
  return world;
}

/** A weighing of a portion from the first bag of its line, on the target unless told otherwise. */
export function weighingOf(split: SplitSheet, portion: Portion, changes: object = {}) {
  const bag = split.bags.find(({ lineId }) => lineId === portion.lineId);
  return {
    id: randomUUID(),
    portionId: portion.id,
    bagId: bag?.id ?? '',
    station: 'Table 1',
    scale: 'Kitchen scale',
    divisionMg: 100,
    capacityMg: null,
    readingMg: portion.targetMg,
    secondLook: false,
    targetMg: portion.targetMg,
    targetVersion: portion.targetVersion,
    ...changes,
  };
}

/** Stock on the club's shelf that a buy left there. */
export async function shelfOf(buyId: string) {
  return select<{ salt_id: string; lot: string; mg: number; cost_minor: number }>(
    'select salt_id, lot, mg, cost_minor from shelf_stock where buy_id = :buyId order by salt_id, lot',
    { buyId },
  );
}
