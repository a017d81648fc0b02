import type { HandOns, OfferHandOnBody } from '#shared/schemas/handOns.ts';
import { isUniqueViolation, select } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { getActiveMember } from '../buys/buyPeople.ts';
import { buyPath } from '../buys/editTerms.ts';
import { sayFor } from '../buys/sayTerms.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { DomainProblem, invalid } from '../problem.ts';
import { findSalt } from '../salts/saltsOfClub.ts';
import { findOwnLines } from './handOnRows.ts';
import { listHandOns } from './listHandOns.ts';
import { quoteHandOn } from './moveSnapshots.ts';

/** States between the lock and the end of pickup, in which a line may pass to somebody else. */
export const handOnStates = ['locked', 'ordered', 'arrived', 'splitting', 'pickup'] as const;

/**
 * Offers one's own line to another member; nothing moves until they accept.
 * @throws DomainProblem 409 outside lock to pickup or when it is offered already, 422 by field
 */
export async function offerHandOn(actor: BuyActor, body: OfferHandOnBody): Promise<HandOns> {
  const { lineId, toId } = body;
  await withBuy(actor.buy.id, { states: handOnStates }, async (buy, tx) => {
    const own = await findOwnLines(buy.id, actor.membershipId, tx);
    const line = own.find(({ line_id }) => line_id === lineId);
    if (!line) throw invalid({ lineId: 'You have nothing on this line that could be handed on.' });
    if (toId === actor.membershipId) throw invalid({ toId: 'It is yours already.' });
    const to = await getActiveMember(buy.clubId, toId, { organiser: false, field: 'toId' }, tx);
    const hand = { buyId: buy.id, lineId, fromId: actor.membershipId, toId };
    const quote = await quoteHandOn(hand, tx);
    const [made] = await select<{ id: string }>(
      'insert into hand_ons (buy_id, line_id, from_id, to_id) values (:buyId, :lineId, :fromId, :toId) returning id',
      hand,
      tx,
    ).catch((error: unknown) => {
      if (isUniqueViolation(error, 'hand_ons_open')) {
        const text = 'You have offered this line already. Take that offer back first.';
        throw new DomainProblem(409, 'already_there', text);
      }
      throw error;
    });
    if (!made) throw new Error('hand-on not written');
    const salt = (await findSalt(buy.clubId, line.salt_id, tx))?.name ?? line.salt_id;
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'buys.offerHandOn',
      subject: { type: 'hand_on', id: made.id },
      after: { lineId, salt, toId, to: to.displayName },
    });
    const say = sayFor(actor.club);
    await queueNotice(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      kind: 'handed_on',
      eventKey: `hand-on:${made.id}:offered`,
      to: [toId],
      content: {
        subject: `${actor.name} offers you ${salt.toLowerCase()} from ${buy.name}`,
        paragraphs: [
          `${actor.name} would hand on their ${salt.toLowerCase()} to you. It is yours, to pay and to collect, once you accept on the page of the buy.`,
        ],
        ...(quote
          ? {
              rows: [
                ['Grams', say.mass(quote.mg)],
                ['You would pay', say.money(quote.amountMinor)],
              ] as const,
            }
          : {}),
        action: { label: 'Answer', path: buyPath(actor, buy.id) },
      },
    });
  });
  return listHandOns(actor);
}
