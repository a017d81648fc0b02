import { formatMass } from '#shared/domain/mass/formatMass.ts';
import { bandMg, judgeWeighing } from '#shared/domain/splits/judgeWeighing.ts';
import { scaleRefusal, type ScaleRefusal } from '#shared/domain/splits/scaleFits.ts';
import type { SplitChange, WeighingBody } from '#shared/schemas/splits.ts';
import { execute, select, type Tx } from '../../config/database.ts';
import type { Buy } from '../../models/Buy.ts';
import { presentPortion, type PortionRow } from '../../presenters/splits.ts';
import type { BuyActor } from '../actors.ts';
import { withBuy } from '../buys/withBuy.ts';
import { DomainProblem, invalid, stale, wrongState } from '../problem.ts';
import { changeSplit } from './changeSplit.ts';
import { lockedBag } from './lockedBag.ts';
import { lockedPortion } from './lockedPortion.ts';

interface Known {
  portion_id: string;
  bag_id: string;
  reading_mg: number;
  undone_at: Date | null;
}

/** A weighing that came before, by the id that its device made. */
async function findKnown(body: WeighingBody, tx: Tx): Promise<Known | null> {
  const [known] = await select<Known>(
    'select portion_id, bag_id, reading_mg, undone_at from weighings where id = :id',
    { id: body.id },
    tx,
  );
  if (!known) return null;
  if (
    known.portion_id !== body.portionId ||
    known.bag_id !== body.bagId ||
    known.reading_mg !== body.readingMg
  ) {
    throw new DomainProblem(409, 'already_there', 'Another weighing has this id already.');
  }
  return known;
}

function requireFree(portion: PortionRow, actor: BuyActor): void {
  const now = presentPortion(portion);
  if (portion.state === 'done' && now.weighing) {
    const { by, readingMg, station } = now.weighing;
    const where = station ? ` on ${station}` : '';
    throw stale(`${by.name} weighed it already${where}: ${formatMass(readingMg)}.`, now);
  }
  if (portion.state === 'void') throw wrongState('This portion was taken out.', now);
  if (portion.state === 'claimed' && portion.claimed_by_id !== actor.membershipId) {
    throw stale(`${portion.claimed_by ?? 'Somebody else'} is weighing this portion.`, now);
  }
}

function requireTarget(portion: PortionRow, body: WeighingBody): void {
  if (portion.target_version !== body.targetVersion || portion.target_mg !== body.targetMg) {
    throw stale(
      `The target changed from ${formatMass(body.targetMg)} to ${formatMass(portion.target_mg)} while you weighed.`,
      presentPortion(portion),
    );
  }
}

function sayRefusal(refusal: ScaleRefusal): Record<string, string> {
  switch (refusal.code) {
    case 'too_heavy':
      return {
        capacityMg: `It is above what this scale carries (${formatMass(refusal.capacityMg)}): cut it into parts.`,
      };
    case 'too_coarse':
      return {
        divisionMg: `This line is weighed in finer steps. Use a scale that shows ${formatMass(refusal.needsDivisionMg)} or less.`,
      };
    case 'too_small':
      return {
        divisionMg: `It is under 20 divisions of this scale. Use one that shows ${formatMass(refusal.needsDivisionMg)} or less.`,
      };
  }
}

async function requireScale(portion: PortionRow, body: WeighingBody, tx: Tx): Promise<void> {
  const [line] = await select<{ step_mg: number }>(
    'select step_mg from lines where id = :id',
    { id: portion.line_id },
    tx,
  );
  const asked = { targetMg: portion.target_mg, stepMg: line?.step_mg ?? 1 };
  const refusal = scaleRefusal(asked, body);
  if (refusal) throw invalid(sayRefusal(refusal));
}

function judge(buy: Buy, portion: PortionRow, body: WeighingBody) {
  const band = bandMg(portion.target_mg, body.divisionMg, buy.bandPermille);
  const verdict = judgeWeighing({
    readingMg: body.readingMg,
    targetMg: portion.target_mg,
    bandMg: band,
    secondLook: body.secondLook,
  });
  if (verdict.verdict === 'above') {
    const over = formatMass(body.readingMg - portion.target_mg);
    throw invalid({ readingMg: `${over} too much: scoop some back.` });
  }
  if (!verdict.kept) {
    const under = formatMass(portion.target_mg - body.readingMg);
    throw invalid({ secondLook: `${under} too little. Look again, then keep it.` });
  }
  return { ...verdict, band };
}

/**
 * Keeps one weighing. Sending it again, from a device that heard no answer, changes nothing. Within the band the target
 * is charged; below it, after a second look, what was weighed; above it nothing is kept.
 * @throws DomainProblem 409 `stale` with both facts when the target changed, another weighs or has weighed it; 422 when
 * the reading is above the band, below it without a second look, or the scale can't weigh this portion
 */
export async function keepWeighing(actor: BuyActor, body: WeighingBody): Promise<SplitChange> {
  return withBuy(actor.buy.id, {}, async (buy, tx) => {
    const portion = await lockedPortion(buy.id, body.portionId, undefined, tx);
    if (await findKnown(body, tx)) return changeSplit(buy, { portionIds: [portion.id] }, tx);
    if (buy.state !== 'splitting') {
      throw wrongState(`Nothing is weighed while the buy is ${buy.state}.`, { state: buy.state });
    }
    requireFree(portion, actor);
    requireTarget(portion, body);
    const bag = await lockedBag(buy.id, body.bagId, undefined, tx);
    if (bag.lineId !== portion.line_id) throw invalid({ bagId: 'This bag holds another salt.' });
    if (bag.closed) throw stale('This bag is closed.', { bagId: bag.id, closed: true });
    if (bag.facts.netMg === null) throw invalid({ bagId: 'This bag is not weighed yet.' });
    await requireScale(portion, body, tx);
    const { verdict, chargedMg, band } = judge(buy, portion, body);
    await execute(
      `insert into weighings (id, buy_id, portion_id, bag_id, station, scale, division_mg, capacity_mg, reading_mg,
         charged_mg, verdict, second_look, target_mg, target_version, band_mg, weighed_by_id)
       values (:id, :buyId, :portionId, :bagId, :station, :scale, :divisionMg, :capacityMg, :readingMg, :chargedMg,
         :verdict, :secondLook, :targetMg, :targetVersion, :band, :byId)`,
      { ...body, buyId: buy.id, chargedMg, verdict, band, byId: actor.membershipId },
      tx,
    );
    await execute(
      `update portions set state = 'done', weighed_mg = :readingMg, charged_mg = :chargedMg, bag_id = :bagId,
         done_at = clock_timestamp(), claimed_by_id = null, claimed_at = null, station = :station,
         version = version + 1, updated_at = now() where id = :portionId`,
      { ...body, chargedMg },
      tx,
    );
    return changeSplit(buy, { portionIds: [portion.id], bagIds: [bag.id] }, tx);
  });
}
