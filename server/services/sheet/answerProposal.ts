import type { PledgeReply } from '#shared/schemas/sheet.ts';
import { select, transact } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { notFound } from '../problem.ts';
import { changePledgeIn } from './changePledge.ts';
import { lockForPledge } from './pledgeRows.ts';

interface Open {
  line_id: string;
  wanted_mg: number;
  up_to_mg: number | null;
  version: number | null;
}

/**
 * A member's yes or no to a pledge that an organiser asked for; a yes goes by the same rules as a change of their own.
 * @returns the pledge after a yes, null after a no
 * @throws DomainProblem 404 when there is no such question to this member, and whatever refuses the change
 */
export async function answerProposal(
  actor: BuyActor,
  proposalId: string,
  accept: boolean,
): Promise<PledgeReply | null> {
  return transact(async (tx) => {
    await lockForPledge(actor.buy.id, tx);
    const [open] = await select<Open>(
      `update pledge_proposals q set answered_at = clock_timestamp(), accepted = :accept
       where q.id = :proposalId and q.buy_id = :buyId and q.membership_id = :me and q.answered_at is null
       returning q.line_id, q.wanted_mg, q.up_to_mg, (select p.version from pledges p
         where p.line_id = q.line_id and p.membership_id = q.membership_id) as version`,
      { accept, proposalId, buyId: actor.buy.id, me: actor.membershipId },
      tx,
    );
    if (!open) throw notFound('This question');
    await writeAudit(tx, {
      clubId: actor.club.id,
      buyId: actor.buy.id,
      by: byActor(actor),
      action: accept ? 'pledges.accept' : 'pledges.decline',
      subject: { type: 'proposal', id: proposalId },
    });
    if (!accept) return null;
    return changePledgeIn(
      tx,
      actor,
      { lineId: open.line_id, membershipId: actor.membershipId },
      { wantedMg: open.wanted_mg, upToMg: open.up_to_mg, version: open.version ?? 0 },
    );
  });
}
