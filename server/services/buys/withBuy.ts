import type { BuyState } from '#shared/domain/buys/states.ts';
import { select, execute, transact, type Tx } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import type { By } from '../actorName.ts';
import { stale, wrongState } from '../problem.ts';

/** The member as the one who acts, for audit lines and postings. */
export function byActor(actor: { membershipId: string; name: string; requestId: string }): By {
  return { membershipId: actor.membershipId, name: actor.name, requestId: actor.requestId };
}

/** What changed in a buy's terms since a version somebody saw, oldest first. */
export async function termsChangesSince(
  buyId: string,
  termsVersion: number,
  tx?: Tx,
): Promise<{ termsVersion: number; summary: string; at: Date }[]> {
  return select(
    `select terms_version as "termsVersion", summary, at from terms_changes
     where buy_id = :buyId and terms_version > :termsVersion order by terms_version, at`,
    { buyId, termsVersion },
    tx,
  );
}

/**
 * One transaction under the buy's row lock, which is its first read.
 * @param expects states in which the act makes sense, and the terms version that the actor saw
 * @throws DomainProblem 409 `stale` with what changed since, or 409 `wrong_state`
 */
export async function withBuy<T>(
  buyId: string,
  expects: { states?: readonly BuyState[]; termsVersion?: number },
  work: (buy: Buy, tx: Tx) => Promise<T>,
): Promise<T> {
  return transact(async (tx) => {
    const buy = await Buy.lock(buyId, tx);
    if (expects.termsVersion !== undefined && expects.termsVersion !== buy.termsVersion) {
      const changes = await termsChangesSince(buyId, expects.termsVersion, tx);
      const words = changes.map(({ summary }) => summary).join(' ');
      throw stale(`This buy has changed since you opened the page. ${words}`.trim(), {
        termsVersion: buy.termsVersion,
        state: buy.state,
        changes,
      });
    }
    if (expects.states && !expects.states.includes(buy.state)) {
      throw wrongState(`This can't be done while the buy is ${buy.state}.`, {
        termsVersion: buy.termsVersion,
        state: buy.state,
      });
    }
    return work(buy, tx);
  });
}

/**
 * Counts one change of the terms (and of the sheet) on the locked buy and lists it for those who pledged.
 * The caller saves other fields on `buy` before; this saves all of them.
 * @param summary one plain sentence with its effect, e.g. "Closing moved from 3 to 5 December."
 */
export async function changeTerms(
  buy: Buy,
  summary: string,
  by: By,
  tx: Tx,
  detail: Record<string, unknown> = {},
): Promise<void> {
  buy.termsVersion += 1;
  buy.sheetVersion += 1;
  await buy.save({ transaction: tx.transaction });
  await execute(
    `insert into terms_changes (buy_id, terms_version, summary, detail, changed_by_id)
     values (:buyId, :termsVersion, :summary, :detail, :byId)`,
    {
      buyId: buy.id,
      termsVersion: buy.termsVersion,
      summary,
      detail: JSON.stringify(detail),
      byId: by.membershipId,
    },
    tx,
  );
}

/** Membership ids of everyone who has a living pledge in the buy. */
export async function pledgersOf(buyId: string, tx: Tx): Promise<string[]> {
  const rows = await select<{ membership_id: string }>(
    `select distinct membership_id from pledges
     where buy_id = :buyId and dropped_at is null and (wanted_mg > 0 or up_to_mg > 0) order by membership_id`,
    { buyId },
    tx,
  );
  return rows.map((row) => row.membership_id);
}
