import type { AnswerHandOnBody, HandOns } from '#shared/schemas/handOns.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { buyPath } from '../buys/editTerms.ts';
import { byActor, changeTerms, withBuy } from '../buys/withBuy.ts';
import { clubToday } from '../ledger/clubDay.ts';
import { owedOfBuy, overdueElsewhere } from '../ledger/owed.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { DomainProblem, notFound, wrongState } from '../problem.ts';
import { findSalt } from '../salts/saltsOfClub.ts';
import { handOnPortions } from '../splits/handOnPortions.ts';
import { findHandOns, findOwnLines, type HandOnRow } from './handOnRows.ts';
import { listHandOns } from './listHandOns.ts';
import { moveDues } from './moveDues.ts';
import { movePledge } from './movePledge.ts';
import { moveSnapshots, type Hand } from './moveSnapshots.ts';
import { handOnStates } from './offerHandOn.ts';

/** Somebody who is behind with a payment, here or in another buy, takes nothing more on. */
async function checkNotOverdue(buy: Buy, membershipId: string, tx: Tx): Promise<void> {
  const [elsewhere] = await overdueElsewhere(membershipId, buy.id, tx);
  const here = (await owedOfBuy(buy.id, tx)).get(membershipId);
  const late =
    here !== undefined && here.openMinor > 0 && here.dueAtMs !== null && here.dueAtMs < Date.now();
  if (!elsewhere && !late) return;
  throw new DomainProblem(
    409,
    'overdue_elsewhere',
    `Pay what is overdue in ${elsewhere?.buyName ?? buy.name} first. Then you can take this on.`,
  );
}

/** A classified salt asks once for a word that its cautions were read. */
async function confirmCautions(
  actor: BuyActor,
  saltId: string,
  cautionsRead: boolean,
  tx: Tx,
): Promise<void> {
  const salt = await findSalt(actor.club.id, saltId, tx);
  if (!salt?.classified && !salt?.reportable) return;
  const [held] = await select<{ one: number }>(
    'select 1 as one from hazard_confirmations where membership_id = :id and salt_id = :saltId',
    { id: actor.membershipId, saltId },
    tx,
  );
  if (held) return;
  if (!cautionsRead) {
    throw new DomainProblem(
      409,
      'hazard_unconfirmed',
      `Confirm that you have read the cautions of ${salt.name.toLowerCase()} and keep it from children.`,
      { errors: { cautionsRead: 'Confirm this first.' } },
    );
  }
  await execute(
    'insert into hazard_confirmations (membership_id, salt_id) values (:id, :saltId) on conflict do nothing',
    { id: actor.membershipId, saltId },
    tx,
  );
}

async function close(id: string, state: 'accepted' | 'declined' | 'withdrawn', tx: Tx) {
  await execute(
    'update hand_ons set state = :state, answered_at = clock_timestamp() where id = :id',
    { id, state },
    tx,
  );
}

async function accept(
  actor: BuyActor,
  buy: Buy,
  row: HandOnRow,
  cautionsRead: boolean,
  tx: Tx,
): Promise<string> {
  const hand: Hand = { buyId: buy.id, lineId: row.line_id, fromId: row.from_id, toId: row.to_id };
  const given = (await findOwnLines(buy.id, row.from_id, tx)).find(
    ({ line_id }) => line_id === row.line_id,
  );
  if (!given) throw wrongState(`${row.from_name} no longer has this line to hand on.`);
  await checkNotOverdue(buy, row.to_id, tx);
  await confirmCautions(actor, row.salt_id, cautionsRead, tx);
  const salt = (await findSalt(buy.clubId, row.salt_id, tx))?.name ?? row.salt_id;
  const by = byActor(actor);
  const said = `${row.from_name} handed on ${salt.toLowerCase()} to ${row.to_name}.`;
  await changeTerms(buy, said, by, tx, { quiet: true });
  await movePledge(hand, given, `Handed on to ${row.to_name}.`, buy.sheetVersion, tx);
  const sums = await moveSnapshots(hand, tx);
  if (sums) {
    const onDate = await clubToday(buy.clubId, tx);
    const entry = { handOnId: row.id, clubId: buy.clubId, onDate, memo: said, by };
    await moveDues(hand, sums, entry, tx);
  }
  if (buy.targetVersion > 0) await handOnPortions(tx, hand);
  await close(row.id, 'accepted', tx);
  await execute(
    'update hand_ons set mg = :mg, amount_minor = :amountMinor where id = :id',
    { id: row.id, mg: sums?.mg ?? given.wanted_mg, amountMinor: sums?.amountMinor ?? null },
    tx,
  );
  await writeAudit(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    by,
    action: 'buys.handOn',
    subject: { type: 'hand_on', id: row.id },
    before: { membershipId: row.from_id, wantedMg: given.wanted_mg, upToMg: given.up_to_mg },
    after: {
      membershipId: row.to_id,
      salt,
      mg: sums?.mg ?? given.wanted_mg,
      private: { amountMinor: sums?.amountMinor ?? null },
    },
  });
  const { id: buyId, sheetVersion } = buy;
  tx.afterCommit(() => publishToBuy(buyId, 'buy:changed', { kind: 'terms', buyId, sheetVersion }));
  return said;
}

async function organisersOf(buy: Buy, tx: Tx): Promise<string[]> {
  const rows = await select<{ membership_id: string }>(
    'select membership_id from buy_organisers where buy_id = :buyId',
    { buyId: buy.id },
    tx,
  );
  return [buy.responsibleId, ...rows.map((row) => row.membership_id)];
}

async function getOffered(buy: Buy, id: string, tx: Tx): Promise<HandOnRow> {
  const [row] = await findHandOns(buy.id, id, tx);
  if (!row) throw notFound('This offer');
  return row;
}

function stillOffered(row: HandOnRow): void {
  if (row.state !== 'offered')
    throw wrongState(`This offer was ${row.state === 'withdrawn' ? 'taken back' : row.state}.`);
}

/**
 * Accepts or declines a line that somebody offered. Accepting moves pledge, grams, dues and portions at once.
 * @throws DomainProblem 404 unless it was offered to this member; 409 `wrong_state`, `overdue_elsewhere`,
 * `hazard_unconfirmed`
 */
export async function answerHandOn(
  actor: BuyActor,
  handOnId: string,
  body: AnswerHandOnBody,
): Promise<HandOns> {
  await withBuy(actor.buy.id, { states: handOnStates }, async (buy, tx) => {
    const row = await getOffered(buy, handOnId, tx);
    if (row.to_id !== actor.membershipId) throw notFound('This offer');
    stillOffered(row);
    const said = body.accept
      ? await accept(actor, buy, row, body.cautionsRead, tx)
      : `${row.to_name} declined what you offered.`;
    if (!body.accept) await close(row.id, 'declined', tx);
    const to = body.accept ? [row.from_id, ...(await organisersOf(buy, tx))] : [row.from_id];
    await queueNotice(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      kind: 'handed_on',
      eventKey: `hand-on:${row.id}:answered`,
      to: [...new Set(to)].filter((id) => id !== actor.membershipId),
      content: {
        subject: body.accept
          ? `${buy.name}: a line was handed on`
          : `${buy.name}: your offer was declined`,
        paragraphs: [
          said,
          ...(body.accept
            ? ['Grams and what is due moved with it. What was paid before stays where it was paid.']
            : []),
        ],
        action: { label: 'See the buy', path: buyPath(actor, buy.id) },
      },
    });
  });
  return listHandOns(actor);
}

/** Takes an offer back that nobody has answered. */
export async function withdrawHandOn(actor: BuyActor, handOnId: string): Promise<HandOns> {
  await withBuy(actor.buy.id, {}, async (buy, tx) => {
    const row = await getOffered(buy, handOnId, tx);
    if (row.from_id !== actor.membershipId) throw notFound('This offer');
    stillOffered(row);
    await close(row.id, 'withdrawn', tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'buys.withdrawHandOn',
      subject: { type: 'hand_on', id: row.id },
    });
  });
  return listHandOns(actor);
}
