import { mayChangeStep } from '#shared/domain/buys/editableTerms.ts';
import type { LineBody, LineChange, LineOrder, TermsReply } from '#shared/schemas/buyTerms.ts';
import { execute, isUniqueViolation, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import { Line } from '../../models/Line.ts';
import type { BuyActor } from '../actors.ts';
import { invalid, notFound } from '../problem.ts';
import { findSalt } from '../salts/saltsOfClub.ts';
import { askedFields, editTerms } from './editTerms.ts';
import { checkLineSource, findLivingOffers, getLineSalt, sayOffer } from './lineRules.ts';
import { sayLineChanges } from './sayLineChanges.ts';

const states = ['draft', 'open'] as const;
const edits = { states, movesSums: true };

/** A living line of a buy, under its buy's lock. */
async function getLine(buy: Buy, lineId: string, tx: Tx): Promise<Line> {
  const line = await Line.findOne({
    where: { id: lineId, buyId: buy.id, removedAt: null },
    transaction: tx.transaction,
  });
  if (!line) throw notFound('This line');
  return line;
}

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

async function pledgersOfLine(lineId: string, tx: Tx): Promise<string[]> {
  const rows = await select<{ membership_id: string }>(
    `select membership_id from pledges where line_id = :lineId and dropped_at is null
       and (wanted_mg > 0 or up_to_mg > 0) order by membership_id`,
    { lineId },
    tx,
  );
  return rows.map((row) => row.membership_id);
}

const nameOf = async (buy: Buy, saltId: string, tx: Tx) =>
  (await findSalt(buy.clubId, saltId, tx))?.name ?? saltId;

function oneOfItsSalt(error: unknown): never {
  if (isUniqueViolation(error, 'lines_salt'))
    throw invalid({ saltId: 'This salt is a line of the buy already.' });
  throw error;
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

/** Takes a line out of the buy; pledges on it are withdrawn, and whoever made them is told. */
export async function removeLine(
  actor: BuyActor,
  lineId: string,
  body: { termsVersion: number; preview?: boolean | undefined },
): Promise<TermsReply> {
  return editTerms(actor, body, edits, async (buy, tx) => {
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
