import { portionCode, sequenceOfCode } from '#shared/domain/splits/portionCode.ts';
import { portionChanges, type Target } from '#shared/domain/splits/targets.ts';
import type { ApplyTargetsBody } from '#shared/schemas/splits.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import type { PortionRow } from '../../presenters/splits.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor, changeTerms, withBuy } from '../buys/withBuy.ts';
import { tellBuyChanged } from '../orders/tellBuy.ts';
import { stale, wrongState } from '../problem.ts';
import { changeSplit } from './changeSplit.ts';
import { computeTargets } from './computeTargets.ts';

/** The number after the last code that was given in a buy. */
export async function nextSequence(buyId: string, tx: Tx): Promise<number> {
  const codes = await select<{ code: string }>(
    'select code from portions where buy_id = :buyId order by length(code) desc, code desc limit 1',
    { buyId },
    tx,
  );
  return codes[0] ? sequenceOfCode(codes[0].code) + 1 : 1;
}

async function writeTarget(
  buy: Buy,
  target: Target,
  standing: readonly PortionRow[],
  takeCode: () => string,
  tx: Tx,
): Promise<string[]> {
  const changed: string[] = [];
  const version = buy.targetVersion;
  const own = standing.map(({ id, state, target_mg: targetMg }) => ({ id, state, targetMg }));
  for (const change of portionChanges(own, target.targetMg)) {
    if (change.act === 'add') {
      const [row] = await select<{ id: string }>(
        `insert into portions (buy_id, line_id, membership_id, code, target_mg, target_version)
         values (:buyId, :lineId, :membershipId, :code, :targetMg, :version) returning id`,
        {
          buyId: buy.id,
          lineId: target.lineId,
          membershipId: target.membershipId,
          code: takeCode(),
          targetMg: change.targetMg,
          version,
        },
        tx,
      );
      if (row) changed.push(row.id);
      continue;
    }
    const { id } = change.portion;
    changed.push(id);
    if (change.act === 'void') {
      await execute(
        `update portions set state = 'void', void_reason = 'The targets were worked out again.', voided_by_id = null,
           claimed_by_id = null, claimed_at = null, version = version + 1, updated_at = now() where id = :id`,
        { id },
        tx,
      );
    } else {
      await execute(
        `update portions set target_mg = :targetMg, target_version = :version, part = 1, parts = 1, void_reason = '',
           state = case when state = 'void' then 'waiting' else state end, version = version + 1, updated_at = now()
         where id = :id`,
        { id, targetMg: change.targetMg, version },
        tx,
      );
    }
  }
  return changed;
}

/**
 * Makes the previewed targets count: a snapshot, one portion a share, codes that stay. Once splitting has begun only
 * shares of which nothing is weighed yet change.
 * @throws DomainProblem 409 `stale` when the bags or pledges changed since the preview
 */
export async function applyTargets(actor: BuyActor, body: ApplyTargetsBody): Promise<void> {
  const expects = {
    states: ['arrived', 'splitting'] as const,
    termsVersion: body.termsVersion,
  };
  await withBuy(actor.buy.id, expects, async (buy, tx) => {
    const computed = await computeTargets(buy, tx);
    if (computed.blocked) throw wrongState(computed.blocked);
    if (computed.basis !== body.basis) {
      throw stale('Bags or pledges have changed since you looked. Look at the targets again.', {
        basis: computed.basis,
      });
    }
    if (computed.standing) return;
    buy.targetVersion += 1;
    let sequence = await nextSequence(buy.id, tx);
    const takeCode = () => portionCode(sequence++);
    const changed: string[] = [];
    const place = new Map(computed.terms.lines.map(({ id }, index) => [id, index]));
    const told = new Set<string>();
    const fresh = computed.targets
      .filter(({ kept }) => !kept)
      .sort((a, b) => (place.get(a.lineId) ?? 0) - (place.get(b.lineId) ?? 0));
    for (const target of fresh) {
      const own = computed.portions.filter(
        (portion) =>
          portion.line_id === target.lineId && portion.membership_id === target.membershipId,
      );
      changed.push(...(await writeTarget(buy, target, own, takeCode, tx)));
    }
    for (const { lineId, membershipId } of computed.targets) told.add(`${lineId} ${membershipId}`);
    for (const portion of computed.portions) {
      if (portion.state === 'void' || told.has(`${portion.line_id} ${portion.membership_id}`)) {
        continue;
      }
      const { line_id: lineId, membership_id: membershipId } = portion;
      const none = { lineId, membershipId, targetMg: 0, kept: false };
      changed.push(...(await writeTarget(buy, none, [portion], takeCode, tx)));
    }
    await execute(
      `insert into snapshots (buy_id, kind, terms_version, request, sheet, extra)
       values (:buyId, 'targets', :termsVersion, :request, :sheet, :extra)`,
      {
        buyId: buy.id,
        termsVersion: buy.termsVersion,
        request: JSON.stringify(computed.request),
        sheet: JSON.stringify(computed.sheet),
        extra: JSON.stringify({ targetVersion: buy.targetVersion, targets: computed.targets }),
      },
      tx,
    );
    await changeTerms(buy, 'The targets were worked out from what came.', byActor(actor), tx);
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId: buy.id,
      by: byActor(actor),
      action: 'splits.targets',
      subject: { type: 'buy', id: buy.id },
      after: { targetVersion: buy.targetVersion, portions: changed.length },
    });
    await changeSplit(buy, { portionIds: changed }, tx);
    tellBuyChanged(buy, 'terms', tx);
  });
}
