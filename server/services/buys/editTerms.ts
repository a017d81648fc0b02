import type { BuyState } from '#shared/domain/buys/states.ts';
import type { TermsEffect, TermsReply } from '#shared/schemas/buyTerms.ts';
import type { Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { requestPlan } from '../sheet/planning.ts';
import { openSums, type OpenSums } from './openEffect.ts';
import { readBuyHeaderAgain } from './readBuys.ts';
import { readTerms } from './readTerms.ts';
import { sayFor, type Say } from './sayTerms.ts';
import { byActor, changeTerms, pledgersOf, withBuy } from './withBuy.ts';

/** What one change of the terms says of itself; null from the work: nothing changed. */
export interface TermsEdit {
  /** Plain sentences with their effect, for everybody who pledged. */
  summary: string;
  action: string;
  subject: { type: string; id?: string };
  before?: Record<string, unknown>;
  after?: Record<string, unknown>;
  /** Whom it concerns though they have no pledge any more. */
  alsoTell?: readonly string[];
}

/** What an organiser saw of the terms when they asked. */
export interface SeenTerms {
  termsVersion: number;
  preview?: boolean | undefined;
}

/** The fields that a body asks for, without what its sender saw. */
export function askedFields<B extends SeenTerms>(body: B): Omit<B, keyof SeenTerms> {
  const fields: Partial<B> = { ...body };
  delete fields.termsVersion;
  delete fields.preview;
  return fields as Omit<B, keyof SeenTerms>;
}

class PreviewDone extends Error {}

/** The path of a buy's page, for notices. */
export function buyPath(actor: { club: { slug: string } }, buyId: string): string {
  return `/c/${actor.club.slug}/buys/${buyId}`;
}

/** What all shares come to, where a change moved it. */
function saySums(before: OpenSums | null, after: OpenSums | null, say: Say): string {
  if (!before || before.totalMinor === after?.totalMinor) return '';
  return after
    ? `All shares together: ${say.money(after.totalMinor)}, before ${say.money(before.totalMinor)}.`
    : 'No packs would cover the pledges any more.';
}

async function tellPledgers(
  actor: BuyActor,
  buy: Buy,
  edit: TermsEdit,
  to: readonly string[],
  sums: { before: OpenSums | null; after: OpenSums | null },
  tx: Tx,
): Promise<void> {
  const say = sayFor(actor.club);
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'terms_changed',
    eventKey: `buy:${buy.id}:terms:${buy.termsVersion}`,
    to,
    content: (membershipId) => {
      const was = sums.before?.byMember.get(membershipId);
      const is = sums.after?.byMember.get(membershipId);
      return {
        subject: `${buy.name}: the terms changed`,
        paragraphs: [
          `${actor.name} changed the terms of ${buy.name}.`,
          edit.summary,
          ...(buy.state === 'open'
            ? ['You can change or withdraw your pledge until it closes.']
            : []),
        ],
        ...(was !== undefined && is !== undefined && was !== is
          ? { rows: [['You would pay', `${say.money(is)}, before ${say.money(was)}`] as const] }
          : {}),
        action: { label: 'See the buy', path: buyPath(actor, buy.id) },
      };
    },
  });
}

/**
 * One change of a buy's terms: under the lock, against the version that the organiser saw, listed, audited and told
 * to all who pledged. With `preview` it is computed in full and then taken back; the reply says what it would do.
 * @throws DomainProblem 409 `stale` or `wrong_state`, and whatever `work` refuses
 */
export async function editTerms(
  actor: BuyActor,
  seen: SeenTerms,
  options: { states: readonly BuyState[]; movesSums: boolean },
  work: (buy: Buy, tx: Tx, say: Say) => Promise<TermsEdit | null>,
): Promise<TermsReply> {
  const by = byActor(actor);
  let effect: TermsEffect | null = null;
  try {
    await withBuy(
      actor.buy.id,
      { states: options.states, termsVersion: seen.termsVersion },
      async (buy, tx) => {
        const counts = options.movesSums && buy.state === 'open';
        const before = counts ? await openSums(buy, tx) : null;
        const edit = await work(buy, tx, sayFor(actor.club));
        if (!edit) return;
        const after = counts ? await openSums(buy, tx) : null;
        const summary = [edit.summary, saySums(before, after, sayFor(actor.club))]
          .filter(Boolean)
          .join(' ');
        await changeTerms(buy, summary, by, tx);
        const pledged = buy.state === 'draft' ? [] : await pledgersOf(buy.id, tx);
        const to = [...new Set([...pledged, ...(edit.alsoTell ?? [])])].filter(
          (id) => id !== actor.membershipId,
        );
        effect = {
          summary: edit.summary,
          told: to.length,
          beforeMinor: before?.totalMinor ?? null,
          afterMinor: after?.totalMinor ?? null,
        };
        if (seen.preview) throw new PreviewDone();
        const { action, subject } = edit;
        await writeAudit(tx, {
          clubId: buy.clubId,
          buyId: buy.id,
          by,
          action,
          subject,
          ...(edit.before ? { before: edit.before } : {}),
          ...(edit.after ? { after: edit.after } : {}),
        });
        await tellPledgers(actor, buy, edit, to, { before, after }, tx);
        const { id: buyId, sheetVersion, state } = buy;
        tx.afterCommit(() => {
          publishToBuy(buyId, 'buy:changed', { kind: 'terms', buyId, sheetVersion });
          if (state === 'open') requestPlan(buyId);
        });
      },
    );
  } catch (error) {
    if (!(error instanceof PreviewDone)) throw error;
  }
  const head = await readBuyHeaderAgain(actor, actor.buy.id);
  return { head, terms: await readTerms(actor), effect };
}
