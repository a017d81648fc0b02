import { mayChangeStep } from '#shared/domain/buys/editableTerms.ts';
import type { LineBody, LineChange, TermsReply } from '#shared/schemas/buyTerms.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import { Line } from '../../models/Line.ts';
import type { BuyActor } from '../actors.ts';
import { invalid } from '../problem.ts';
import { askedFields, editTerms } from './editTerms.ts';
import { getLine, nameOf, oneOfItsSalt, pledgersOfLine } from './lineRows.ts';
import { checkLineSource, findLivingOffers, getLineSalt, sayOffer } from './lineRules.ts';
import { sayLineChanges } from './sayLineChanges.ts';

const states = ['draft', 'open'] as const;
const edits = { states, movesSums: true };

async function setOffers(lineId: string, offerIds: readonly string[], tx: Tx): Promise<void> {
  await execute('delete from line_offers where line_id = :lineId', { lineId }, tx);
  for (const offerId of new Set(offerIds)) {
    await execute(
      'insert into line_offers (line_id, offer_id) values (:lineId, :offerId)',
      { lineId, offerId },
      tx,
    );
  }
}

async function chosenOffers(lineId: string, tx: Tx): Promise<string[]> {
  const rows = await select<{ offer_id: string }>(
    'select offer_id from line_offers where line_id = :lineId order by offer_id',
    { lineId },
    tx,
  );
  return rows.map((row) => row.offer_id);
}

/**
 * Adds a salt to a buy, by default with all its living offers.
 * @throws DomainProblem 422 `not_a_line` for a salt that can't be one
 */
export async function addLine(actor: BuyActor, body: LineBody): Promise<TermsReply> {
  return editTerms(actor, body, edits, async (buy, tx, say) => {
    const { saltId, offerIds, ...fields } = askedFields(body);
    const salt = await getLineSalt(buy.clubId, saltId, tx);
    const anyOfSupplierId = fields.anyOfSupplierId ?? null;
    const chosen =
      offerIds ??
      (anyOfSupplierId ? [] : (await findLivingOffers(buy.clubId, saltId, tx)).map(({ id }) => id));
    const open = buy.state === 'open';
    const offers = await checkLineSource(
      buy.clubId,
      saltId,
      { offerIds: chosen, anyOfSupplierId },
      open,
      tx,
    );
    const [last] = await select<{ position: number | null }>(
      'select max(position) as position from lines where buy_id = :buyId',
      { buyId: buy.id },
      tx,
    );
    const line = await Line.create(
      {
        buyId: buy.id,
        saltId,
        position: (last?.position ?? -1) + 1,
        ...Object.fromEntries(Object.entries(fields).filter(([, value]) => value !== undefined)),
      },
      { transaction: tx.transaction },
    ).catch(oneOfItsSalt);
    await setOffers(line.id, chosen, tx);
    const packs = offers.map((offer) => sayOffer(offer, say.pack)).join(', ');
    return {
      summary: `${salt.name} joins the buy${packs ? `, bought as ${packs}` : ''}.`,
      action: 'buys.addLine',
      subject: { type: 'line', id: line.id },
      after: { saltId, offerIds: chosen, anyOfSupplierId },
    };
  });
}

/**
 * Changes a line's offers and policies. A portion step with pledges may only become a divisor of itself.
 * @throws DomainProblem 404, 409, 422 by field
 */
export async function changeLine(
  actor: BuyActor,
  lineId: string,
  body: LineChange,
): Promise<TermsReply> {
  return editTerms(actor, body, edits, async (buy, tx, say) => {
    const { offerIds, ...fields } = askedFields(body);
    const line = await getLine(buy, lineId, tx);
    const pledged = (await pledgersOfLine(lineId, tx)).length > 0;
    if (!mayChangeStep(line.stepMg, fields.stepMg, pledged)) {
      throw invalid({
        stepMg: `Pledges stand on this line: only a step that ${say.mass(line.stepMg)} is a multiple of.`,
      });
    }
    const source = { offerIds, anyOfSupplierId: fields.anyOfSupplierId };
    await checkLineSource(buy.clubId, line.saltId, source, buy.state === 'open', tx);
    const before = { ...fieldsOf(line), offerIds: await chosenOffers(lineId, tx) };
    const after = { ...fields, offerIds: [...new Set(offerIds)].sort() };
    const summary = await sayLineChanges(
      { clubId: buy.clubId, name: await nameOf(buy, line.saltId, tx), before, after },
      say,
      tx,
    );
    if (summary === '') return null;
    await line.update(fields, { transaction: tx.transaction });
    await setOffers(lineId, offerIds, tx);
    return {
      summary,
      action: 'buys.changeLine',
      subject: { type: 'line', id: lineId },
      before,
      after,
    };
  });
}

function fieldsOf(line: Line): Omit<LineChange, 'termsVersion' | 'preview' | 'offerIds'> {
  const { stepMg, reservePermyriad, surplus, shortage, anyOfSupplierId, note } = line;
  return { stepMg, reservePermyriad, surplus, shortage, anyOfSupplierId, note };
}
