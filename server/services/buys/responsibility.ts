import { editableStates } from '#shared/domain/buys/editableTerms.ts';
import type { BuyHeader } from '#shared/schemas/buys.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { Membership } from '../../models/Membership.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { invalid, notFound, wrongState } from '../problem.ts';
import { getActiveMember, stamp, tellRoom } from './buyPeople.ts';
import { buyPath } from './editTerms.ts';
import { readBuyHeaderAgain } from './readBuys.ts';
import { byActor, changeTerms, pledgersOf, withBuy } from './withBuy.ts';

const states = editableStates;

/** Hands the buy over: the former holder stays as co-organiser, everyone in the buy is told. */
async function passTo(
  actor: BuyActor,
  buy: Buy,
  to: Membership,
  reason: string,
  tx: Tx,
): Promise<void> {
  const formerId = buy.responsibleId;
  const organisers = await select<{ membership_id: string }>(
    'select membership_id from buy_organisers where buy_id = :buyId',
    { buyId: buy.id },
    tx,
  );
  buy.responsibleId = to.id;
  buy.offeredToId = null;
  await execute(
    'delete from buy_organisers where buy_id = :buyId and membership_id = :toId',
    { buyId: buy.id, toId: to.id },
    tx,
  );
  await execute(
    `insert into buy_organisers (buy_id, membership_id)
     select :buyId, id from memberships where id = :formerId and status = 'active' and is_organiser
     on conflict do nothing`,
    { buyId: buy.id, formerId },
    tx,
  );
  const said = `${to.displayName} is now responsible for the buy.`;
  await changeTerms(buy, said, byActor(actor), tx);
  await writeAudit(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    by: byActor(actor),
    action: 'buys.passResponsibility',
    subject: { type: 'buy', id: buy.id },
    before: { responsibleId: formerId },
    after: { responsibleId: to.id, name: to.displayName, ...(reason ? { reason } : {}) },
  });
  const involved = [
    ...(buy.openedAt ? await pledgersOf(buy.id, tx) : []),
    ...organisers.map((row) => row.membership_id),
    formerId,
    to.id,
  ];
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'role_changed',
    eventKey: `buy:${buy.id}:responsible:${buy.termsVersion}`,
    to: [...new Set(involved)].filter((id) => id !== actor.membershipId),
    content: {
      subject: `${buy.name}: ${to.displayName} is responsible now`,
      paragraphs: [said, ...(reason ? [`${actor.name} passed it on: ${reason}`] : [])],
      action: { label: 'See the buy', path: buyPath(actor, buy.id) },
    },
  });
  tellRoom(buy, tx);
}

/** Offers the buy to another organiser; nothing changes until they accept. */
export async function offerResponsibility(actor: BuyActor, toId: string): Promise<BuyHeader> {
  await withBuy(actor.buy.id, { states }, async (buy, tx) => {
    if (buy.responsibleId !== actor.membershipId)
      throw wrongState('Somebody else is responsible for the buy by now.');
    if (toId === buy.responsibleId) throw invalid({ toId: 'You are responsible already.' });
    const to = await getActiveMember(buy.clubId, toId, { organiser: true, field: 'toId' }, tx);
    if (buy.offeredToId === toId) return;
    buy.offeredToId = toId;
    await buy.save({ transaction: tx.transaction });
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'buys.offerResponsibility',
      subject: { type: 'buy', id: buy.id },
      after: { offeredToId: toId, name: to.displayName },
    });
    await queueNotice(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      kind: 'role_changed',
      eventKey: `buy:${buy.id}:offered:${toId}:${await stamp(tx)}`,
      to: [toId],
      content: {
        subject: `Will you take over ${buy.name}?`,
        paragraphs: [
          `${actor.name} asks you to become responsible for ${buy.name}. It passes to you once you accept on its page.`,
        ],
        action: { label: 'Answer', path: buyPath(actor, buy.id) },
      },
    });
    tellRoom(buy, tx);
  });
  return readBuyHeaderAgain(actor, actor.buy.id);
}

/** Takes an offer of responsibility back. */
export async function withdrawResponsibility(actor: BuyActor): Promise<BuyHeader> {
  await withBuy(actor.buy.id, { states }, async (buy, tx) => {
    if (!buy.offeredToId) return;
    buy.offeredToId = null;
    await buy.save({ transaction: tx.transaction });
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'buys.withdrawResponsibility',
      subject: { type: 'buy', id: buy.id },
    });
    tellRoom(buy, tx);
  });
  return readBuyHeaderAgain(actor, actor.buy.id);
}

/**
 * Accepts or declines the buy that was offered.
 * @throws DomainProblem 404 when it isn't offered to this organiser (any more)
 */
export async function answerResponsibility(actor: BuyActor, accept: boolean): Promise<void> {
  await withBuy(actor.buy.id, { states }, async (buy, tx) => {
    if (buy.offeredToId !== actor.membershipId) throw notFound('This offer');
    if (accept) {
      const needs = { organiser: true, field: 'accept' };
      const me = await getActiveMember(buy.clubId, actor.membershipId, needs, tx);
      await passTo(actor, buy, me, '', tx);
      return;
    }
    buy.offeredToId = null;
    await buy.save({ transaction: tx.transaction });
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'buys.declineResponsibility',
      subject: { type: 'buy', id: buy.id },
    });
    await queueNotice(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      kind: 'role_changed',
      eventKey: `buy:${buy.id}:declined:${actor.membershipId}:${await stamp(tx)}`,
      to: [buy.responsibleId],
      content: {
        subject: `${actor.name} can't take over ${buy.name}`,
        paragraphs: [`${actor.name} declined. You stay responsible for ${buy.name}.`],
        action: { label: 'See the buy', path: buyPath(actor, buy.id) },
      },
    });
    tellRoom(buy, tx);
  });
}

/** A steward passes the buy on because its holder can't act. */
export async function passResponsibility(
  actor: BuyActor,
  body: { toId: string; reason: string },
): Promise<BuyHeader> {
  await withBuy(actor.buy.id, { states }, async (buy, tx) => {
    if (body.toId === buy.responsibleId)
      throw invalid({ toId: 'This organiser is responsible already.' });
    const needs = { organiser: true, field: 'toId' };
    const to = await getActiveMember(buy.clubId, body.toId, needs, tx);
    await passTo(actor, buy, to, body.reason, tx);
  });
  return readBuyHeaderAgain(actor, actor.buy.id);
}
