import type { PickupDesk } from '#shared/schemas/pickup.ts';
import { databaseNow, execute, select, transact, type Tx } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { tellBuyChanged } from '../orders/tellBuy.ts';
import { notFound, wrongState } from '../problem.ts';
import { finalOf } from '../splits/finalOf.ts';
import { portionsOf } from './portionsOf.ts';
import { readDesk } from './readDesk.ts';
import { tellReminder } from './tellPickup.ts';

const day = 86_400_000;

interface Waiting {
  buy_id: string;
  club_id: string;
  name: string;
  place: string;
  slug: string;
  currency: string;
  locale: string;
  time_zone: string;
  membership_id: string;
  reminders: number;
  until_at: Date;
}

async function waiting(where: string, values: Record<string, unknown>, tx: Tx): Promise<Waiting[]> {
  return select<Waiting>(
    `select b.id as buy_id, b.club_id, b.name, b.place, c.slug, c.currency, c.locale, c.time_zone, m.membership_id,
        m.reminders, b.pickup_at + make_interval(days => b.unclaimed_days) as until_at
     from buys b join clubs c on c.id = b.club_id join buy_members m on m.buy_id = b.id
     where b.state = 'pickup' and m.unclaimed_at is null and exists (
       select 1 from portions p where p.buy_id = b.id and p.membership_id = m.membership_id
         and p.state = 'done' and p.handed_over_at is null) and ${where}
     order by b.id, m.membership_id for update of m`,
    values,
    tx,
  );
}

async function remind(row: Waiting, tx: Tx): Promise<void> {
  await tellReminder(tx, {
    buyId: row.buy_id,
    clubId: row.club_id,
    buyName: row.name,
    place: row.place,
    club: { slug: row.slug, currency: row.currency, locale: row.locale, timeZone: row.time_zone },
    membershipId: row.membership_id,
    count: row.reminders + 1,
    untilAt: row.until_at,
  });
  await execute(
    'update buy_members set reminders = reminders + 1, updated_at = now() where buy_id = :buyId and membership_id = :memberId',
    { buyId: row.buy_id, memberId: row.membership_id },
    tx,
  );
}

/** Two reminders, after a third and after two thirds of the time in which a share waits. */
export async function remindUnclaimed(): Promise<void> {
  await transact(async (tx) => {
    const due = await waiting(
      `m.reminders < 2 and clock_timestamp() >= b.pickup_at + make_interval(days => b.unclaimed_days) * (m.reminders + 1) / 3.0`,
      {},
      tx,
    );
    for (const row of due) await remind(row, tx);
  });
}

/** Reminds one member now. */
export async function remindOne(actor: BuyActor, memberId: string): Promise<PickupDesk> {
  return withBuy(actor.buy.id, { states: ['pickup'] }, async (buy, tx) => {
    const [row] = await waiting(
      'b.id = :buyId and m.membership_id = :memberId',
      { buyId: buy.id, memberId },
      tx,
    );
    if (!row) throw notFound('Somebody who still has to collect');
    await remind(row, tx);
    return readDesk(actor, tx);
  });
}

/** What a member's portions cost them in the final share, by line, in minor units per milligram weighed. */
async function costOf(
  buyId: string,
  memberId: string,
  lineId: string,
  mg: number,
  tx: Tx,
): Promise<number> {
  const final = await finalOf(buyId, tx);
  const line = final?.sheet.members
    .find((member) => member.memberId === memberId)
    ?.lines.find((each) => each.lineId === lineId);
  if (!line || line.mg === 0) return 0;
  return Number((BigInt(line.costMinor) * BigInt(Math.min(mg, line.mg))) / BigInt(line.mg));
}

/**
 * Puts what a member has not collected in time on the shelf. They paid for it and get its goods value back once it is
 * sold; the buy's sums stay as they are.
 * @throws DomainProblem 409 before the time is over
 */
export async function putAway(actor: BuyActor, memberId: string): Promise<PickupDesk> {
  return withBuy(actor.buy.id, { states: ['pickup'] }, async (buy, tx) => {
    await Buy.lock(buy.id, tx);
    const until = new Date((buy.pickupAt?.getTime() ?? 0) + buy.unclaimedDays * day);
    const now = await databaseNow(tx);
    if (now < until) {
      throw wrongState(
        'Their share still waits for them: it goes to the shelf only when the time is over.',
        {
          until: until.toISOString(),
        },
      );
    }
    const left = (await portionsOf({ id: buy.id, clubId: buy.clubId }, tx, memberId)).filter(
      ({ handedOverAt }) => handedOverAt === null,
    );
    if (left.length === 0) throw notFound('Somebody who still has to collect');
    for (const portion of left) {
      await execute(
        `insert into shelf_stock (club_id, salt_id, buy_id, bag_id, lot, mg, cost_minor, origin, owed_to_id)
         select :clubId, :saltId, :buyId, p.bag_id, :lot, p.weighed_mg, :costMinor, 'unclaimed', :memberId
         from portions p where p.id = :portionId`,
        {
          clubId: buy.clubId,
          saltId: portion.saltId,
          buyId: buy.id,
          lot: portion.lot,
          costMinor: await costOf(buy.id, memberId, portion.lineId, portion.mg, tx),
          memberId,
          portionId: portion.id,
        },
        tx,
      );
      await execute(
        `update portions set state = 'void', void_reason = 'Not collected in time; on the shelf', voided_by_id = :byId,
           version = version + 1, updated_at = now() where id = :portionId`,
        { portionId: portion.id, byId: actor.membershipId },
        tx,
      );
    }
    await execute(
      'update buy_members set unclaimed_at = :now, version = version + 1, updated_at = now() where buy_id = :buyId and membership_id = :memberId',
      { buyId: buy.id, memberId, now },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'pickup.putAway',
      subject: { type: 'membership', id: memberId },
      after: { portions: left.map(({ code }) => code) },
    });
    tellBuyChanged(buy, 'terms', tx);
    return readDesk(actor, tx);
  });
}
