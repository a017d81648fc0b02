import { randomUUID } from 'node:crypto';
import { estimateOf, packRequestOf, shareRequestOf } from '#shared/domain/buys/requests.ts';
import { planPacks } from '#shared/domain/packs/planPacks.ts';
import type { ShareSheet } from '#shared/domain/shares/shareTypes.ts';
import { execute, select, transact } from '#server/config/database.ts';
import { Line } from '#server/models/Line.ts';
import { loadPledges, loadSheetTerms } from '#server/services/buys/loadSheetTerms.ts';
import { makeMember, makeWorld, type Person, type World } from './world.ts';

export interface LockedWorld extends World {
  readonly payers: readonly [Person, Person, Person];
  readonly second: Line;
  readonly suppliers: { readonly salts: string; readonly other: string };
  /** Offer ids: 25 kg and 1 kg of potassium nitrate from `salts`, 5 kg of magnesium sulfate from `other`. */
  readonly offers: { readonly sack: string; readonly kilo: string; readonly magnesium: string };
  readonly sheet: ShareSheet;
  dueOf(person: Person): number;
}

async function makeOffer(
  clubId: string,
  supplierId: string,
  saltId: string,
  packMg: number,
  priceMinor: number,
): Promise<string> {
  const id = randomUUID();
  await transact((tx) =>
    execute(
      `insert into offers (id, club_id, supplier_id, salt_id, pack_mg, price_minor, tax_rate_ppm)
       values (:id, :clubId, :supplierId, :saltId, :packMg, :priceMinor, 190000)`,
      { id, clubId, supplierId, saltId, packMg, priceMinor },
      tx,
    ),
  );
  return id;
}

/** A supplier with flat shipping. */
export async function makeSupplier(
  clubId: string,
  name: string,
  shippingMinor: number,
  isShelf = false,
): Promise<string> {
  const id = randomUUID();
  await transact((tx) =>
    execute(
      'insert into suppliers (id, club_id, name, email, shipping, is_shelf) values (:id, :clubId, :name, :email, :shipping, :isShelf)',
      {
        id,
        clubId,
        name,
        email: `orders@${name.toLowerCase().replace(/\W+/g, '')}.example`,
        shipping: JSON.stringify({ kind: 'flat', minor: shippingMinor }),
        isShelf,
      },
      tx,
    ),
  );
  return id;
}

/** Writes the estimate, the dues and the state, as a lock leaves them. */
export async function lockWorldBuy(buyId: string): Promise<ShareSheet> {
  const terms = await loadSheetTerms(buyId);
  const pledges = await loadPledges(buyId);
  const plan = planPacks(packRequestOf(terms, pledges));
  const sheet = estimateOf(terms, pledges, plan);
  await transact(async (tx) => {
    await execute(
      `insert into snapshots (buy_id, kind, terms_version, request, sheet, plan, terms)
       values (:buyId, 'estimate', :termsVersion, :request, :sheet, :plan, :terms)`,
      {
        buyId,
        termsVersion: terms.termsVersion,
        request: JSON.stringify(shareRequestOf(terms, pledges, plan)),
        sheet: JSON.stringify(sheet),
        plan: JSON.stringify(plan),
        terms: JSON.stringify(terms),
      },
      tx,
    );
    for (const { memberId, totalMinor } of sheet.members) {
      await execute(
        `insert into buy_members (buy_id, membership_id, locked_minor, due_minor)
         values (:buyId, :memberId, :totalMinor, :totalMinor)`,
        { buyId, memberId, totalMinor },
        tx,
      );
    }
    await execute(
      `update buys set state = 'locked', locked_at = now(), due_at = now() + interval '5 days',
         terms_version = terms_version + 1 where id = :buyId`,
      { buyId },
      tx,
    );
  });
  return sheet;
}

/**
 * A world whose buy is locked with three payers: 13 kg, 8 kg and 2 kg of potassium nitrate, and 2 kg and 1 kg of
 * magnesium sulfate from another supplier.
 */
export async function makeLockedWorld(): Promise<LockedWorld> {
  const world = await makeWorld('open');
  const { club, buy, line } = world;
  const payers = [
    await makeMember(club, 'Ana Payer'),
    await makeMember(club, 'Ben Payer'),
    await makeMember(club, 'Cleo Payer'),
  ] as const;
  const second = await Line.create({ buyId: buy.id, saltId: 'MgSO4.7H2O', position: 1 });
  const suppliers = {
    salts: await makeSupplier(club.id, 'Grainmoor Salts', 1200),
    other: await makeSupplier(club.id, 'Tidewell Supply', 690),
  };
  const offers = {
    sack: await makeOffer(club.id, suppliers.salts, line.saltId, 25_000_000, 9500),
    kilo: await makeOffer(club.id, suppliers.salts, line.saltId, 1_000_000, 690),
    magnesium: await makeOffer(club.id, suppliers.other, second.saltId, 5_000_000, 1150),
  };
  await transact(async (tx) => {
    for (const [lineId, offerId] of [
      [line.id, offers.sack],
      [line.id, offers.kilo],
      [second.id, offers.magnesium],
    ]) {
      await execute(
        'insert into line_offers (line_id, offer_id) values (:lineId, :offerId)',
        { lineId, offerId },
        tx,
      );
    }
    const pledges = [
      [line, payers[0], 13_000_000],
      [line, payers[1], 8_000_000],
      [line, payers[2], 2_000_000],
      [second, payers[0], 2_000_000],
      [second, payers[2], 1_000_000],
    ] as const;
    for (const [index, [{ id: lineId }, person, wantedMg]] of pledges.entries()) {
      await execute(
        `insert into pledges (buy_id, line_id, membership_id, wanted_mg, at)
         values (:buyId, :lineId, :memberId, :wantedMg, now() - interval '1 day' + :index * interval '1 minute')`,
        { buyId: buy.id, lineId, memberId: person.membership.id, wantedMg, index },
        tx,
      );
    }
  });
  const sheet = await lockWorldBuy(buy.id);
  await buy.reload();
  return {
    ...world,
    payers,
    second,
    suppliers,
    offers,
    sheet,
    dueOf: (person) =>
      sheet.members.find(({ memberId }) => memberId === person.membership.id)?.totalMinor ?? 0,
  };
}

/** The books' sum over all accounts of a club, and whether each transaction balances by itself. */
export async function booksOf(clubId: string): Promise<{ sum: number; unbalanced: number }> {
  const rows = await select<{ sum: number }>(
    `select sum(p.amount_minor)::bigint as sum from ledger_transactions t
     join ledger_postings p on p.transaction_id = t.id where t.club_id = :clubId group by t.id`,
    { clubId },
  );
  return {
    sum: rows.reduce((total, row) => total + row.sum, 0),
    unbalanced: rows.filter((row) => row.sum !== 0).length,
  };
}

/** Sum of one account, by kind and whose it is. */
export async function accountSum(clubId: string, kind: string, refId?: string): Promise<number> {
  const [row] = await select<{ sum: number | null }>(
    `select sum(p.amount_minor)::bigint as sum from ledger_accounts a join ledger_postings p on p.account_id = a.id
     where a.club_id = :clubId and a.kind = :kind and a.ref_id is not distinct from :refId::uuid`,
    { clubId, kind, refId: refId ?? null },
  );
  return row?.sum ?? 0;
}

/** Makes a person overdue: the buy's due day is past. */
export async function passDueDay(buyId: string): Promise<void> {
  await transact((tx) =>
    execute("update buys set due_at = now() - interval '1 day' where id = :buyId", { buyId }, tx),
  );
}
