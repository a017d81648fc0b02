import { newBuyDates } from '#shared/domain/buys/newBuyDates.ts';
import type { BuyHeader } from '#shared/schemas/buys.ts';
import { databaseNow, select, transact, type Tx } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { readBuyHeaderAgain } from './readBuys.ts';
import { byActor } from './withBuy.ts';
import { zoneClock } from './zoneClock.ts';

const pickupRules =
  'Give your name or show your pass. Somebody else may collect for you if you name them first.';

/** A name that no buy of the club has yet: "January salts 2027", then "January salts 2027, 2". */
async function freeName(clubId: string, name: string, tx: Tx): Promise<string> {
  const rows = await select<{ name: string }>(
    "select name from buys where club_id = :clubId and state <> 'cancelled'",
    { clubId },
    tx,
  );
  const taken = new Set(rows.map((row) => row.name.toLowerCase()));
  for (let count = 1; ; count += 1) {
    const tried = count === 1 ? name : `${name}, ${count}`;
    if (!taken.has(tried.toLowerCase())) return tried;
  }
}

/** The fields of a new draft that depend on the day and the club: name, times, place. */
export async function newDraft(actor: ClubActor, name: string | undefined, tx: Tx) {
  const dates = newBuyDates(await databaseNow(tx), zoneClock(actor.club.timeZone));
  const [club] = await select<{ place_address: string }>(
    'select place_address from clubs where id = :clubId',
    { clubId: actor.club.id },
    tx,
  );
  return {
    clubId: actor.club.id,
    responsibleId: actor.membershipId,
    name: name ?? (await freeName(actor.club.id, dates.name, tx)),
    closesAt: dates.closesAt,
    splitsAt: dates.splitsAt,
    splitEndsAt: dates.splitEndsAt,
    place: club?.place_address ?? '',
    pickupRules,
  };
}

/** A new draft with sensible defaults; whoever makes it is responsible for it. */
export async function createBuy(actor: ClubActor, name: string | undefined): Promise<BuyHeader> {
  const id = await transact(async (tx) => {
    const buy = await Buy.create(await newDraft(actor, name, tx), {
      transaction: tx.transaction,
    });
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'buys.draft',
      subject: { type: 'buy', id: buy.id },
      after: { name: buy.name },
    });
    return buy.id;
  });
  return readBuyHeaderAgain(actor, id);
}
