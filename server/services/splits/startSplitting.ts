import { databaseNow } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, changeTerms, withBuy } from '../buys/withBuy.ts';
import { tellBuyChanged } from '../orders/tellBuy.ts';
import { wrongState } from '../problem.ts';
import { computeTargets } from './computeTargets.ts';

/**
 * Moves a buy from arrived to splitting.
 * @throws DomainProblem 409 when there are no targets, or not those of the bags and pledges as they are now
 */
export async function startSplitting(actor: BuyActor, termsVersion: number): Promise<void> {
  await withBuy(actor.buy.id, { states: ['arrived'], termsVersion }, async (buy, tx) => {
    if (buy.targetVersion === 0) throw wrongState('Work the targets out first.');
    const computed = await computeTargets(buy, tx);
    if (computed.blocked) throw wrongState(computed.blocked);
    if (!computed.standing) {
      throw wrongState(
        'Bags or pledges have changed since the targets were made. Work them out again.',
      );
    }
    buy.state = 'splitting';
    buy.splittingAt = await databaseNow(tx);
    await changeTerms(buy, 'The split has begun.', byActor(actor), tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'splits.start',
      subject: { type: 'buy', id: buy.id },
      before: { state: 'arrived' },
      after: { state: 'splitting' },
    });
    tellBuyChanged(buy, 'state', tx);
  });
}
