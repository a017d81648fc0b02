import type { ExtendBody } from '#shared/schemas/sheet.ts';
import type { BuyHeader } from '#shared/schemas/buys.ts';
import { databaseNow } from '../../config/database.ts';
import { logger } from '../../config/logger.ts';
import type { BuyActor } from '../actors.ts';
import { editTerms } from '../buys/editTerms.ts';
import { invalid } from '../problem.ts';
import { closeBuy } from './closeBuys.ts';

/**
 * Gives an open buy a later closing time, a lower minimum, or both, and thaws it when it was frozen. Lowering the
 * minimum alone, after the closing time, closes it again at once.
 * @throws DomainProblem 409 `stale` or `wrong_state`; 422 by field
 */
export async function extendBuy(actor: BuyActor, body: ExtendBody): Promise<BuyHeader> {
  const buyId = actor.buy.id;
  const options = { states: ['open'] as const, movesSums: false };
  const { head } = await editTerms(actor, body, options, async (buy, tx, say) => {
    const words: string[] = [];
    const before = {
      closesAt: buy.closesAt,
      minimum: { kind: buy.minimumKind, amount: buy.minimumAmount },
    };
    if (body.closesAt !== null) {
      const closesAt = new Date(body.closesAt);
      if (closesAt <= (await databaseNow(tx))) {
        throw invalid({ closesAt: 'Choose a closing time that is still to come.' });
      }
      words.push(`Closing moved from ${say.at(buy.closesAt)} to ${say.at(closesAt)}.`);
      buy.closesAt = closesAt;
    }
    if (body.minimum) {
      const { kind, amount } = body.minimum;
      const same = kind === buy.minimumKind && amount < buy.minimumAmount;
      if (kind !== 'none' && !same) {
        throw invalid({ 'minimum.amount': 'Lower the minimum, or take it away.' });
      }
      words.push(kind === 'none' ? 'The minimum was taken away.' : 'The minimum was lowered.');
      buy.minimumKind = kind;
      buy.minimumAmount = kind === 'none' ? 0 : amount;
    }
    if (words.length === 0) {
      throw invalid({ closesAt: 'Choose a later closing time or a lower minimum.' });
    }
    if (buy.frozenAt) words.push('Pledges move again.');
    buy.frozenAt = null;
    buy.frozenUntil = null;
    return {
      summary: words.join(' '),
      action: 'buys.extend',
      subject: { type: 'buy', id: buy.id },
      before,
      after: {
        closesAt: buy.closesAt,
        minimum: { kind: buy.minimumKind, amount: buy.minimumAmount },
      },
    };
  });
  if (body.closesAt === null) {
    closeBuy(buyId).catch((error: unknown) =>
      logger.error({ err: error, buyId }, 'closing failed'),
    );
  }
  return head;
}
