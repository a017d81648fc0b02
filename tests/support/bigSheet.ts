import { execute, transact } from '#server/config/database.ts';
import { Buy } from '#server/models/Buy.ts';
import { Line } from '#server/models/Line.ts';
import { Pledge } from '#server/models/Pledge.ts';
import { makeClub, makeMember, type Person } from './world.ts';

const salts = [
  ['KNO3', 25],
  ['K2SO4', 5],
  ['KH2PO4', 1],
  ['MgSO4.7H2O', 5],
  ['CaSO4.2H2O', 5],
  ['KCl', 5],
  ['NaHCO3', 2],
  ['KHCO3', 2],
  ['CaCO3', 5],
  ['MgCl2.6H2O', 5],
  ['CaCl2.2H2O', 5],
  ['FeEDTA', 1],
  ['FeDTPA', 1],
  ['MnSO4.H2O', 1],
  ['ZnSO4.7H2O', 1],
  ['CuSO4.5H2O', 1],
  ['Na2MoO4.2H2O', 1],
  ['K2CO3', 2],
  ['Mg(NO3)2.6H2O', 5],
  ['citric-acid.H2O', 1],
] as const;

const names = ['Imke', 'Teodor', 'Noor', 'Ravi', 'Pim', 'Orla', 'Juno', 'Wim', 'Saskia', 'Bela'];
const families = [
  'Sørland',
  'Banach-Lind',
  'Valdane',
  'Achterlo',
  'Castellet',
  'Fennimore',
  'Quist',
];

/** A number in [0, 1) that is the same for the same seed. */
function chance(seed: number): number {
  const x = Math.sin(seed * 12.9898) * 43758.5453;
  return x - Math.floor(x);
}

async function addOffers(clubId: string, suppliers: readonly string[], line: Line, kilos: number) {
  const sizes = [kilos, kilos / 5, kilos / 25];
  const rows = suppliers.slice(0, 2).flatMap((supplierId, place) =>
    sizes.map((size, index) => ({
      id: crypto.randomUUID(),
      supplierId,
      packMg: Math.max(50_000, Math.round(size * 1_000_000)),
      priceMinor: Math.round((380 + place * 25) * size * (1 + index * 0.28)) + 45,
    })),
  );
  await transact(async (tx) => {
    for (const row of rows) {
      await execute(
        `insert into offers (id, club_id, supplier_id, salt_id, pack_mg, price_minor)
         values (:id, :clubId, :supplierId, :saltId, :packMg, :priceMinor)`,
        { ...row, clubId, saltId: line.saltId },
        tx,
      );
      await execute(
        'insert into line_offers (line_id, offer_id) values (:lineId, :offerId)',
        { lineId: line.id, offerId: row.id },
        tx,
      );
    }
  });
}

export interface BigSheet {
  readonly slug: string;
  readonly buy: Buy;
  readonly lines: Line[];
  readonly organiser: Person;
  readonly members: Person[];
}

/** An open buy with so many members (the organiser among them) and lines; `filled` of the cells have a pledge. */
export async function makeBigSheet(size: {
  members: number;
  lines: number;
  filled?: number;
  slug?: string;
  name?: string;
}): Promise<BigSheet> {
  const club = await makeClub({ name: 'Quillmere', ...(size.slug ? { slug: size.slug } : {}) });
  const organiser = await makeMember(club, 'Imke Sørland', ['organiser', 'steward']);
  const members = [organiser];
  for (let index = 1; index < size.members; index += 1) {
    const name = `${names[index % names.length]} ${families[Math.floor(index / names.length) % families.length]}`;
    const more = Math.floor(index / (names.length * families.length));
    members.push(await makeMember(club, more > 0 ? `${name} ${more + 1}` : name));
  }
  const suppliers = ['Salt mill', 'Harbour chemicals', 'Dry goods'].map((name) => ({
    id: crypto.randomUUID(),
    name,
  }));
  await transact(async (tx) => {
    for (const supplier of suppliers) {
      const shipping = JSON.stringify({ kind: 'flat', minor: 990 });
      await execute(
        'insert into suppliers (id, club_id, name, shipping) values (:id, :clubId, :name, :shipping)',
        { ...supplier, clubId: club.id, shipping },
        tx,
      );
    }
  });
  const day = 86_400_000;
  const buy = await Buy.create({
    clubId: club.id,
    name: size.name ?? 'Winter salts',
    state: 'open',
    responsibleId: organiser.membership.id,
    openedAt: new Date(),
    closesAt: new Date(Date.now() + 3.2 * day),
    splitsAt: new Date(Date.now() + 11 * day),
    place: 'Quillmere library, room 2',
  });
  const lines = await Line.bulkCreate(
    salts.slice(0, size.lines).map(([saltId], position) => ({ buyId: buy.id, saltId, position })),
  );
  for (const [index, line] of lines.entries()) {
    const ids = suppliers.map(({ id }) => id);
    await addOffers(club.id, index % 2 ? ids.slice(1) : ids, line, salts[index]?.[1] ?? 1);
  }
  await transact((tx) =>
    execute(
      `insert into charges (buy_id, kind, name, amount_minor, basis, position) values
         (:buyId, 'bags', 'Bags and labels', 1080, 'member', 0), (:buyId, 'rebate', 'Early-order rebate', -500, 'value', 1)`,
      { buyId: buy.id },
      tx,
    ),
  );
  const rows = members.flatMap((member, place) =>
    lines.flatMap((line, index) => {
      const seed = place * 31 + index * 7 + 1;
      if (chance(seed) >= (size.filled ?? 1)) return [];
      const grams = 50 * (1 + Math.floor(chance(seed + 0.5) * 24));
      return [
        {
          buyId: buy.id,
          lineId: line.id,
          membershipId: member.membership.id,
          wantedMg: grams * 1000,
          upToMg: seed % 9 === 0 ? grams * 2000 : null,
          at: new Date(Date.now() - seed * 60_000),
        },
      ];
    }),
  );
  await Pledge.bulkCreate(rows);
  return { slug: club.slug, buy, lines, organiser, members };
}
