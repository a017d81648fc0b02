import { select, type Tx } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import type { PledgeBuy } from './pledgeRows.ts';
import { sayPledge } from './tellPledge.ts';

/** Asks a member whether their pledge may be raised; a later question about the same line replaces the earlier one. */
export async function proposePledge(
  actor: BuyActor,
  buy: PledgeBuy,
  wish: {
    lineId: string;
    membershipId: string;
    wantedMg: number;
    upToMg: number | null;
    saltName: string;
  },
  tx: Tx,
): Promise<void> {
  const { saltName, ...values } = wish;
  const [proposal] = await select<{ id: string; asked: number }>(
    `insert into pledge_proposals (buy_id, line_id, membership_id, wanted_mg, up_to_mg, proposed_by_id)
     values (:buyId, :lineId, :membershipId, :wantedMg, :upToMg, :byId)
     on conflict (line_id, membership_id) where answered_at is null do update set wanted_mg = excluded.wanted_mg,
       up_to_mg = excluded.up_to_mg, proposed_by_id = excluded.proposed_by_id, created_at = clock_timestamp()
     returning id, (extract(epoch from created_at) * 1000)::bigint as asked`,
    { ...values, buyId: buy.id, byId: actor.membershipId },
    tx,
  );
  if (!proposal) throw new Error('proposal not written');
  await writeAudit(tx, {
    clubId: buy.club_id,
    buyId: buy.id,
    by: byActor(actor),
    action: 'pledges.propose',
    subject: { type: 'pledge', id: `${wish.lineId}:${wish.membershipId}` },
    after: { wantedMg: wish.wantedMg, upToMg: wish.upToMg },
  });
  await queueNotice(tx, {
    clubId: buy.club_id,
    buyId: buy.id,
    kind: 'pledge_changed',
    eventKey: `proposal:${proposal.id}:${proposal.asked}`,
    to: [wish.membershipId],
    content: {
      subject: `${buy.name}: take ${sayPledge(wish)} of ${saltName}?`,
      paragraphs: [
        `${actor.name}, who organises ${buy.name}, asks whether you would take ${sayPledge(wish)} of ${saltName}.`,
        'Nothing changes until you say yes on the buy sheet.',
      ],
      action: { label: 'Answer on the sheet', path: `/c/${actor.club.slug}/buys/${buy.id}/sheet` },
    },
  });
}
