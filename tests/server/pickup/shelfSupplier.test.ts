import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Shelf } from '#shared/schemas/shelf.ts';
import { execute, select, transact } from '#server/config/database.ts';
import { findClubActor } from '#server/services/actors.ts';
import { systemActor } from '#server/services/actorName.ts';
import { drawFromShelf, lotsOfOrder, returnToShelf } from '#server/services/pickup/shelfDraws.ts';
import { syncShelfSupplier } from '#server/services/pickup/syncShelfSupplier.ts';
import type { Agent } from '#tests/support/client.ts';
import { accountSum, type LockedWorld } from '#tests/support/locked.ts';
import { makePickupWorld } from '#tests/support/pickupWorld.ts';

const salt = 'MgSO4.7H2O';

let world: LockedWorld;
let organiser: Agent;
let url: string;

beforeAll(async () => {
  world = await makePickupWorld(({ nominalMg }) => nominalMg);
  organiser = await world.people.organiser.agent();
  url = `/api/v1/clubs/${world.club.slug}/shelf`;
});

const shelf = async () => (await organiser.get(url).expect(200)).body as Shelf;

async function lotOf(saltId: string) {
  const lot = (await shelf()).stock.find((each) => each.saltId === saltId);
  if (!lot) throw new Error('nothing on the shelf');
  return lot;
}

async function price(saltId: string, priceMinorPerKg: number | null) {
  const lot = await lotOf(saltId);
  await organiser
    .put(`${url}/${lot.id}`)
    .send({ priceMinorPerKg, version: lot.version })
    .expect(200);
  return lot;
}

interface OfferRow {
  id: string;
  supplier_id: string;
  price: number;
  packs: number;
  pack_mg: number;
}

const offersOf = (saltId: string) =>
  select<OfferRow>(
    `select o.id, o.supplier_id, o.price_minor as price, o.stock_packs as packs, o.pack_mg
     from offers o join suppliers s on s.id = o.supplier_id
     where s.club_id = :clubId and s.is_shelf and o.salt_id = :saltId and o.archived_at is null order by o.price_minor`,
    { clubId: world.club.id, saltId },
  );

/** What the books say lies on the shelf, and what its lots cost: the same, always. */
async function expectShelfToMatch() {
  const [row] = await select<{ cost: number }>(
    `select coalesce(sum(cost_minor), 0)::bigint as cost from shelf_stock where club_id = :clubId and owed_to_id is null`,
    { clubId: world.club.id },
  );
  expect(await accountSum(world.club.id, 'shelf')).toBe(row?.cost);
}

async function clubActor() {
  const actor = await findClubActor(world.people.organiser.account.id, world.club.slug, 'test');
  if (!actor) throw new Error('no actor');
  return actor;
}

describe('the shelf as a supplier', () => {
  it('offers whole packs of what has a price, and follows it', async () => {
    expect(await offersOf(salt)).toEqual([]);
    const lot = await price(salt, 455);
    const [first] = await offersOf(salt);
    expect(first).toMatchObject({ price: 46, packs: Math.floor(lot.mg / 100_000) });
    await price(salt, 500);
    const [second] = await offersOf(salt);
    expect(second).toMatchObject({ id: first?.id, price: 50 });
    const prices = await select<{ price: number }>(
      'select price_minor as price from offer_prices where offer_id = :id order by id',
      { id: first?.id },
    );
    expect(prices.map((row) => row.price)).toEqual([46, 50]);
    await price(salt, null);
    expect(await offersOf(salt)).toEqual([]);
    await price(salt, 500);
    expect(await offersOf(salt)).toMatchObject([{ id: first?.id }]);
    const [count] = await select<{ n: number }>(
      'select count(*)::int as n from suppliers where club_id = :clubId and is_shelf',
      { clubId: world.club.id },
    );
    expect(count?.n).toBe(1);
  });

  it('has less after a sale, and more again when it is taken back', async () => {
    const [before] = await offersOf(salt);
    const lot = await lotOf(salt);
    const id = randomUUID();
    await organiser
      .post(`${url}/${lot.id}/sales`)
      .send({
        id,
        membershipId: world.people.member.membership.id,
        mg: (lot.mg % 100_000) + 1,
        legalName: 'Mo Member',
        paperSigned: true,
      })
      .expect(200);
    expect(await offersOf(salt)).toMatchObject([{ packs: (before?.packs ?? 0) - 1 }]);
    await organiser.delete(`${url}/sales/${id}`).expect(200);
    expect(await offersOf(salt)).toMatchObject([{ packs: before?.packs }]);
  });

  it('writes to nobody when a sale moves the stock of an open buy, and to all when the price moves', async () => {
    const { id: buyId } = world.buy;
    const [offer] = await offersOf(salt);
    const state = (to: string) =>
      transact((tx) => execute('update buys set state = :to where id = :buyId', { to, buyId }, tx));
    await state('open');
    await transact((tx) =>
      execute(
        `insert into line_offers (line_id, offer_id) select id, :offerId from lines where buy_id = :buyId and salt_id = :salt`,
        { offerId: offer?.id, buyId, salt },
        tx,
      ),
    );
    const told = async () => {
      const [row] = await select<{ notices: number; version: number }>(
        `select (select count(*)::int from notices where buy_id = :buyId and kind = 'terms_changed') as notices,
           terms_version as version from buys where id = :buyId`,
        { buyId },
      );
      return row ?? { notices: 0, version: 0 };
    };
    const start = await told();
    const lot = await lotOf(salt);
    await organiser
      .post(`${url}/${lot.id}/sales`)
      .send({
        id: randomUUID(),
        membershipId: world.people.member.membership.id,
        mg: (lot.mg % 100_000) + 1,
        legalName: 'Mo Member',
        paperSigned: true,
      })
      .expect(200);
    const sold = await told();
    expect(sold).toEqual({ notices: start.notices, version: start.version + 1 });
    await price(salt, 600);
    const priced = await told();
    expect(priced.version).toBe(sold.version + 1);
    expect(priced.notices).toBeGreaterThan(sold.notices);
    await state('pickup');
  });

  it('gives its lots to an order and takes them back, with books that match', async () => {
    await expectShelfToMatch();
    const lot = await lotOf(salt);
    const [offer] = await offersOf(salt);
    if (!offer) throw new Error('no offer');
    const order = (packs: number) => ({
      supplierId: offer.supplier_id,
      packs: [
        {
          offerId: offer.id,
          lineId: world.second.id,
          packs,
          packMg: offer.pack_mg,
          priceMinor: offer.price,
        },
      ],
    });
    const { club } = await clubActor();
    await expect(
      transact((tx) => drawFromShelf(world.buy, order(offer.packs + 1), tx)),
    ).rejects.toMatchObject({ status: 409, code: 'wrong_state' });
    expect((await lotOf(salt)).mg).toBe(lot.mg);

    const drawn = await transact(async (tx) => {
      const postings = await drawFromShelf(world.buy, order(2), tx);
      await syncShelfSupplier(club, systemActor('test'), tx);
      return postings;
    });
    expect(drawn.reduce((sum, { amountMinor }) => sum + amountMinor, 0)).toBe(-2 * offer.price);
    expect((await lotOf(salt)).mg).toBe(lot.mg - 200_000);
    expect(await offersOf(salt)).toMatchObject([{ packs: offer.packs - 2 }]);

    await transact(async (tx) => {
      expect((await lotsOfOrder(world.buy.id, randomUUID(), tx)).size).toBe(0);
      await returnToShelf(world.buy.id, offer.supplier_id, tx);
      await returnToShelf(world.buy.id, offer.supplier_id, tx);
      await syncShelfSupplier(club, systemActor('test'), tx);
    });
    expect((await lotOf(salt)).mg).toBe(lot.mg);
    expect(await offersOf(salt)).toMatchObject([{ packs: offer.packs }]);
    await expectShelfToMatch();
  });
});
