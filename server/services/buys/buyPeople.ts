import { editableStates } from '#shared/domain/buys/editableTerms.ts';
import type { BuyCandidates } from '#shared/schemas/buyPeople.ts';
import type { BuyHeader } from '#shared/schemas/buys.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import { Membership } from '../../models/Membership.ts';
import { disconnectAccount, publishToBuy } from '../../sockets/publish.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { invalid, notFound } from '../problem.ts';
import { buyPath } from './editTerms.ts';
import { readBuyHeaderAgain } from './readBuys.ts';
import { byActor, withBuy } from './withBuy.ts';

/** Active members of the club, guests marked, by name. */
export async function listCandidates(actor: BuyActor): Promise<BuyCandidates> {
  const people = await select<BuyCandidates['people'][number]>(
    `select id as "membershipId", display_name as name, is_organiser as organiser, is_guest as guest
     from memberships where club_id = :clubId and status = 'active' order by lower(display_name), id`,
    { clubId: actor.club.id },
  );
  return { people };
}

/**
 * A member who can act in a buy: active, with sign-in.
 * @throws DomainProblem 404 or 422 at `field`
 */
export async function getActiveMember(
  clubId: string,
  membershipId: string,
  needs: { organiser: boolean; field: string },
  tx: Tx,
): Promise<Membership> {
  const member = await Membership.findOne({
    where: { id: membershipId, clubId },
    transaction: tx.transaction,
  });
  if (!member) throw notFound('This member');
  const { field } = needs;
  if (member.status !== 'active')
    throw invalid({ [field]: `${member.displayName} is not in the club.` });
  if (member.isGuest)
    throw invalid({ [field]: `${member.displayName} is a guest and can't sign in.` });
  if (needs.organiser && !member.isOrganiser)
    throw invalid({ [field]: `${member.displayName} isn't an organiser of the club.` });
  return member;
}

/** After a change of people: open pages of the buy reload its head. */
export function tellRoom(buy: Buy, tx: Tx): void {
  const { id: buyId, sheetVersion } = buy;
  tx.afterCommit(() => publishToBuy(buyId, 'buy:changed', { kind: 'terms', buyId, sheetVersion }));
}

/** Tells events apart that may come again: the database's clock in microseconds. */
export async function stamp(tx: Tx): Promise<string> {
  const [clock] = await select<{ key: string }>(
    "select to_char(clock_timestamp() at time zone 'UTC', 'YYYYMMDDHH24MISSUS') as key",
    {},
    tx,
  );
  return clock?.key ?? '';
}

async function audit(
  actor: BuyActor,
  buy: Buy,
  action: string,
  member: Membership,
  after: Record<string, unknown>,
  tx: Tx,
): Promise<void> {
  await writeAudit(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    by: byActor(actor),
    action,
    subject: { type: 'membership', id: member.id },
    after: { name: member.displayName, ...after },
  });
}

async function tell(
  actor: BuyActor,
  buy: Buy,
  memberId: string,
  said: string,
  tx: Tx,
): Promise<void> {
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'role_changed',
    eventKey: `buy:${buy.id}:people:${memberId}:${await stamp(tx)}`,
    to: [memberId],
    content: {
      subject: `Your part in ${buy.name}`,
      paragraphs: [said],
      action: { label: 'See the buy', path: buyPath(actor, buy.id) },
    },
  });
}

/** Names a co-organiser: an organiser of the club who may then do all that the responsible one may. */
export async function nameCoOrganiser(actor: BuyActor, memberId: string): Promise<BuyHeader> {
  await withBuy(actor.buy.id, { states: editableStates }, async (buy, tx) => {
    const needs = { organiser: true, field: 'member' };
    const member = await getActiveMember(buy.clubId, memberId, needs, tx);
    if (buy.responsibleId === memberId)
      throw invalid({ member: `${member.displayName} is responsible for the buy already.` });
    const added = await select<{ membership_id: string }>(
      `insert into buy_organisers (buy_id, membership_id) values (:buyId, :memberId)
       on conflict do nothing returning membership_id`,
      { buyId: buy.id, memberId },
      tx,
    );
    if (added.length === 0) return;
    await audit(actor, buy, 'buys.nameCoOrganiser', member, {}, tx);
    await tell(actor, buy, memberId, `${actor.name} named you co-organiser of ${buy.name}.`, tx);
    tellRoom(buy, tx);
  });
  return readBuyHeaderAgain(actor, actor.buy.id);
}

/** Names a helper for the split and pickup, or changes whether they may note cash. */
export async function nameHelper(
  actor: BuyActor,
  memberId: string,
  takesCash: boolean,
): Promise<BuyHeader> {
  await withBuy(actor.buy.id, { states: editableStates }, async (buy, tx) => {
    const needs = { organiser: false, field: 'member' };
    const member = await getActiveMember(buy.clubId, memberId, needs, tx);
    const [before] = await select<{ takes_cash: boolean }>(
      'select takes_cash from buy_helpers where buy_id = :buyId and membership_id = :memberId',
      { buyId: buy.id, memberId },
      tx,
    );
    if (before?.takes_cash === takesCash) return;
    await execute(
      `insert into buy_helpers (buy_id, membership_id, takes_cash) values (:buyId, :memberId, :takesCash)
       on conflict (buy_id, membership_id) do update set takes_cash = :takesCash`,
      { buyId: buy.id, memberId, takesCash },
      tx,
    );
    await audit(actor, buy, 'buys.nameHelper', member, { takesCash }, tx);
    const cash = takesCash ? ' You may also take and note cash.' : '';
    const said = `${actor.name} named you helper of ${buy.name}: on the split day you weigh, print labels and hand over.${cash}`;
    await tell(actor, buy, memberId, said, tx);
    tellRoom(buy, tx);
  });
  return readBuyHeaderAgain(actor, actor.buy.id);
}

const parts = {
  organiser: {
    table: 'buy_organisers',
    action: 'buys.dropCoOrganiser',
    said: 'co-organiser',
  },
  helper: { table: 'buy_helpers', action: 'buys.dropHelper', said: 'helper' },
} as const;

/** Takes a co-organiser or helper off a buy; their open pages are closed to what they may no longer see. */
export async function dropPerson(
  actor: BuyActor,
  part: keyof typeof parts,
  memberId: string,
): Promise<BuyHeader> {
  const { table, action, said } = parts[part];
  await withBuy(actor.buy.id, { states: editableStates }, async (buy, tx) => {
    const member = await Membership.findOne({
      where: { id: memberId, clubId: buy.clubId },
      transaction: tx.transaction,
    });
    const gone = await select<{ membership_id: string }>(
      `delete from ${table} where buy_id = :buyId and membership_id = :memberId returning membership_id`,
      { buyId: buy.id, memberId },
      tx,
    );
    if (!member || gone.length === 0) throw notFound('This person');
    await audit(actor, buy, action, member, {}, tx);
    if (memberId !== actor.membershipId)
      await tell(actor, buy, memberId, `${actor.name} took you off ${buy.name} as ${said}.`, tx);
    tellRoom(buy, tx);
    const { accountId } = member;
    if (accountId && part === 'organiser') tx.afterCommit(() => disconnectAccount(accountId));
  });
  return readBuyHeaderAgain(actor, actor.buy.id);
}
