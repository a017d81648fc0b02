import { randomUUID } from 'node:crypto';
import { execute, select, transact } from '#server/config/database.ts';
import { handOver } from '#server/services/pickup/handOver.ts';
import { priceStock } from '#server/services/pickup/priceStock.ts';
import { readDesk } from '#server/services/pickup/readDesk.ts';
import { readShelf } from '#server/services/pickup/readShelf.ts';
import { settleBuy } from '#server/services/orders/settleBuy.ts';
import { addOwnSalt } from '#server/services/salts/changeOwnSalt.ts';
import { updateClub } from '#server/services/clubs/updateClub.ts';
import { nameHelper } from '#server/services/buys/buyPeople.ts';
import { Buy } from '#server/models/Buy.ts';
import { autumnLines, sedgeholmLines, springLines, summerLines, winterLines } from './data/buys.ts';
import { quillmereMarket, sedgeholmMarket } from './data/market.ts';
import { quillmereGuests, quillmerePeople, sedgeholmPeople } from './data/people.ts';
import { DemoBuy } from './demoBuy.ts';
import { DemoClub } from './demoClub.ts';

const day = 86_400_000;
const parts = { organiser: 'imke', treasurer: 'orla' };

function inDays(days: number, hours = 0): string {
  const at = new Date(Date.now() + days * day + hours * 3_600_000);
  at.setUTCMinutes(0, 0, 0);
  return at.toISOString();
}

async function makeQuillmere(accounts: Map<string, string>): Promise<DemoClub> {
  const club = await DemoClub.found(
    {
      name: 'Quillmere Water Gardeners',
      slug: 'quillmere',
      currency: 'EUR',
      locale: 'en-IE',
      timeZone: 'Europe/Dublin',
      units: 'metric',
    },
    quillmerePeople,
    accounts,
  );
  await updateClub(await club.actor('teodor'), {
    version: 1,
    note: 'We keep planted tanks around the Quillmere and buy our salts together, four times a year.',
    contact: 'post@quillmere.example',
    placeAddress: 'Quillmere library, room 2, Weir Lane',
    placeNote: 'Ring at the side door. There is a lift.',
    transferHow: 'Quillmere Water Gardeners, IBAN in the club room; name the reference.',
  });
  for (const guest of quillmereGuests) await club.addGuest('teodor', guest);
  const trace = await addOwnSalt(await club.actor('teodor'), {
    kind: 'trace_mix',
    name: 'Weir Lane trace mix',
    formula: null,
    cas: null,
    compositionPpm: { Fe: 62_000, Mn: 21_000, Zn: 5_500, B: 9_000, Cu: 1_200, Mo: 600 },
    statements: ['H319'],
    signalWord: 'Warning',
    storage: 'Dry and closed; it cakes.',
    note: 'Assay from the maker’s label.',
  });
  club.salts.set('trace', trace.id);
  await club.stockMarket('imke', quillmereMarket);
  return club;
}

/** What the settled buy left on the shelf is for sale. */
async function priceShelf(club: DemoClub): Promise<void> {
  const actor = await club.actor(parts.organiser);
  for (const { id, version } of (await readShelf(actor)).stock) {
    await priceStock(actor, id, { priceMinorPerKg: 420, version });
  }
}

/** A buy of last summer: collected, paid and settled. */
async function makeSettled(club: DemoClub): Promise<void> {
  const head = { name: 'Summer salts 2026', closesAt: inDays(1), splitsAt: inDays(2, 3), note: '' };
  const buy = await DemoBuy.draft(club, parts, head, summerLines);
  await buy.open();
  await buy.pledge(summerLines);
  await buy.lock();
  await buy.collect();
  await buy.order();
  await buy.billBags();
  await buy.arrive();
  await buy.startSplit();
  await buy.weigh('all');
  await buy.finish();
  await buy.collect();
  for (const { membershipId, portions } of (await readDesk(await buy.own())).people) {
    await handOver(await buy.own(), {
      id: randomUUID(),
      membershipId,
      portionIds: portions.map(({ id }) => id),
      method: 'name',
      pass: null,
      collectedBy: '',
      legalName: null,
    });
  }
  const { termsVersion } = await Buy.findByPk(buy.id, { rejectOnEmpty: true });
  await settleBuy(await club.buyActor(parts.treasurer, buy.id), termsVersion);
  await buy.backdate(130);
  await priceShelf(club);
}

/** A buy at the split: half of it is weighed. */
async function makeSplitting(club: DemoClub): Promise<void> {
  const by = { organiser: 'ravi', treasurer: 'orla' };
  const head = {
    name: 'Autumn refill 2026',
    closesAt: new Date(Date.now() + 5 * 60_000).toISOString(),
    splitsAt: inDays(0, 2),
    splitEndsAt: inDays(0, 5),
    pickupRules: 'Bring closed containers. Gloves and goggles are on the table.',
  };
  const buy = await DemoBuy.draft(club, by, head, autumnLines);
  await buy.open();
  await buy.pledge(autumnLines);
  await buy.lock();
  await buy.collect();
  await buy.order();
  await buy.billBags();
  await buy.arrive();
  await nameHelper(await buy.own(), club.memberOf('hale'), true);
  await buy.startSplit();
  await buy.weigh('half');
}

/** The open buy, with a sack that is all but full. */
async function makeOpen(club: DemoClub): Promise<void> {
  const head = {
    name: 'Winter salts 2026',
    closesAt: inDays(3, 4),
    splitsAt: inDays(18, 2),
    splitEndsAt: inDays(18, 5),
    note: 'Last buy before spring. The sack of potassium nitrate is nearly spoken for.',
    pickupRules: 'Bring closed containers with a label, no kitchen ware.',
    minimumKind: 'members' as const,
    minimumAmount: 8,
  };
  const buy = await DemoBuy.draft(club, parts, head, winterLines);
  await buy.open();
  await buy.pledge(winterLines);
}

async function makeSedgeholm(accounts: Map<string, string>): Promise<void> {
  const club = await DemoClub.found(
    {
      name: 'Sedgeholm Plant Circle',
      slug: 'sedgeholm',
      currency: 'GBP',
      locale: 'en-GB',
      timeZone: 'Europe/London',
      units: 'metric',
    },
    sedgeholmPeople,
    accounts,
  );
  await club.stockMarket('noor', sedgeholmMarket);
  const head = { name: 'First pooled order', closesAt: inDays(6), splitsAt: inDays(12, 2) };
  const by = { organiser: 'noor', treasurer: 'noor' };
  const buy = await DemoBuy.draft(club, by, head, sedgeholmLines);
  await buy.open();
  await buy.pledge(sedgeholmLines);
}

const begun = 'demo-begun';
const loaded = 'demo-loaded';

async function note(key: string): Promise<void> {
  await transact((tx) =>
    execute('insert into installation (key) values (:key) on conflict do nothing', { key }, tx),
  );
}

/** Empties every table but those that say how far the schema and the installation are. */
async function startOver(): Promise<void> {
  const tables = await select<{ name: string }>(
    `select quote_ident(tablename) as name from pg_tables
     where schemaname = 'public' and tablename not in ('schema_migrations', 'installation')`,
  );
  await transact((tx) =>
    execute(`truncate ${tables.map(({ name }) => name).join(', ')} restart identity`, {}, tx),
  );
}

/**
 * Loads the demo clubs into an empty installation, through the services that people use; does nothing once they are
 * there, nor where somebody has signed up before. Nobody can sign in while it runs, so a load that broke off is begun
 * anew.
 */
export async function loadDemo(): Promise<void> {
  const [state] = await select<{ accounts: number; keys: string[] }>(
    `select (select count(*)::int from accounts) as accounts,
       coalesce((select json_agg(key) from installation), '[]'::json) as keys`,
  );
  const keys = state?.keys ?? [];
  if (keys.includes(loaded)) return;
  if (keys.includes(begun)) await startOver();
  else if ((state?.accounts ?? 0) > 0) return;
  await note(begun);
  const accounts = new Map<string, string>();
  const club = await makeQuillmere(accounts);
  await makeSettled(club);
  await makeSplitting(club);
  await makeOpen(club);
  await DemoBuy.draft(club, parts, { name: 'Spring salts 2027' }, springLines);
  await makeSedgeholm(accounts);
  await note(loaded);
}
