import {
  decidePledge,
  plainWish,
  type PledgeFacts,
  type PledgeVerdict,
} from '#shared/domain/buys/pledgeRules.ts';
import type { PledgeBody, PledgeChange, PledgeReply } from '#shared/schemas/sheet.ts';
import { transact, type Tx } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { byActor } from '../buys/withBuy.ts';
import { overdueElsewhere } from '../ledger/owed.ts';
import { DomainProblem, forbidden, invalid, notFound, stale } from '../problem.ts';
import { lockForPledge, readPledgeGround, writePledge } from './pledgeRows.ts';
import type { LockedBuy, PledgeGround } from './pledgeRows.ts';
import { proposePledge } from './proposePledge.ts';
import { careOfSalt } from './saltOfLine.ts';
import { tellPledge } from './tellPledge.ts';

interface Where {
  readonly lineId: string;
  readonly membershipId: string;
}

function present(where: Where, ground: PledgeGround): PledgeChange {
  return {
    ...where,
    name: ground.member_name,
    guest: ground.member_guest,
    wantedMg: ground.wanted_mg ?? 0,
    upToMg: ground.up_to_mg,
    version: ground.version ?? 0,
    at: (ground.at ?? ground.now).toISOString(),
  };
}

function refusal(verdict: Extract<PledgeVerdict, { ok: false }>, now: PledgeChange) {
  const { code, detail, errors } = verdict;
  return errors ? invalid(errors) : new DomainProblem(409, code, detail, { current: now });
}

async function factsFor(
  buy: LockedBuy,
  ground: PledgeGround,
  { membershipId, own }: { membershipId: string; own: boolean },
  classified: boolean,
  tx: Tx,
): Promise<PledgeFacts> {
  const overdue = ground.overdue_somewhere ? await overdueElsewhere(membershipId, buy.id, tx) : [];
  return {
    state: buy.state,
    frozen: buy.frozen_at !== null,
    nowMs: ground.now.getTime(),
    closesAtMs: buy.closes_at?.getTime() ?? null,
    loweringFreezeHours: buy.lowering_freeze_hours,
    stepMg: ground.step_mg,
    before:
      ground.version === null ? null : { wantedMg: ground.wanted_mg ?? 0, upToMg: ground.up_to_mg },
    who: own ? 'member' : ground.member_guest ? 'organiserForGuest' : 'organiser',
    unconfirmed: classified && !ground.confirmed,
    overdueIn: overdue[0]?.buyName ?? null,
  };
}

/** `changePledge` inside a transaction that has more to do. */
export async function changePledgeIn(
  tx: Tx,
  actor: BuyActor,
  where: Where,
  body: PledgeBody,
): Promise<PledgeReply> {
  const own = where.membershipId === actor.membershipId;
  const wish = plainWish(body);
  const buy = await lockForPledge(actor.buy.id, tx);
  const ground = buy && (await readPledgeGround(buy.id, where.lineId, where.membershipId, tx));
  if (!buy || !ground) throw notFound('This line or member');
  const salt = await careOfSalt(buy.club_id, ground.salt_id, tx);
  const facts = await factsFor(buy, ground, { ...where, own }, salt.classified, tx);
  const now = present(where, ground);
  const unchanged = { sheetVersion: actor.buy.sheetVersion, pledge: now };

  const verdict = decidePledge(facts, wish);
  if (!verdict.ok) throw refusal(verdict, now);
  if (verdict.act === 'keep') return { ...unchanged, proposed: false };
  if (body.version !== now.version) {
    throw stale('This pledge was changed on another screen. This is what it is now.', now);
  }
  if (!ground.member_active && wish.wantedMg > now.wantedMg) {
    throw invalid({ wantedMg: `${ground.member_name} is no longer in the club.` });
  }
  if (verdict.act === 'propose') {
    await proposePledge(actor, buy, { ...where, ...wish, saltName: salt.name }, tx);
    return { ...unchanged, proposed: true };
  }
  const { before } = facts;
  const change = { buyId: buy.id, clubId: buy.club_id, ...where, ...wish, before };
  const keepsTurn = verdict.keepsTurn && before !== null;
  const written = await writePledge({ ...change, keepsTurn, by: byActor(actor) }, tx);
  const pledge = { ...now, ...wish, version: written.version, at: written.at.toISOString() };
  const { sheet_version: sheetVersion } = written;
  await tellPledge(
    tx,
    { buyId: buy.id, sheetVersion, pledge },
    {
      hidden: ground.hides_reportable && salt.reportable,
      ...(own ? {} : { changedFor: { actor, buy, salt, before: now } }),
    },
  );
  return { sheetVersion, pledge, proposed: false };
}

/**
 * Sets what a member wants on a line, for oneself or, as an organiser of the buy, for someone. One transaction: the
 * buy's lock, one read, one write. A repeat of what already stands changes nothing.
 * @throws DomainProblem 403 for another's pledge without organising the buy; 404; 409 `buy_locked`, `buy_frozen`,
 * `closing_soon`, `overdue_elsewhere`, `hazard_unconfirmed`, `stale`; 422 for grams that aren't whole steps
 */
export async function changePledge(
  actor: BuyActor,
  where: Where,
  body: PledgeBody,
): Promise<PledgeReply> {
  if (where.membershipId !== actor.membershipId && !actor.buy.organises) {
    throw forbidden("Only an organiser of the buy changes someone else's pledge.");
  }
  return transact((tx) => changePledgeIn(tx, actor, where, body));
}
