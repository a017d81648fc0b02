import { select, transact, execute, type Tx } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { invalid, notFound } from '../problem.ts';
import { careOfSalt } from './saltOfLine.ts';

async function confirm(
  actor: BuyActor,
  saltId: string,
  who: { membershipId: string; onPaperById: string | null },
  tx: Tx,
): Promise<void> {
  const [line] = await select<{ id: string }>(
    'select id from lines where buy_id = :buyId and salt_id = :saltId and removed_at is null',
    { buyId: actor.buy.id, saltId },
    tx,
  );
  if (!line) throw invalid({ saltId: 'No line of this buy has that salt.' });
  const { classified } = await careOfSalt(actor.club.id, saltId, tx);
  if (!classified) throw invalid({ saltId: 'This salt needs no confirmation.' });
  const [added] = await select<{ membership_id: string }>(
    `insert into hazard_confirmations (membership_id, salt_id, on_paper_by_id)
     values (:membershipId, :saltId, :onPaperById) on conflict do nothing returning membership_id`,
    { saltId, ...who },
    tx,
  );
  if (!added) return;
  await writeAudit(tx, {
    clubId: actor.club.id,
    buyId: actor.buy.id,
    by: byActor(actor),
    action: who.onPaperById ? 'hazards.on_paper' : 'hazards.confirm',
    subject: { type: 'membership', id: who.membershipId },
    after: { saltId },
  });
}

/** A member has read a classified salt's cautions and will keep it from children; once per salt. */
export async function confirmHazard(actor: BuyActor, saltId: string): Promise<void> {
  await transact((tx) =>
    confirm(actor, saltId, { membershipId: actor.membershipId, onPaperById: null }, tx),
  );
}

/**
 * An organiser has a guest's signed paper for a classified salt, or takes a tick back that was made by mistake.
 * @throws DomainProblem 404 unless it is a guest of the club
 */
export async function confirmOnPaper(
  actor: BuyActor,
  membershipId: string,
  { saltId, signed }: { saltId: string; signed: boolean },
): Promise<void> {
  await transact(async (tx) => {
    const [guest] = await select<{ id: string }>(
      `select id from memberships where id = :membershipId and club_id = :clubId and is_guest and status = 'active' for update`,
      { membershipId, clubId: actor.club.id },
      tx,
    );
    if (!guest) throw notFound('This guest');
    if (signed) {
      await confirm(actor, saltId, { membershipId, onPaperById: actor.membershipId }, tx);
      return;
    }
    await execute(
      'delete from hazard_confirmations where membership_id = :membershipId and salt_id = :saltId and on_paper_by_id is not null',
      { membershipId, saltId },
      tx,
    );
    await writeAudit(tx, {
      clubId: actor.club.id,
      buyId: actor.buy.id,
      by: byActor(actor),
      action: 'hazards.paper_withdrawn',
      subject: { type: 'membership', id: membershipId },
      before: { saltId },
    });
  });
}
