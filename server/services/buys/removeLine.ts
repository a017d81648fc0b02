import type { LineOrder, TermsReply } from '#shared/schemas/buyTerms.ts';
import { execute, select } from '../../config/database.ts';
import { Line } from '../../models/Line.ts';
import type { BuyActor } from '../actors.ts';
import { invalid, notFound } from '../problem.ts';
import { editTerms } from './editTerms.ts';
import { getLine, nameOf, oneOfItsSalt, pledgersOfLine } from './lineRows.ts';
import { getLineSalt } from './lineRules.ts';

const states = ['draft', 'open'] as const;

/** Takes a line out of the buy; pledges on it are withdrawn, and whoever made them is told. */
export async function removeLine(
  actor: BuyActor,
  lineId: string,
  body: { termsVersion: number; preview?: boolean | undefined },
): Promise<TermsReply> {
  return editTerms(actor, body, { states, movesSums: true }, async (buy, tx) => {
    const line = await getLine(buy, lineId, tx);
    const name = await nameOf(buy, line.saltId, tx);
    const pledgers = await pledgersOfLine(lineId, tx);
    await line.update({ removedAt: new Date() }, { transaction: tx.transaction });
    await execute(
      `update pledges set dropped_at = clock_timestamp(), dropped_reason = 'The line left the buy.',
         version = version + 1, changed_sheet_version = :sheetVersion, updated_at = now()
       where line_id = :lineId and dropped_at is null`,
      { lineId, sheetVersion: buy.sheetVersion + 1 },
      tx,
    );
    await execute(
      `update pledge_proposals set answered_at = clock_timestamp(), accepted = false
       where line_id = :lineId and answered_at is null`,
      { lineId },
      tx,
    );
    const withdrawn = pledgers.length > 0 ? ' Pledges on it are withdrawn.' : '';
    return {
      summary: `${name} leaves the buy.${withdrawn}`,
      action: 'buys.removeLine',
      subject: { type: 'line', id: lineId },
      before: { saltId: line.saltId, pledgers: pledgers.length },
      alsoTell: pledgers,
    };
  });
}

/** Puts a line back that was just taken out of a draft. */
export async function restoreLine(
  actor: BuyActor,
  lineId: string,
  body: { termsVersion: number },
): Promise<TermsReply> {
  return editTerms(actor, body, { states: ['draft'], movesSums: false }, async (buy, tx) => {
    const line = await Line.findOne({
      where: { id: lineId, buyId: buy.id },
      transaction: tx.transaction,
    });
    if (!line) throw notFound('This line');
    if (line.removedAt === null) return null;
    await getLineSalt(buy.clubId, line.saltId, tx);
    await line.update({ removedAt: null }, { transaction: tx.transaction }).catch(oneOfItsSalt);
    return {
      summary: `${await nameOf(buy, line.saltId, tx)} is back in the buy.`,
      action: 'buys.restoreLine',
      subject: { type: 'line', id: lineId },
    };
  });
}

/** Puts the lines in an order; ids that are missing or too many are refused. */
export async function orderLines(actor: BuyActor, body: LineOrder): Promise<TermsReply> {
  return editTerms(actor, body, { states, movesSums: false }, async (buy, tx) => {
    const rows = await select<{ id: string }>(
      'select id from lines where buy_id = :buyId and removed_at is null order by position, id',
      { buyId: buy.id },
      tx,
    );
    const known = rows.map(({ id }) => id);
    if ([...known].sort().join() !== [...body.lineIds].sort().join())
      throw invalid({ lineIds: 'The lines changed meanwhile.' });
    if (known.join() === body.lineIds.join()) return null;
    for (const [position, id] of body.lineIds.entries()) {
      await execute('update lines set position = :position where id = :id', { position, id }, tx);
    }
    return {
      summary: 'The lines stand in another order.',
      action: 'buys.orderLines',
      subject: { type: 'buy', id: buy.id },
    };
  });
}
