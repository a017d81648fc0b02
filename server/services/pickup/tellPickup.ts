import type { HandoverBody, PickupNoticeBody } from '#shared/schemas/pickup.ts';
import { select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { buyPath } from '../buys/editTerms.ts';
import { sayFor } from '../buys/sayTerms.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { owedOfBuy } from '../ledger/owed.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { invalid } from '../problem.ts';
import { calendarOfSlot } from './calendarOfSlot.ts';
import { passOf } from './passes.ts';
import type { PortionOfMember } from './portionsOf.ts';
import { readDesk } from './readDesk.ts';

type Row = readonly [label: string, value: string];

/**
 * Tells members when and where their share waits, with their pass and the calendar entry. The same `id` tells once.
 * @throws DomainProblem 422 when someone named has nothing to collect
 */
export async function tellPickup(
  actor: BuyActor,
  body: PickupNoticeBody,
): Promise<{ told: number }> {
  return withBuy(actor.buy.id, { states: ['pickup'] }, async (buy, tx) => {
    const desk = await readDesk(actor, tx);
    const waiting = new Map(
      desk.people
        .filter(({ portions }) => portions.some(({ handedOverAt }) => handedOverAt === null))
        .map((person) => [person.membershipId, person]),
    );
    const to = [...new Set(body.to)];
    if (to.some((id) => !waiting.has(id))) {
      throw invalid({ to: 'Someone chosen has nothing left to collect.' });
    }
    const say = sayFor(actor.club);
    const path = `${buyPath(actor, buy.id)}/pickup`;
    for (const memberId of to) {
      const person = waiting.get(memberId);
      const slot = desk.slots.find(({ id }) => id === person?.slotId);
      const place = slot?.place || buy.place;
      const startsAt = slot ? new Date(slot.startsAt) : buy.splitsAt;
      const rows: Row[] = [
        ['When', say.at(startsAt)],
        ...(place ? [['Where', place] as Row] : []),
        ...(person?.portions
          .filter(({ handedOverAt }) => handedOverAt === null)
          .map(({ salt, mg, code }): Row => [`${salt} (${code})`, say.mass(mg)]) ?? []),
        ...(person && (person.owedMinor ?? 0) > 0
          ? [['Still to pay', say.money(person.owedMinor ?? 0)] as Row]
          : []),
        ['Your pass', passOf(buy.id, memberId)],
      ];
      await queueNotice(tx, {
        clubId: buy.clubId,
        buyId: buy.id,
        kind: 'pickup',
        eventKey: `buy:${buy.id}:pickup:${body.id}`,
        to: [memberId],
        content: {
          subject: `Your share of ${buy.name} is ready`,
          paragraphs: [
            'Your share is weighed and labelled. Show your pass when you collect it, or send it to whoever collects for you.',
            ...(body.note ? [body.note] : []),
            ...(buy.pickupRules ? [buy.pickupRules] : []),
          ],
          rows,
          action: { label: 'See your pickup', path },
        },
        attachments: startsAt
          ? [
              calendarOfSlot({
                buyId: buy.id,
                buyName: buy.name,
                clubName: actor.club.name,
                startsAt,
                endsAt: slot ? new Date(slot.endsAt) : buy.splitEndsAt,
                place,
                path,
                sequence: buy.termsVersion,
              }),
            ]
          : [],
      });
    }
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'pickup.tell',
      subject: { type: 'buy', id: buy.id },
      after: { told: to.length },
    });
    return { told: to.length };
  });
}

/** Sends the receipt of a hand-over: what, how much, of which lots, with its hazards. */
export async function tellReceipt(
  actor: BuyActor,
  buy: Buy,
  body: HandoverBody,
  portions: readonly PortionOfMember[],
  tx: Tx,
): Promise<void> {
  const say = sayFor(actor.club);
  const hazards = [
    ...new Set(
      portions.flatMap(({ salt, signalWord, hazards: own }) =>
        own.length > 0 ? [`${salt}: ${signalWord ? `${signalWord}. ` : ''}${own.join(' ')}`] : [],
      ),
    ),
  ];
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'pickup',
    eventKey: `buy:${buy.id}:receipt:${body.id}`,
    to: [body.membershipId],
    content: {
      subject: `Collected: your share of ${buy.name}`,
      paragraphs: [
        body.collectedBy ? `${body.collectedBy} collected for you.` : 'You collected your share.',
        ...hazards,
        'Keep it dry, closed and labelled, away from children and food.',
      ],
      rows: [
        ...portions.map(({ salt, code, mg, lot }): Row => [
          `${salt} (${code}${lot ? `, lot ${lot}` : ''})`,
          say.mass(mg),
        ]),
        ['Handed over by', actor.name],
      ],
      action: { label: 'See your share', path: `${buyPath(actor, buy.id)}/pickup` },
    },
  });
}

/** Reminds one member of what waits or is owed; which time it is decides the words. */
export async function tellReminder(
  tx: Tx,
  reminder: {
    buyId: string;
    clubId: string;
    buyName: string;
    place: string;
    club: { slug: string; currency: string; locale: string; timeZone: string };
    membershipId: string;
    count: number;
    untilAt: Date;
  },
): Promise<void> {
  const say = sayFor(reminder.club);
  const owed = (await owedOfBuy(reminder.buyId, tx)).get(reminder.membershipId)?.openMinor ?? 0;
  const [row] = await select<{ portions: number }>(
    `select count(*)::int as portions from portions where buy_id = :buyId and membership_id = :membershipId
       and state = 'done' and handed_over_at is null`,
    { buyId: reminder.buyId, membershipId: reminder.membershipId },
    tx,
  );
  await queueNotice(tx, {
    clubId: reminder.clubId,
    buyId: reminder.buyId,
    kind: 'unclaimed',
    eventKey: `buy:${reminder.buyId}:unclaimed:${reminder.count}`,
    to: [reminder.membershipId],
    content: {
      subject: `Your share of ${reminder.buyName} still waits`,
      paragraphs: [
        `${row?.portions ?? 0} of your containers wait${reminder.place ? ` at ${reminder.place}` : ''}. Say when you come, or send your pass to someone who can.`,
        `What is not collected by ${say.at(reminder.untilAt)} goes to the club’s shelf. You get its value back once it is sold.`,
      ],
      rows: [
        ...(owed > 0 ? [['Still to pay', say.money(owed)] as Row] : []),
        ['Your pass', passOf(reminder.buyId, reminder.membershipId)],
      ],
      action: {
        label: 'See your pickup',
        path: `/c/${reminder.club.slug}/buys/${reminder.buyId}/pickup`,
      },
    },
  });
}
