import type { AgreementBody } from '#shared/schemas/orders.ts';
import { execute } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { DomainProblem, stale, wrongState } from '../problem.ts';
import { dropUnderLock } from './dropMembers.ts';
import { ordersPlaced } from './findOrders.ts';
import { loadOrderBook, type BookMember } from './orderBook.ts';
import { planWithout } from './planAnew.ts';

function checkAsked(member: BookMember | undefined, shareMinor: number): BookMember {
  if (!member || member.dropped) throw wrongState('You are not in this buy any more.');
  if (member.overLimitMinor === null) throw wrongState('Your share is within the price limit.');
  if (member.overLimitMinor !== shareMinor) {
    throw stale('Your share has changed since you opened the page. Look at it again.', {
      shareMinor: member.overLimitMinor,
    });
  }
  return member;
}

async function agree(actor: BuyActor, shareMinor: number): Promise<void> {
  await withBuy(actor.buy.id, { states: ['locked'] }, async (buy, tx) => {
    const book = await loadOrderBook(buy.id, tx);
    checkAsked(book.members.get(actor.membershipId), shareMinor);
    await execute(
      `update buy_members set agreed_at = clock_timestamp(), version = version + 1, updated_at = now()
       where buy_id = :buyId and membership_id = :memberId`,
      { buyId: buy.id, memberId: actor.membershipId },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'orders.agree',
      subject: { type: 'membership', id: actor.membershipId },
      after: { shareMinor },
    });
  });
}

async function leave(actor: BuyActor, shareMinor: number): Promise<void> {
  for (let attempt = 1; ; attempt += 1) {
    const seen = await Buy.findByPk(actor.buy.id, { rejectOnEmpty: true });
    const book = await loadOrderBook(seen.id);
    checkAsked(book.members.get(actor.membershipId), shareMinor);
    const memberIds = new Set([actor.membershipId]);
    const estimate = await planWithout(book, memberIds, seen.planOverride);
    try {
      await withBuy(
        seen.id,
        { states: ['locked'], termsVersion: seen.termsVersion },
        async (buy, tx) => {
          if (await ordersPlaced(buy.id, tx)) {
            throw wrongState('An order is placed already. Talk to the organiser.');
          }
          await dropUnderLock(
            buy,
            actor.club,
            {
              memberIds,
              reason: 'You left because the price rose past the limit.',
              summary: `${actor.name} left because the price rose past the limit.`,
              estimate,
              action: 'orders.leave',
            },
            byActor(actor),
            tx,
          );
        },
      );
      return;
    } catch (error) {
      // Somebody else's act came between the plan and the lock: plan anew.
      const again = error instanceof DomainProblem && error.code === 'stale' && attempt < 5;
      if (!again) throw error;
    }
  }
}

/**
 * A member whose share rose past the price limit agrees to it, or leaves the buy free of charge.
 * @throws DomainProblem 409 when the share isn't the one they saw, or nothing is asked
 */
export async function answerPriceLimit(actor: BuyActor, body: AgreementBody): Promise<void> {
  await (body.agree ? agree(actor, body.shareMinor) : leave(actor, body.shareMinor));
}
