import { formatMass } from '#shared/domain/mass/formatMass.ts';
import type { PledgeChange } from '#shared/schemas/sheet.ts';
import type { Tx } from '../../config/database.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import type { BuyActor } from '../actors.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { totalOfLine, type LockedBuy } from './pledgeRows.ts';
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
  readonly buy: LockedBuy;
  readonly salt: { name: string };
  readonly before: PledgeChange;
}

async function tellMember(tx: Tx, pledge: PledgeChange, made: ChangedFor): Promise<void> {
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
 * Tells of a written pledge: its member when an organiser changed it, and after the commit the open sheets and the
 * planner. `hidden`: the club shows only the line's total, so the message carries no person.
 */
export async function tellPledge(
  tx: Tx,
  told: { buyId: string; sheetVersion: number; pledge: PledgeChange },
  how: { hidden: boolean; changedFor?: ChangedFor },
): Promise<void> {
  const { buyId, sheetVersion, pledge } = told;
  if (how.changedFor) await tellMember(tx, pledge, how.changedFor);
  const total = how.hidden ? await totalOfLine(pledge.lineId, tx) : null;
  tx.afterCommit(() => {
    publishToBuy(buyId, 'buy:changed', {
      kind: 'pledge',
      buyId,
      sheetVersion,
      pledge: how.hidden ? null : pledge,
      total,
    });
    requestPlan(buyId);
  });
}
