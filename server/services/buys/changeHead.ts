import { editableStates, mayChangeField } from '#shared/domain/buys/editableTerms.ts';
import { dateErrors } from '#shared/domain/buys/termsBlocks.ts';
import type { HeadBody, TermsReply } from '#shared/schemas/buyTerms.ts';
import { databaseNow, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { invalid, wrongState } from '../problem.ts';
import { askedFields, editTerms } from './editTerms.ts';
import { changedFields, headFields, sayHeadChanges, type HeadValues } from './sayHeadChanges.ts';
import type { Say } from './sayTerms.ts';

const movers = new Set(['leftOverPayer', 'spreadMaxPermille', 'shelfLimitMinor']);

function valuesOf(buy: Buy): HeadValues {
  return Object.fromEntries(headFields.map((field) => [field, buy[field]])) as HeadValues;
}

function asked(body: HeadBody): Partial<HeadValues> {
  const { closesAt, splitsAt, splitEndsAt, ...plain } = askedFields(body);
  const instant = (text: string | null) => (text === null ? null : new Date(text));
  const given = Object.entries(plain).filter(([, value]) => value !== undefined);
  return {
    ...(Object.fromEntries(given) as Partial<HeadValues>),
    ...(closesAt === undefined ? {} : { closesAt: instant(closesAt) }),
    ...(splitsAt === undefined ? {} : { splitsAt: instant(splitsAt) }),
    ...(splitEndsAt === undefined ? {} : { splitEndsAt: instant(splitEndsAt) }),
  };
}

async function shelfLimit(clubId: string, tx: Tx): Promise<number> {
  const [row] = await select<{ limit: number }>(
    'select shelf_limit_minor as limit from clubs where id = :clubId',
    { clubId },
    tx,
  );
  return row?.limit ?? 0;
}

async function check(buy: Buy, changed: readonly string[], say: Say, tx: Tx): Promise<void> {
  const errors: Record<string, string> = {};
  if (changed.includes('shelfLimitMinor')) {
    const most = await shelfLimit(buy.clubId, tx);
    if (buy.shelfLimitMinor > most)
      errors.shelfLimitMinor = `The treasurer lets a buy charge the shelf at most ${say.money(most)}.`;
  }
  // A draft's dates may be out of order for as long as it is being written.
  if (buy.state !== 'draft') {
    const nowMs = changed.includes('closesAt') ? (await databaseNow(tx)).getTime() : null;
    const wrong = dateErrors(
      {
        closesAtMs: buy.closesAt?.getTime() ?? null,
        splitsAtMs: buy.splitsAt?.getTime() ?? null,
        splitEndsAtMs: buy.splitEndsAt?.getTime() ?? null,
      },
      nowMs,
    );
    const dates = ['closesAt', 'splitsAt', 'splitEndsAt'];
    if (changed.some((field) => dates.includes(field))) Object.assign(errors, wrong);
  }
  if (Object.keys(errors).length > 0) throw invalid(errors);
}

/**
 * Changes a buy's own fields: all of them in a draft and while open, after the lock only what is about meeting.
 * @throws DomainProblem 409 `stale` or `wrong_state`, 422 by field
 */
export async function changeHead(actor: BuyActor, body: HeadBody): Promise<TermsReply> {
  const wanted = asked(body);
  const movesSums = Object.keys(wanted).some((field) => movers.has(field));
  return editTerms(actor, body, { states: editableStates, movesSums }, async (buy, tx, say) => {
    const before = valuesOf(buy);
    const changed = changedFields(before, { ...before, ...wanted });
    if (changed.length === 0) return null;
    if (changed.some((field) => !mayChangeField(buy.state, field))) {
      throw wrongState(
        'The terms are frozen by the lock. Only split day, place, pickup rules and note may change.',
        {
          state: buy.state,
          termsVersion: buy.termsVersion,
        },
      );
    }
    if (buy.frozenAt && buy.state === 'open' && changed.includes('closesAt')) {
      throw wrongState('The pledges rest since the closing time. Extend the buy instead.');
    }
    buy.set(wanted);
    await check(buy, changed, say, tx);
    const after = valuesOf(buy);
    const pick = (values: HeadValues) =>
      Object.fromEntries(changed.map((field) => [field, values[field]]));
    return {
      summary: sayHeadChanges(before, after, say),
      action: 'buys.change',
      subject: { type: 'buy', id: buy.id },
      before: pick(before),
      after: pick(after),
    };
  });
}
