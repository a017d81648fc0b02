import { bestPlan } from './bestPlan.ts';
import { candidatePlan, type CandidatePlan } from './candidatePlan.ts';
import { OutOfTime, type Budget } from './clock.ts';
import type { LineCovers } from './lineCovers.ts';
import type { LineModel, PackModel } from './packModel.ts';
import type { Packing } from './packing.ts';
import type { LimitPrices } from './priceLimits.ts';

/** The place of a line, how much more it takes, and the packing it then gets. */
export type Step = { line: number; moreMg: number; before: Packing; after: Packing };

/** A line whose next change of packing is to be looked at. */
type Front = { line: number; more: number; plan: CandidatePlan };

/** What a packing's packs cost, without shipping. */
export function goodsOf({ line, counts }: Packing): number {
  return line.items.reduce((sum, item, i) => sum + item.price * (counts[i] as number), 0);
}

/** Whether a costs less per mass than b, exactly. */
function cheaper(a: Packing, b: Packing): boolean {
  return BigInt(goodsOf(a)) * BigInt(b.mass) < BigInt(goodsOf(b)) * BigInt(a.mass);
}

/** Whether any pack on offer is cheaper per mass than the packing is. */
function canFall(line: LineModel, packing: Packing): boolean {
  const goods = BigInt(goodsOf(packing));
  const mass = BigInt(packing.mass);
  return line.items.some((item) => BigInt(item.price) * mass < goods * BigInt(item.mass));
}

/** The model with one line needing more. */
function withNeed(model: PackModel, index: number, need: number): PackModel {
  const lines = model.lines.map((line) => (line.index === index ? { ...line, need } : line));
  return { ...model, lines };
}

/** A feasible plan for the raised line: the others' packings kept, its own replaced. */
function patched(model: PackModel, covers: LineCovers, plan: CandidatePlan, index: number) {
  const line = model.lines[index] as LineModel;
  const used = model.suppliers.map((supplier, s) => {
    if (!supplier.shared) return true;
    return plan.packings.some(({ masses }) => (masses[s] as number) > 0);
  });
  let best: CandidatePlan | null = null;
  for (const allowed of [used, used.map(() => true)]) {
    const packing = covers.best(line, allowed);
    if (!packing) continue;
    const packings = plan.packings.map((old) => (old.line.index === index ? packing : old));
    const tried = candidatePlan(model, packings);
    if (tried && (!best || tried.cost < best.cost)) best = tried;
  }
  return best;
}

/**
 * The least extra need on one line at which the new plan's packs for it cost less per mass; equal
 * masses go to the earlier line. A plan stays the best until its line's packs no longer suffice, so
 * only those points need a new plan.
 *
 * @returns null when no line gets cheaper before its need has doubled, or when time ran out
 */
export function nextStepOf(
  model: PackModel,
  plan: CandidatePlan,
  covers: LineCovers,
  budget: Budget,
  memory: Map<string, LimitPrices>,
): Step | null {
  const packingOf = (of: CandidatePlan, line: number) => of.packings[line] as Packing;
  const fronts: Front[] = model.lines
    .filter((line) => line.need > 0 && canFall(line, packingOf(plan, line.index)))
    .map(({ index, need }) => ({
      line: index,
      more: packingOf(plan, index).mass - need + 1,
      plan,
    }));

  for (;;) {
    let front: Front | undefined;
    for (const other of fronts) if (!front || other.more < front.more) front = other;
    if (!front || front.more === Infinity) return null;
    const { line, more } = front;
    const need = model.lines[line]?.need ?? 0;
    const raised = withNeed(model, line, need + more);
    const known = more > need ? null : patched(raised, covers, front.plan, line);
    const best = more > need ? null : bestPlan(raised, covers, budget, memory, known?.packings);
    if (best && !best.exact) throw new OutOfTime();
    if (!best?.plan) {
      front.more = Infinity;
      continue;
    }
    const after = packingOf(best.plan, line);
    const before = packingOf(plan, line);
    if (cheaper(after, before)) return { line, moreMg: more, before, after };
    front.plan = best.plan;
    front.more = after.mass - need + 1;
  }
}
