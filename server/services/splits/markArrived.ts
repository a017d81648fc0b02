import { isIn, type OrderState } from '#shared/domain/orders/orderTypes.ts';
import { databaseNow, select } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { splitDayCalendar } from '../buys/splitDayCalendar.ts';
import { sayFor } from '../buys/sayTerms.ts';
import { byActor, changeTerms, pledgersOf, withBuy } from '../buys/withBuy.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { tellBuyChanged } from '../orders/tellBuy.ts';
import { wrongState } from '../problem.ts';
import { createUncountedBags } from './createBags.ts';

/**
 * Moves a buy from ordered to arrived, once each supplier's order is arrived, short or failed; everyone who pledged is
 * told when the split is.
 * @throws DomainProblem 409 naming the supplier that is still to come
 */
export async function markArrived(actor: BuyActor, termsVersion: number): Promise<void> {
  await withBuy(actor.buy.id, { states: ['ordered'], termsVersion }, async (buy, tx) => {
    const orders = await select<{ name: string; state: OrderState }>(
      `select s.name, o.state from supplier_orders o join suppliers s on s.id = o.supplier_id
       where o.buy_id = :buyId and o.state <> 'draft' order by s.name`,
      { buyId: buy.id },
      tx,
    );
    const waiting = orders.filter(({ state }) => !isIn(state)).map(({ name }) => name);
    if (waiting.length > 0) throw wrongState(`Still to come: ${waiting.join(', ')}.`);
    await createUncountedBags(buy.id, tx);
    buy.state = 'arrived';
    buy.arrivedAt = await databaseNow(tx);
    await changeTerms(buy, 'The packs have arrived.', byActor(actor), tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'splits.arrived',
      subject: { type: 'buy', id: buy.id },
      before: { state: 'ordered' },
      after: { state: 'arrived' },
    });
    const path = `/c/${actor.club.slug}/buys/${buy.id}`;
    const say = sayFor(actor.club);
    await queueNotice(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      kind: 'arrived',
      eventKey: `buy:${buy.id}:arrived`,
      to: await pledgersOf(buy.id, tx),
      content: {
        subject: `The packs for ${buy.name} are here`,
        paragraphs: [
          'The packs have arrived. Next they are weighed and shared out.',
          buy.splitsAt
            ? `The split is on ${say.at(buy.splitsAt)}${buy.place ? `, ${buy.place}` : ''}.`
            : 'The organiser will say when the split is.',
        ],
        action: { label: 'See the buy', path },
      },
      attachments: buy.splitsAt
        ? [
            splitDayCalendar({
              buyId: buy.id,
              buyName: buy.name,
              clubName: actor.club.name,
              startsAt: buy.splitsAt,
              endsAt: buy.splitEndsAt,
              place: buy.place,
              description: `Split day of ${buy.name}.`,
              sequence: buy.termsVersion,
              path,
            }),
          ]
        : [],
    });
    tellBuyChanged(buy, 'state', tx);
  });
}
