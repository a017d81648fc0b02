import { paymentKinds } from '#shared/domain/notices/noticeKinds.ts';
import type {
  Delivery,
  DeliveryList,
  NoticeDraft,
  SendNoticeBody,
} from '#shared/schemas/notices.ts';
import { select, type Tx } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { buyPath } from '../buys/editTerms.ts';
import { sayFor } from '../buys/sayTerms.ts';
import { splitDayCalendar } from '../buys/splitDayCalendar.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { invalid } from '../problem.ts';
import { queueNotice } from './queueNotice.ts';

interface DeliveryRow {
  id: string;
  kind: Delivery['kind'];
  subject: string;
  name: string;
  state: Delivery['state'];
  sent_at: Date | null;
  created_at: Date;
  error: string | null;
}

/** How a buy's notices fared, newest first, at most 1,000. What tells of payments is the treasurer's alone. */
export async function listDeliveries(actor: BuyActor): Promise<DeliveryList> {
  const rows = await select<DeliveryRow>(
    `select n.id, n.kind, n.subject, m.display_name as name, coalesce(o.state, 'app') as state,
        o.sent_at, n.created_at, o.last_error as error
     from notices n join memberships m on m.id = n.membership_id
     left join outbox o on o.notice_id = n.id
     where n.buy_id = :buyId and (:treasurer or n.kind not in (:paymentKinds)) and (:organises or n.kind in (:paymentKinds))
     order by n.created_at desc, lower(m.display_name), n.id limit 1000`,
    {
      buyId: actor.buy.id,
      treasurer: actor.roles.treasurer,
      organises: actor.buy.organises,
      paymentKinds,
    },
  );
  return {
    deliveries: rows.map((row) => ({
      id: row.id,
      kind: row.kind,
      subject: row.subject,
      name: row.name,
      state: row.state,
      sentAt: row.sent_at?.toISOString() ?? null,
      createdAt: row.created_at.toISOString(),
      error: row.error,
    })),
  };
}

interface PersonRow {
  id: string;
  name: string;
  email: string | null;
  takes_part: boolean;
  notice_off: string[];
}

async function people(actor: BuyActor, tx?: Tx): Promise<PersonRow[]> {
  return select<PersonRow>(
    `select m.id, m.display_name as name, m.notice_off,
        coalesce(a.email, case when m.guest_contact ~ '^[^@ ]+@[^@ ]+$' then m.guest_contact end) as email,
        exists (select 1 from pledges p where p.buy_id = :buyId and p.membership_id = m.id
          and p.dropped_at is null and p.wanted_mg > 0) as takes_part
     from memberships m left join accounts a on a.id = m.account_id and a.deleted_at is null
     where m.club_id = :clubId and (m.status = 'active' or exists (
       select 1 from pledges p where p.buy_id = :buyId and p.membership_id = m.id and p.dropped_at is null))
     order by lower(m.display_name), m.id`,
    { buyId: actor.buy.id, clubId: actor.club.id },
    tx,
  );
}

/** Words to start from and whom they could go to. */
export async function draftNotice(actor: BuyActor): Promise<NoticeDraft> {
  const [buy] = await select<{
    name: string;
    splits_at: Date | null;
    place: string;
    pickup_rules: string;
  }>('select name, splits_at, place, pickup_rules from buys where id = :id', { id: actor.buy.id });
  if (!buy) throw new Error('buy missing');
  const say = sayFor(actor.club);
  const where = buy.place ? ` at ${buy.place}` : '';
  const splitDay = {
    kind: 'split_day' as const,
    subject: `Split day of ${buy.name}`,
    body: [
      `We split ${buy.name} on ${say.at(buy.splits_at)}${where}.`,
      buy.pickup_rules,
      'Bring closed containers with a label, no kitchen ware. Gloves and goggles are there.',
    ]
      .filter(Boolean)
      .join('\n\n'),
  };
  return {
    templates: [
      { kind: 'message', subject: buy.name, body: '' },
      ...(buy.splits_at ? [splitDay] : []),
    ],
    recipients: (await people(actor)).map((person) => ({
      membershipId: person.id,
      name: person.name,
      takesPart: person.takes_part,
      reach: person.email && !person.notice_off.includes('message') ? 'mail' : 'app',
    })),
  };
}

/**
 * Sends a notice in the organiser's own words. The same `id` sends once.
 * @throws DomainProblem 422 when someone named is not of this club, or the split day has no time yet
 */
export async function sendBuyNotice(
  actor: BuyActor,
  body: SendNoticeBody,
): Promise<{ sent: number }> {
  return withBuy(actor.buy.id, {}, async (buy, tx) => {
    const known = new Set((await people(actor, tx)).map(({ id }) => id));
    const to = [...new Set(body.to)];
    if (to.some((id) => !known.has(id)))
      throw invalid({ to: 'Someone chosen is no longer in this club.' });
    if (body.kind === 'split_day' && !buy.splitsAt)
      throw invalid({ kind: 'Set the split day first.' });
    await queueNotice(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      kind: body.kind,
      eventKey: `buy:${buy.id}:message:${body.id}`,
      to,
      content: {
        subject: body.subject,
        paragraphs: body.body.split(/\n{2,}/),
        action: { label: 'Open the buy', path: buyPath(actor, buy.id) },
      },
      attachments:
        body.kind === 'split_day' && buy.splitsAt
          ? [
              splitDayCalendar({
                buyId: buy.id,
                buyName: buy.name,
                clubName: actor.club.name,
                startsAt: buy.splitsAt,
                endsAt: buy.splitEndsAt,
                place: buy.place,
                description: buy.pickupRules,
                sequence: buy.termsVersion,
                path: buyPath(actor, buy.id),
              }),
            ]
          : [],
    });
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'notices.send',
      subject: { type: 'buy', id: buy.id },
      after: {
        kind: body.kind,
        subject: body.subject,
        to: to.length,
      },
    });
    return { sent: to.length };
  });
}
