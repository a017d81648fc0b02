import {
  decidePledge,
  loweringEnds,
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
import {
  groundOf,
  lockForPledge,
  readPledgeGround,
  totalOfLine,
  writePledge,
  writePledgeIfUnchanged,
} from './pledgeRows.ts';
import type { PledgeGround, PledgeWrite, WrittenPledge } from './pledgeRows.ts';
import { proposePledge } from './proposePledge.ts';
import { careOfSalt } from './saltOfLine.ts';
import { tellMember, tellSheets } from './tellPledge.ts';

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
  { membershipId }: Where,
  ground: PledgeGround,
  who: PledgeFacts['who'],
  classified: boolean,
  tx?: Tx,
): Promise<PledgeFacts> {
  const overdue = ground.overdue_somewhere
    ? await overdueElsewhere(membershipId, ground.id, tx)
    : [];
  return {
    state: ground.state,
    frozen: ground.frozen_at !== null,
    nowMs: ground.now.getTime(),
    closesAtMs: ground.closes_at?.getTime() ?? null,
    loweringFreezeHours: ground.lowering_freeze_hours,
    stepMg: ground.step_mg,
    before:
      ground.version === null ? null : { wantedMg: ground.wanted_mg ?? 0, upToMg: ground.up_to_mg },
    who,
    unconfirmed: classified && !ground.confirmed,
    overdueIn: overdue[0]?.buyName ?? null,
  };
}

/** What is decided on one reading of the ground. */
async function decide(
  actor: BuyActor,
  where: Where,
  body: PledgeBody,
  ground: PledgeGround | undefined,
  tx?: Tx,
) {
  if (!ground) throw notFound('This line or member');
  const own = where.membershipId === actor.membershipId;
  const who = own ? 'member' : ground.member_guest ? 'organiserForGuest' : 'organiser';
  const wish = plainWish(body);
  const salt = await careOfSalt(ground.club_id, ground.salt_id, tx);
  const facts = await factsFor(where, ground, who, salt.classified, tx);
  const now = present(where, ground);
  const verdict = decidePledge(facts, wish);
  if (!verdict.ok) throw refusal(verdict, now);
  if (verdict.act !== 'keep' && body.version !== now.version) {
    throw stale('This pledge was changed on another screen. This is what it is now.', now);
  }
  if (!ground.member_active && wish.wantedMg > now.wantedMg) {
    throw invalid({ wantedMg: `${ground.member_name} is no longer in the club.` });
  }
  const write: PledgeWrite = {
    buyId: ground.id,
    clubId: ground.club_id,
    ...where,
    ...wish,
    keepsTurn: verdict.act === 'save' && verdict.keepsTurn && facts.before !== null,
    by: byActor(actor),
    before: facts.before,
  };
  return { buy: ground, wish, salt, facts, now, verdict, write, own };
}

type Decision = Awaited<ReturnType<typeof decide>>;

function replyWith({ now, wish }: Decision, written: WrittenPledge): PledgeReply {
  const pledge = { ...now, ...wish, version: written.version, at: written.at.toISOString() };
  return { sheetVersion: written.sheet_version, pledge, proposed: false };
}

/** `changePledge` under the buy's lock, inside a transaction that may have more to do. */
export async function changePledgeIn(
  tx: Tx,
  actor: BuyActor,
  where: Where,
  body: PledgeBody,
): Promise<PledgeReply> {
  await lockForPledge(actor.buy.id, tx);
  const ground = await readPledgeGround(actor.buy.id, where, tx);
  const decision = await decide(actor, where, body, ground, tx);
  const { buy, wish, salt, now, verdict, own } = decision;
  const unchanged = { sheetVersion: actor.buy.sheetVersion, pledge: now };
  if (verdict.act === 'keep') return { ...unchanged, proposed: false };
  if (verdict.act === 'propose') {
    await proposePledge(actor, buy, { ...where, ...wish, saltName: salt.name }, tx);
    return { ...unchanged, proposed: true };
  }
  const reply = replyWith(decision, await writePledge(decision.write, tx));
  if (!own) await tellMember(tx, reply.pledge, { actor, buy, salt, before: now });
  const hidden = buy.hides_reportable && salt.reportable;
  const total = hidden ? await totalOfLine(where.lineId, tx) : null;
  tx.afterCommit(() => tellSheets(buy.id, reply, total));
  return reply;
}

/** Decides on what stands now and writes if it still stands under the lock; null leaves it to the careful way. */
async function changeAtOnce(
  actor: BuyActor,
  where: Where,
  body: PledgeBody,
): Promise<PledgeReply | null> {
  const ground = groundOf(actor);
  // Jobs and seeds make their actors without it.
  if (!ground) return null;
  const decision = await decide(actor, where, body, ground);
  const { buy, salt, facts, now, verdict } = decision;
  if (verdict.act === 'keep') {
    return { sheetVersion: actor.buy.sheetVersion, pledge: now, proposed: false };
  }
  const hidden = buy.hides_reportable && salt.reportable;
  if (verdict.act !== 'save' || hidden) return null;
  const lowers = decision.wish.wantedMg < now.wantedMg;
  const written = await writePledgeIfUnchanged(decision.write, {
    termsVersion: buy.terms_version,
    version: now.version,
    beforeMs: lowers ? loweringEnds(facts) : null,
  });
  if (!written) return null;
  const reply = replyWith(decision, written);
  tellSheets(buy.id, reply, null);
  return reply;
}

/**
 * Sets what a member wants on a line, for oneself or, as an organiser of the buy, for someone. One's own goes in one
 * statement that takes the buy's lock and looks again; everything else in one transaction: lock, read, write. A repeat
 * of what already stands changes nothing.
 * @throws DomainProblem 403 for another's pledge without organising the buy; 404; 409 `buy_locked`, `buy_frozen`,
 * `closing_soon`, `overdue_elsewhere`, `hazard_unconfirmed`, `stale`; 422 for grams that aren't whole steps
 */
export async function changePledge(
  actor: BuyActor,
  where: Where,
  body: PledgeBody,
): Promise<PledgeReply> {
  const own = where.membershipId === actor.membershipId;
  if (!own && !actor.buy.organises) {
    throw forbidden("Only an organiser of the buy changes someone else's pledge.");
  }
  const reply = own ? await changeAtOnce(actor, where, body) : null;
  return reply ?? transact((tx) => changePledgeIn(tx, actor, where, body));
}
