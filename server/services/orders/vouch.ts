import { execute, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { notFound, wrongState } from '../problem.ts';
import { loadOrderBook, type BookMember } from './orderBook.ts';
import { tellBuyChanged } from './tellBuy.ts';

const states = ['locked', 'ordered', 'arrived', 'splitting', 'pickup'] as const;

async function livingMember(buy: Buy, memberId: string, tx: Tx): Promise<BookMember> {
  const member = (await loadOrderBook(buy.id, tx)).members.get(memberId);
  if (!member) throw notFound('This member');
  if (member.dropped) throw wrongState(`${member.name} is not in this buy any more.`);
  return member;
}

/** Somebody answers with their name for a member who hasn't paid: the order may go out, and the share be handed over. */
export async function vouchFor(actor: BuyActor, memberId: string, reason: string): Promise<void> {
  await withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const member = await livingMember(buy, memberId, tx);
    await execute(
      `update buy_members set vouched_by_id = :byId, vouched_reason = :reason, vouched_at = clock_timestamp(),
         version = version + 1, updated_at = now()
       where buy_id = :buyId and membership_id = :memberId`,
      { byId: actor.membershipId, reason, buyId: buy.id, memberId },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'orders.vouch',
      subject: { type: 'membership', id: memberId },
      after: { member: member.name, reason },
    });
    tellBuyChanged(buy, 'terms', tx);
  });
}

/** Takes a word back. */
export async function unvouch(actor: BuyActor, memberId: string): Promise<void> {
  await withBuy(actor.buy.id, { states }, async (buy, tx) => {
    const member = await livingMember(buy, memberId, tx);
    if (member.vouchedBy === null) return;
    await execute(
      `update buy_members set vouched_by_id = null, vouched_reason = null, vouched_at = null,
         version = version + 1, updated_at = now()
       where buy_id = :buyId and membership_id = :memberId`,
      { buyId: buy.id, memberId },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'orders.unvouch',
      subject: { type: 'membership', id: memberId },
      before: { member: member.name, vouchedBy: member.vouchedBy },
    });
    tellBuyChanged(buy, 'terms', tx);
  });
}
