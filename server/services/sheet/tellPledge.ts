import { formatMass } from '#shared/domain/mass/formatMass.ts';
import type { LineTotal, PledgeChange, PledgeReply } from '#shared/schemas/sheet.ts';
import type { Tx } from '../../config/database.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import type { BuyActor } from '../actors.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import type { PledgeBuy } from './pledgeRows.ts';
import { requestPlan } from './planning.ts';

/** Grams as a notice says them: "1 200 g, up to 1 500 g". */
export function sayPledge({
  wantedMg,
  upToMg,
}: {
  wantedMg: number;
  upToMg: number | null;
}): string {
  const wanted = formatMass(wantedMg);
  return upToMg === null ? wanted : `${wanted}, up to ${formatMass(upToMg)}`;
}

interface ChangedFor {
  readonly actor: BuyActor;
  readonly buy: PledgeBuy;
  readonly salt: { name: string };
  readonly before: PledgeChange;
}

/** Tells a member that an organiser changed their pledge. */
export async function tellMember(tx: Tx, pledge: PledgeChange, made: ChangedFor): Promise<void> {
  const { actor, buy, salt, before } = made;
  await queueNotice(tx, {
    clubId: buy.club_id,
    buyId: buy.id,
    kind: 'pledge_changed',
    eventKey: `pledge:${pledge.lineId}:${pledge.membershipId}:${pledge.version}`,
    to: [pledge.membershipId],
    content: {
      subject: `${buy.name}: your pledge of ${salt.name} is now ${formatMass(pledge.wantedMg)}`,
      paragraphs: [
        `${actor.name}, who organises ${buy.name}, changed your pledge of ${salt.name} for you.`,
        `It was ${sayPledge(before)}; it is ${sayPledge(pledge)}. You can change it back until the buy closes.`,
      ],
      action: { label: 'See the buy sheet', path: `/c/${actor.club.slug}/buys/${buy.id}/sheet` },
    },
  });
}

/**
 * Tells the open sheets and the planner of a pledge that is committed. With `total` the club shows no more than that
 * of the line, so the message carries no person.
 */
export function tellSheets(
  buyId: string,
  { sheetVersion, pledge }: Pick<PledgeReply, 'sheetVersion' | 'pledge'>,
  total: LineTotal | null,
): void {
  const change = { buyId, sheetVersion, pledge: total ? null : pledge, total };
  publishToBuy(buyId, 'buy:changed', { kind: 'pledge', ...change });
  requestPlan(buyId);
}
