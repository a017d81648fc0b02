import type { HandoverBody, PickupDesk } from '#shared/schemas/pickup.ts';
import { databaseNow, execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { tellBuyChanged } from '../orders/tellBuy.ts';
import { DomainProblem, invalid, notFound, stale, wrongState } from '../problem.ts';
import { changeSplit } from '../splits/changeSplit.ts';
import { findByPass } from './passes.ts';
import { portionsOf, type PortionOfMember } from './portionsOf.ts';
import { readDesk } from './readDesk.ts';
import { eraseRecordsOf, writeRecords } from './records.ts';
import { tellReceipt } from './tellPickup.ts';

type Person = PickupDesk['people'][number];

async function chosenPortions(buy: Buy, body: HandoverBody, tx: Tx): Promise<PortionOfMember[]> {
  await select(
    'select id from portions where buy_id = :buyId and id in (:ids) order by id for update',
    {
      buyId: buy.id,
      ids: body.portionIds,
    },
    tx,
  );
  const own = await portionsOf({ id: buy.id, clubId: buy.clubId }, tx, body.membershipId);
  const chosen = own.filter(({ id }) => body.portionIds.includes(id));
  if (chosen.length !== new Set(body.portionIds).size) {
    throw invalid({ portionIds: 'One of these is not a weighed portion of this member.' });
  }
  const gone = chosen.filter(({ handedOverAt }) => handedOverAt !== null);
  if (gone.length > 0) {
    throw stale(
      `Handed over already: ${gone.map(({ code, salt }) => `${salt} (${code})`).join(', ')}.`,
      {
        portionIds: gone.map(({ id }) => id),
      },
    );
  }
  return chosen;
}

function requireClear(
  person: Person,
  chosen: readonly PortionOfMember[],
  body: HandoverBody,
): void {
  if (!person.paid && person.vouchedBy === null) {
    throw new DomainProblem(
      409,
      'still_owed',
      `${person.name} still owes for this buy. Note what they pay, or let the organiser or treasurer vouch for them.`,
      { current: { owedMinor: person.owedMinor } },
    );
  }
  const classified = new Set(chosen.map(({ saltId }) => saltId));
  const papers = person.papersMissing.filter(({ saltId }) => classified.has(saltId));
  if (papers.length > 0) {
    throw invalid({
      portionIds: `The signed paper for ${papers.map(({ salt }) => salt).join(', ')} is missing.`,
    });
  }
  const recorded = chosen.some(({ reportable }) => reportable);
  if (recorded && !person.legalNameKnown && !body.legalName) {
    throw invalid({
      legalName: 'This salt is recorded with the name in the passport. Ask for it.',
    });
  }
}

async function keep(actor: BuyActor, buy: Buy, body: HandoverBody, tx: Tx): Promise<void> {
  await execute(
    `insert into handovers (id, buy_id, membership_id, method, collected_by, handed_by_id)
     values (:id, :buyId, :membershipId, :method, :collectedBy, :byId)`,
    {
      id: body.id,
      buyId: buy.id,
      membershipId: body.membershipId,
      method: body.method,
      collectedBy: body.collectedBy,
      byId: actor.membershipId,
    },
    tx,
  );
  await execute(
    `update portions set handed_over_at = clock_timestamp(), handover_id = :id, version = version + 1, updated_at = now()
     where buy_id = :buyId and id in (:portionIds)`,
    { id: body.id, buyId: buy.id, portionIds: body.portionIds },
    tx,
  );
  await execute(
    `insert into buy_members (buy_id, membership_id) values (:buyId, :membershipId) on conflict do nothing`,
    { buyId: buy.id, membershipId: body.membershipId },
    tx,
  );
  await markCollected(buy.id, body.membershipId, tx);
}

/** Whether all of a member's portions are handed over decides `collected_at`. */
async function markCollected(buyId: string, membershipId: string, tx: Tx): Promise<void> {
  await execute(
    `update buy_members set updated_at = now(), version = version + 1, collected_at = case when exists (
        select 1 from portions p where p.buy_id = :buyId and p.membership_id = :membershipId
          and p.state = 'done' and p.handed_over_at is null) then null else coalesce(collected_at, clock_timestamp()) end
     where buy_id = :buyId and membership_id = :membershipId`,
    { buyId, membershipId },
    tx,
  );
}

/**
 * Hands portions to their member, or to who collects for them. Sending it again changes nothing.
 * @throws DomainProblem 409 `still_owed`, `stale` when one is handed over already; 422 for a missing paper, legal name,
 * or a pass of somebody else
 */
export async function handOver(actor: BuyActor, body: HandoverBody): Promise<PickupDesk> {
  return withBuy(actor.buy.id, {}, async (buy, tx) => {
    const [known] = await select<{ membership_id: string }>(
      'select membership_id from handovers where id = :id and buy_id = :buyId',
      { id: body.id, buyId: buy.id },
      tx,
    );
    if (known) return readDesk(actor, tx);
    if (buy.state !== 'pickup') {
      throw wrongState(`Nothing is handed over while the buy is ${buy.state}.`, {
        state: buy.state,
      });
    }
    if (
      body.method === 'pass' &&
      (await findByPass(buy.id, body.pass ?? '', tx)) !== body.membershipId
    ) {
      throw invalid({ pass: 'This pass is somebody else’s.' });
    }
    const chosen = await chosenPortions(buy, body, tx);
    const person = (await readDesk(actor, tx)).people.find(
      ({ membershipId }) => membershipId === body.membershipId,
    );
    if (!person) throw notFound('This member');
    requireClear(person, chosen, body);
    const recorded = chosen.filter(({ reportable }) => reportable);
    if (recorded.length > 0 && body.legalName) {
      await execute(
        'update memberships set legal_name = :legalName, updated_at = now() where id = :id',
        { legalName: body.legalName, id: body.membershipId },
        tx,
      );
    }
    await keep(actor, buy, body, tx);
    await writeRecords(
      actor,
      { handoverId: body.id, membershipId: body.membershipId },
      recorded,
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'pickup.handOver',
      subject: { type: 'membership', id: body.membershipId },
      after: {
        member: person.name,
        collectedBy: body.collectedBy || person.name,
        method: body.method,
        portions: chosen.map(({ code }) => code),
      },
    });
    await tellReceipt(actor, buy, body, chosen, tx);
    await changeSplit(buy, { portionIds: body.portionIds }, tx);
    tellBuyChanged(buy, 'terms', tx);
    return readDesk(actor, tx);
  });
}

/** Takes a hand-over back, by who made it or an organiser; a second time changes nothing. */
export async function undoHandover(actor: BuyActor, handoverId: string): Promise<PickupDesk> {
  return withBuy(actor.buy.id, { states: ['pickup'] }, async (buy, tx) => {
    const [row] = await select<{
      membership_id: string;
      handed_by_id: string;
      undone_at: Date | null;
    }>(
      'select membership_id, handed_by_id, undone_at from handovers where id = :handoverId and buy_id = :buyId',
      { handoverId, buyId: buy.id },
      tx,
    );
    if (!row) throw notFound('This hand-over');
    if (row.undone_at) return readDesk(actor, tx);
    if (row.handed_by_id !== actor.membershipId && !actor.buy.organises) {
      throw new DomainProblem(
        403,
        'forbidden',
        'Only who handed it over, or an organiser, takes it back.',
      );
    }
    const portions = await select<{ id: string; code: string }>(
      `update portions set handed_over_at = null, handover_id = null, version = version + 1, updated_at = now()
       where handover_id = :handoverId returning id, code`,
      { handoverId },
      tx,
    );
    await execute(
      'update handovers set undone_at = :now where id = :handoverId',
      { handoverId, now: await databaseNow(tx) },
      tx,
    );
    await eraseRecordsOf(handoverId, tx);
    await markCollected(buy.id, row.membership_id, tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'pickup.undoHandOver',
      subject: { type: 'membership', id: row.membership_id },
      before: { portions: portions.map(({ code }) => code) },
    });
    await changeSplit(buy, { portionIds: portions.map(({ id }) => id) }, tx);
    tellBuyChanged(buy, 'terms', tx);
    return readDesk(actor, tx);
  });
}
