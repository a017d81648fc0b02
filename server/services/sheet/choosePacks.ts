import { packRequestOf } from '#shared/domain/buys/requests.ts';
import { pricePacks, type PackProblem } from '#shared/domain/packs/pricePacks.ts';
import type { SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import type { BuyHeader } from '#shared/schemas/buys.ts';
import type { PacksBody } from '#shared/schemas/sheet.ts';
import { transact } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import { systemActor } from '../actorName.ts';
import type { BuyActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { editTerms } from '../buys/editTerms.ts';
import { loadPledges, loadSheetTerms } from '../buys/loadSheetTerms.ts';
import type { Say } from '../buys/sayTerms.ts';
import { changeTerms } from '../buys/withBuy.ts';
import { invalid } from '../problem.ts';

function sayProblem(
  problem: PackProblem,
  terms: SheetTerms,
  say: Say,
): [field: string, text: string] {
  const supplier = (id: string) => terms.suppliers.find((one) => one.id === id)?.name ?? '';
  switch (problem.code) {
    case 'line_short': {
      const name = terms.lines.find(({ id }) => id === problem.lineId)?.salt.name ?? '';
      return [`lines.${problem.lineId}`, `${name}: ${say.mass(problem.missingMg)} are missing.`];
    }
    case 'over_stock':
      return [`packs.${problem.offerId}`, `Only ${problem.maxPacks} are in stock.`];
    case 'not_a_multiple':
      return [`packs.${problem.offerId}`, `They are sold by ${problem.multipleOf}.`];
    case 'below_minimum':
      return [
        `suppliers.${problem.supplierId}`,
        `${supplier(problem.supplierId)}: ${say.money(problem.missingMinor)} below its minimum order.`,
      ];
    default:
      return [
        `suppliers.${problem.supplierId}`,
        `${supplier(problem.supplierId)} doesn't deliver that much.`,
      ];
  }
}

/**
 * Puts the organiser's own choice of packs in place of the plan, or takes it back; everyone who pledged is told what
 * it does to their sum.
 * @throws DomainProblem 409 `stale` or `wrong_state`; 422 for packs that can't be ordered or cover a line too little
 */
export async function choosePacks(actor: BuyActor, body: PacksBody): Promise<BuyHeader> {
  const options = { states: ['open'] as const, movesSums: true };
  const { head } = await editTerms(actor, body, options, async (buy, tx, say) => {
    const before = buy.planOverride;
    if (body.packs === null && before === null) return null;
    let summary = 'The pack plan applies again.';
    if (body.packs) {
      const terms = await loadSheetTerms(buy.id, tx);
      const offers = new Set(terms.offers.map(({ id }) => id));
      const unknown = Object.keys(body.packs).find((id) => !offers.has(id));
      if (unknown)
        throw invalid({ [`packs.${unknown}`]: 'This offer is not in the buy any more.' });
      const request = packRequestOf(terms, await loadPledges(buy.id, tx));
      const price = pricePacks(request, body.packs);
      if (!price.feasible) {
        throw invalid(Object.fromEntries(price.problems.map((one) => sayProblem(one, terms, say))));
      }
      summary = `The organiser chose the packs: ${say.money(price.totalMinor)} with shipping.`;
    }
    buy.planOverride = body.packs
      ? Object.fromEntries(Object.entries(body.packs).filter(([, count]) => count > 0))
      : null;
    return {
      summary,
      action: 'buys.choose_packs',
      subject: { type: 'buy', id: buy.id },
      before: { packs: before },
      after: { packs: buy.planOverride },
    };
  });
  return head;
}

const planner = systemActor('Pack plan');

/** Takes back a choice of packs that no longer covers the pledges or can't be ordered, with a note for everyone. */
export async function dropChosenPacks(buyId: string, sheetVersion: number): Promise<void> {
  await transact(async (tx) => {
    const buy = await Buy.lock(buyId, tx);
    if (buy.state !== 'open' || !buy.planOverride || buy.sheetVersion !== sheetVersion) return;
    const before = buy.planOverride;
    buy.planOverride = null;
    await changeTerms(
      buy,
      "The organiser's packs no longer fit the pledges, so the pack plan applies again.",
      planner,
      tx,
    );
    await writeAudit(tx, {
      clubId: buy.clubId,
      buyId,
      by: planner,
      action: 'buys.drop_packs',
      subject: { type: 'buy', id: buyId },
      before: { packs: before },
      after: { packs: null },
    });
    const version = buy.sheetVersion;
    tx.afterCommit(() =>
      publishToBuy(buyId, 'buy:changed', { kind: 'terms', buyId, sheetVersion: version }),
    );
  });
}
