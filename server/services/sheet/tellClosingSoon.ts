import { databaseNow, execute, select, transact, type Tx } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { clubOfBuy } from './clubOfBuy.ts';

const ahead = '24 hours';

async function tell(buy: Buy, closesAt: Date, tx: Tx): Promise<void> {
  const { slug, say } = await clubOfBuy(buy.clubId, tx);
  const members = await select<{ id: string; pledged: boolean }>(
    `select m.id, exists (select 1 from pledges p where p.buy_id = :buyId and p.membership_id = m.id
       and p.dropped_at is null and (p.wanted_mg > 0 or p.up_to_mg > 0)) as pledged
     from memberships m where m.club_id = :clubId and m.status = 'active' and not m.is_guest order by m.id`,
    { buyId: buy.id, clubId: buy.clubId },
    tx,
  );
  const pledged = new Set(members.filter((member) => member.pledged).map(({ id }) => id));
  const lowering =
    buy.loweringFreezeHours > 0 && buy.reopenReason === null
      ? [`In its last ${buy.loweringFreezeHours} hours only the organiser lowers a pledge.`]
      : [];
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'closing_soon',
    eventKey: `buy:${buy.id}:closing:${closesAt.toISOString()}`,
    to: members.map(({ id }) => id),
    content: (membershipId) => ({
      subject: `${buy.name} closes ${say.at(closesAt)}`,
      paragraphs: [
        pledged.has(membershipId)
          ? `You are in. Look over your pledge before ${buy.name} closes ${say.at(closesAt)}.`
          : `${buy.name} closes ${say.at(closesAt)}. Until then you can still pledge.`,
        ...lowering,
      ],
      action: { label: 'See the buy sheet', path: `/c/${slug}/buys/${buy.id}/sheet` },
    }),
  });
}

/** Tells each club's members, once per closing time, that a buy closes within a day. */
export async function tellClosingSoon(): Promise<void> {
  const soon = `state = 'open' and frozen_at is null and closes_at > clock_timestamp()
    and closes_at <= clock_timestamp() + interval '${ahead}' and opened_at <= closes_at - interval '${ahead}'
    and closing_told_for is distinct from closes_at`;
  const buys = await select<{ id: string }>(`select id from buys where ${soon}`);
  for (const { id } of buys) {
    await transact(async (tx) => {
      const buy = await Buy.lock(id, tx);
      const [still] = await select<{ id: string }>(
        `select id from buys where id = :id and ${soon}`,
        { id },
        tx,
      );
      if (!still || !buy.closesAt || buy.closesAt <= (await databaseNow(tx))) return;
      await tell(buy, buy.closesAt, tx);
      await execute('update buys set closing_told_for = closes_at where id = :id', { id }, tx);
    });
  }
}
