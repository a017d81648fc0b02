import type { FinishBody } from '#shared/schemas/splits.ts';
import { databaseNow, execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, changeTerms, withBuy } from '../buys/withBuy.ts';
import { buyAccountBalance } from '../ledger/balances.ts';
import { clubToday } from '../ledger/clubDay.ts';
import { postTransaction, type Posting } from '../ledger/postTransaction.ts';
import { tellBuyChanged } from '../orders/tellBuy.ts';
import { DomainProblem, stale, wrongState } from '../problem.ts';
import { changeSplit } from './changeSplit.ts';
import { computeFinal, type ComputedFinal } from './computeFinal.ts';
import { keepShelf } from './keepShelf.ts';
import { tellFinalShares } from './tellFinal.ts';

async function postFinal(
  buy: Buy,
  actor: BuyActor,
  computed: ComputedFinal,
  tx: Tx,
): Promise<void> {
  const { share } = computed;
  const { shelfMinor, lossMinor } = await keepShelf(buy, computed, tx);
  const excess = share.excess.reduce((sum, { minor }) => sum + minor, 0);
  const postings: Posting[] = [
    ...share.members.map(({ memberId, finalMinor }) => ({
      account: { kind: 'member' as const, refId: memberId },
      amountMinor: finalMinor,
    })),
    { account: { kind: 'shelf' }, amountMinor: shelfMinor },
    { account: { kind: 'losses' }, amountMinor: excess + lossMinor },
    { account: { kind: 'buy', refId: buy.id }, amountMinor: 0 - share.totalMinor },
  ];
  await postTransaction(tx, {
    clubId: buy.clubId,
    eventType: 'final_share',
    eventId: buy.id,
    onDate: await clubToday(buy.clubId, tx),
    memo: `Final shares of ${buy.name}`,
    buyId: buy.id,
    by: byActor(actor),
    postings,
  });
  const [bills] = await select<{ open: number }>(
    'select count(*)::int as open from bills where buy_id = :buyId and confirmed_at is null and voided_at is null',
    { buyId: buy.id },
    tx,
  );
  const left = await buyAccountBalance(buy.id, tx);
  if (bills?.open === 0 && left !== 0) {
    throw new DomainProblem(
      409,
      'sums_open',
      'The bills in the books don’t add up to what is shared out. Ask the treasurer to look at them.',
      { current: { leftMinor: left } },
    );
  }
}

async function keepFinals(buy: Buy, computed: ComputedFinal, tx: Tx): Promise<string[]> {
  const { share } = computed;
  for (const { memberId, finalMinor } of share.members) {
    await execute(
      `insert into buy_members (buy_id, membership_id, final_minor) values (:buyId, :memberId, :finalMinor)
       on conflict (buy_id, membership_id) do update set final_minor = excluded.final_minor,
         version = buy_members.version + 1, updated_at = now()`,
      { buyId: buy.id, memberId, finalMinor },
      tx,
    );
  }
  // Whoever has no share any more owes nothing, and what they paid is theirs.
  const others = await select<{ id: string }>(
    `update buy_members set final_minor = 0, version = version + 1, updated_at = now()
     where buy_id = :buyId and final_minor is null returning membership_id as id`,
    { buyId: buy.id },
    tx,
  );
  await execute(
    `insert into snapshots (buy_id, kind, terms_version, request, sheet, extra)
     values (:buyId, 'final', :termsVersion, :request, :sheet, :extra)`,
    {
      buyId: buy.id,
      termsVersion: buy.termsVersion,
      request: JSON.stringify(share.request),
      sheet: JSON.stringify(share.sheet),
      extra: JSON.stringify({ lost: share.lost, excess: share.excess, names: computed.names }),
    },
    tx,
  );
  return [...share.members.map(({ memberId }) => memberId), ...others.map(({ id }) => id)];
}

/**
 * Ends the split: moves the buy to pickup and posts the final share, once. What is left lies on the shelf by bag and lot.
 * @throws DomainProblem 409 with what is still open, `stale` when it changed since the preview, `sums_open` when the
 * confirmed bills don't add up to what is shared out
 */
export async function finishSplitting(actor: BuyActor, body: FinishBody): Promise<void> {
  const expects = { states: ['splitting'] as const, termsVersion: body.termsVersion };
  await withBuy(actor.buy.id, expects, async (buy, tx) => {
    const computed = await computeFinal(buy.id, tx);
    if (computed.blocked.length > 0) {
      throw wrongState(computed.blocked.join(' '), { blocked: computed.blocked });
    }
    if (computed.basis !== body.basis) {
      throw stale('Weights or bills have changed since you looked. Look at the shares again.', {
        basis: computed.basis,
      });
    }
    buy.state = 'pickup';
    buy.pickupAt = await databaseNow(tx);
    await changeTerms(
      buy,
      'The split is over and the final shares are posted.',
      byActor(actor),
      tx,
    );
    await postFinal(buy, actor, computed, tx);
    const members = await keepFinals(buy, computed, tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'splits.finish',
      subject: { type: 'buy', id: buy.id },
      before: { state: 'splitting' },
      after: {
        state: 'pickup',
        private: {
          finals: computed.share.members,
          shelfMinor: computed.share.sheet.shelf.totalMinor,
        },
      },
    });
    const names = new Map([
      ...Object.entries(computed.names),
      ...computed.terms.lines.map(({ id, salt }): [string, string] => [id, salt.name]),
    ]);
    await tellFinalShares(buy, actor.club, computed.share, names, members, tx);
    await changeSplit(buy, { more: true }, tx);
    tellBuyChanged(buy, 'state', tx);
  });
}
