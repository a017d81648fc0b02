import { execute, transact } from '#server/config/database.ts';
import { Buy } from '#server/models/Buy.ts';
import { Line } from '#server/models/Line.ts';
import { Pledge } from '#server/models/Pledge.ts';
import { makeWorld, type Person, type World } from './world.ts';

export interface SheetWorld extends World {
  /** Magnesium sulfate, which nobody classifies. */
  readonly plain: Line;
  readonly offers: { big: string; small: string; plain: string };
  readonly supplierId: string;
  readonly url: string;
}

async function insertId(sql: string, values: Record<string, unknown>): Promise<string> {
  const id = crypto.randomUUID();
  await transact((tx) => execute(sql, { id, ...values }, tx));
  return id;
}

async function addOffer(
  clubId: string,
  supplierId: string,
  line: Line,
  pack: { packMg: number; priceMinor: number },
): Promise<string> {
  const id = await insertId(
    `insert into offers (id, club_id, supplier_id, salt_id, pack_mg, price_minor)
     values (:id, :clubId, :supplierId, :saltId, :packMg, :priceMinor)`,
    { clubId, supplierId, saltId: line.saltId, ...pack },
  );
  await transact((tx) =>
    execute(
      'insert into line_offers (line_id, offer_id) values (:lineId, :id)',
      { lineId: line.id, id },
      tx,
    ),
  );
  return id;
}

/**
 * A world whose buy can be bought: potassium nitrate (classified and reportable; 25 kg at 95.00, 1 kg at 6.00) and
 * magnesium sulfate (5 kg at 14.50), from one supplier with flat shipping of 10.00.
 */
export async function makeSheetWorld(state: Buy['state'] = 'open'): Promise<SheetWorld> {
  const world = await makeWorld(state);
  const { club, buy, line } = world;
  const plain = await Line.create({ buyId: buy.id, saltId: 'MgSO4.7H2O', position: 1 });
  const supplierId = await insertId(
    `insert into suppliers (id, club_id, name, shipping) values (:id, :clubId, 'Salt mill', '{"kind":"flat","minor":1000}')`,
    { clubId: club.id },
  );
  const offers = {
    big: await addOffer(club.id, supplierId, line, { packMg: 25_000_000, priceMinor: 9500 }),
    small: await addOffer(club.id, supplierId, line, { packMg: 1_000_000, priceMinor: 600 }),
    plain: await addOffer(club.id, supplierId, plain, { packMg: 5_000_000, priceMinor: 1450 }),
  };
  const url = `/api/v1/clubs/${club.slug}/buys/${buy.id}`;
  return { ...world, plain, offers, supplierId, url };
}

/** A pledge straight into the database, for what came before. */
export async function givePledge(
  world: World,
  person: Pick<Person, 'membership'>,
  line: Line,
  grams: number,
  upTo: number | null = null,
): Promise<Pledge> {
  return Pledge.create({
    buyId: world.buy.id,
    lineId: line.id,
    membershipId: person.membership.id,
    wantedMg: grams * 1000,
    upToMg: upTo === null ? null : upTo * 1000,
    at: new Date(),
  });
}

/** Path of somebody's pledge on a line. */
export function pledgeUrl(
  world: SheetWorld,
  line: Line,
  person: Pick<Person, 'membership'>,
): string {
  return `${world.url}/lines/${line.id}/pledges/${person.membership.id}`;
}

/** Moves the closing time by so many hours from now; negative: it has passed. */
export async function closesIn(world: World, hours: number): Promise<void> {
  await Buy.update(
    { closesAt: new Date(Date.now() + hours * 3_600_000) },
    { where: { id: world.buy.id } },
  );
}
