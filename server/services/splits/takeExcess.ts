import type { ExcessBody } from '#shared/schemas/splits.ts';
import { execute } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, withBuy } from '../buys/withBuy.ts';
import { changeSplit } from './changeSplit.ts';

/** The treasurer chooses whether the club bears what was lost above 2 % of a line, before the shares are final. */
export async function takeExcess(actor: BuyActor, { clubTakesExcess }: ExcessBody): Promise<void> {
  const states = ['arrived', 'splitting'] as const;
  await withBuy(actor.buy.id, { states }, async (buy, tx) => {
    await execute(
      `update buys set excess_loss_at = case when :takes then clock_timestamp() end,
         excess_loss_by_id = case when :takes then :byId::uuid end where id = :id`,
      { id: buy.id, takes: clubTakesExcess, byId: actor.membershipId },
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'splits.excessLoss',
      subject: { type: 'buy', id: buy.id },
      after: { clubTakesExcess },
    });
    await changeSplit(buy, { more: true }, tx);
  });
}
