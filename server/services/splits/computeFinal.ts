import type { SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import { reconcileBag, reconcileBags } from '#shared/domain/splits/bagSums.ts';
import {
  finalShareOf,
  type ChargedShare,
  type FinalShare,
} from '#shared/domain/splits/finalShare.ts';
import type { Reconciliation } from '#shared/domain/splits/reconcile.ts';
import { select, type Tx } from '../../config/database.ts';
import { presentBag, type BagRow, type PortionRow } from '../../presenters/splits.ts';
import { loadPledges, loadSheetTerms } from '../buys/loadSheetTerms.ts';
import { costsOfBuy } from '../orders/costsOfBuy.ts';
import { basisOf } from './basisOf.ts';
import { findBags, findPortions } from './splitRows.ts';

/** The final share as it would be now, and what still stands in its way. */
export interface ComputedFinal {
  readonly terms: SheetTerms;
  readonly bags: readonly BagRow[];
  readonly portions: readonly PortionRow[];
  readonly reconciled: Readonly<Record<string, Reconciliation>>;
  readonly share: FinalShare;
  /** The same with the club bearing what was lost above 2 %, for the treasurer's choice. */
  readonly possibleExcess: FinalShare['excess'];
  readonly clubTakesExcess: boolean;
  readonly names: Readonly<Record<string, string>>;
  readonly blocked: string[];
  readonly basis: string;
}

const count = (n: number, one: string, many: string) => (n === 1 ? `1 ${one}` : `${n} ${many}`);

function whatIsOpen(
  portions: readonly PortionRow[],
  bags: readonly BagRow[],
  terms: SheetTerms,
  reconciled: Readonly<Record<string, Reconciliation>>,
  lineNotes: ReadonlyMap<string, string>,
): string[] {
  const blocked: string[] = [];
  const open = portions.filter(({ state }) => state === 'waiting' || state === 'claimed').length;
  if (open > 0) blocked.push(`${count(open, 'portion is', 'portions are')} still to weigh.`);
  const unclosed = bags.filter(({ missing, closed_at }) => !missing && closed_at === null).length;
  if (unclosed > 0) blocked.push(`${count(unclosed, 'bag is', 'bags are')} still to close.`);
  for (const bag of bags.filter(({ closed_at }) => closed_at !== null)) {
    if (reconcileBag(presentBag(bag)).needsNote && bag.unaccounted_note === '') {
      const line = terms.lines.find(({ id }) => id === bag.line_id);
      blocked.push(
        `Bag ${bag.number} of ${line?.salt.name ?? 'a line'} needs a note on what is missing.`,
      );
    }
  }
  for (const { id, salt } of terms.lines) {
    if (reconciled[id]?.needsNote && !lineNotes.get(id) && unclosed === 0) {
      blocked.push(`${salt.name} needs a note on what is unaccounted for.`);
    }
  }
  return blocked;
}

async function chargedShares(
  buyId: string,
  portions: readonly PortionRow[],
  tx: Tx | undefined,
): Promise<ChargedShare[]> {
  const pledges = await loadPledges(buyId, tx);
  const charged = new Map<string, ChargedShare>();
  for (const portion of portions) {
    if (portion.state !== 'done') continue;
    const { line_id: lineId, membership_id: membershipId } = portion;
    const key = `${lineId} ${membershipId}`;
    const pledge = pledges.find((p) => p.lineId === lineId && p.membershipId === membershipId);
    const so = charged.get(key) ?? {
      membershipId,
      lineId,
      chargedMg: 0,
      at: pledge?.at ?? portion.created_at.toISOString(),
    };
    charged.set(key, { ...so, chargedMg: so.chargedMg + (portion.charged_mg ?? 0) });
  }
  return [...charged.values()];
}

/** Everyone's final share by what was weighed and billed so far. */
export async function computeFinal(buyId: string, tx?: Tx): Promise<ComputedFinal> {
  const terms = await loadSheetTerms(buyId, tx);
  const bags = await findBags(buyId, tx);
  const portions = await findPortions(buyId, tx);
  const reconciled = Object.fromEntries(
    terms.lines.map(({ id }) => [
      id,
      reconcileBags(bags.filter(({ line_id }) => line_id === id).map(presentBag)),
    ]),
  );
  const costs = await costsOfBuy(buyId, tx);
  const [choice] = await select<{ takes: boolean }>(
    'select excess_loss_at is not null as takes from buys where id = :buyId',
    { buyId },
    tx,
  );
  const notes = await select<{ id: string; note: string }>(
    'select id, unaccounted_note as note from lines where buy_id = :buyId',
    { buyId },
    tx,
  );
  const clubTakesExcess = choice?.takes ?? false;
  // What is still in an open bag is not lost.
  const allClosed = bags.every(({ missing, closed_at }) => missing || closed_at !== null);
  const given = {
    terms,
    charged: await chargedShares(buyId, portions, tx),
    reconciled,
    costs: costs.received,
    lost: costs.lost,
  };
  const share = finalShareOf({ ...given, clubTakesExcess: clubTakesExcess && allClosed });
  const lineNotes = new Map(notes.map(({ id, note }) => [id, note]));
  const blocked = whatIsOpen(portions, bags, terms, reconciled, lineNotes);
  if (!costs.ready) blocked.push(costs.reason ?? 'A bill is missing.');
  return {
    terms,
    bags,
    portions,
    reconciled,
    share,
    possibleExcess: finalShareOf({ ...given, clubTakesExcess: allClosed }).excess,
    clubTakesExcess,
    names: costs.names,
    blocked,
    basis: basisOf([share.request, share.lost, share.excess]),
  };
}
