import type { BuyHeader } from '#shared/schemas/buys.ts';
import { databaseNow, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { invalid } from '../problem.ts';
import { requestPlan } from '../sheet/planning.ts';
import { buyPath } from './editTerms.ts';
import { readBuyHeaderAgain } from './readBuys.ts';
import { readTermsIn } from './readTerms.ts';
import { sayFor } from './sayTerms.ts';
import { splitDayCalendar } from './splitDayCalendar.ts';
import { byActor, changeTerms, withBuy } from './withBuy.ts';

async function activeMembers(clubId: string, tx: Tx): Promise<string[]> {
  const rows = await select<{ id: string }>(
    `select id from memberships where club_id = :clubId and status = 'active' and not is_guest order by id`,
    { clubId },
    tx,
  );
  return rows.map(({ id }) => id);
}

async function tellEveryone(
  actor: BuyActor,
  buy: Buy,
  lineNames: readonly string[],
  tx: Tx,
): Promise<void> {
  const say = sayFor(actor.club);
  const path = buyPath(actor, buy.id);
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'buy_opened',
    eventKey: `buy:${buy.id}:opened`,
    to: await activeMembers(buy.clubId, tx),
    content: {
      subject: `${buy.name} is open`,
      paragraphs: [
        `${actor.name} opened ${buy.name}. Say how many grams you want: the more of us pledge, the fuller the packs.`,
        ...(buy.note ? [buy.note] : []),
      ],
      rows: [
        ['Salts', lineNames.join(', ')],
        ['Closes', say.at(buy.closesAt)],
        ['Split day', say.at(buy.splitsAt)],
        ...(buy.place ? [['Place', buy.place] as const] : []),
      ],
      action: { label: 'Pledge', path },
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
            description: buy.pickupRules,
            sequence: buy.termsVersion,
            path,
          }),
        ]
      : [],
  });
}

/**
 * Opens a draft for pledges and tells every member.
 * @throws DomainProblem 409 `stale` or `wrong_state`; 422 by field for what is missing or out of order
 */
export async function openBuy(actor: BuyActor, termsVersion: number): Promise<BuyHeader> {
  const by = byActor(actor);
  await withBuy(actor.buy.id, { states: ['draft'], termsVersion }, async (buy, tx) => {
    const { blocks, lines } = await readTermsIn(buy.clubId, buy.id, tx);
    if (Object.keys(blocks).length > 0) throw invalid(blocks);
    buy.state = 'open';
    buy.openedAt = await databaseNow(tx);
    await changeTerms(buy, 'The buy opened.', by, tx, { quiet: true });
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by,
      action: 'buys.open',
      subject: { type: 'buy', id: buy.id },
      before: { state: 'draft' },
      after: { state: 'open', closesAt: buy.closesAt },
    });
    await tellEveryone(
      actor,
      buy,
      lines.map(({ name }) => name),
      tx,
    );
    const { id: buyId, sheetVersion } = buy;
    tx.afterCommit(() => {
      publishToBuy(buyId, 'buy:changed', {
        kind: 'state',
        buyId,
        sheetVersion,
        state: 'open',
        frozen: false,
      });
      requestPlan(buyId);
    });
  });
  return readBuyHeaderAgain(actor, actor.buy.id);
}
