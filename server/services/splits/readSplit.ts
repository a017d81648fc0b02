import { cautionsFor } from '#shared/domain/salts/cautions.ts';
import { factsOfSalt } from '#shared/domain/salts/factsOfSalt.ts';
import type { OrderPack } from '#shared/domain/orders/orderTypes.ts';
import type { SplitLine, SplitOrder, SplitSheet } from '#shared/schemas/splits.ts';
import { select, type Tx } from '../../config/database.ts';
import { canSeeHiddenGrams } from '../../policies/splits.ts';
import {
  presentBag,
  presentPortion,
  type BagRow,
  type PortionRow,
} from '../../presenters/splits.ts';
import type { BuyActor } from '../actors.ts';
import { loadSheetTerms } from '../buys/loadSheetTerms.ts';
import { saltsByIds } from '../salts/saltsOfClub.ts';
import { findBags, findPortions } from './splitRows.ts';

interface HeadRow {
  state: SplitSheet['state'];
  terms_version: number;
  split_version: number;
  target_version: number;
  band_permille: number;
  takes_excess: boolean;
}

interface OrderRow {
  id: string;
  supplier_id: string;
  supplier: string;
  state: string;
  reference: string;
  note: string;
  version: number;
  packs: OrderPack[];
}

function presentOrder(row: OrderRow, bags: readonly BagRow[]): SplitOrder {
  const own = bags.filter(({ supplier_id }) => supplier_id === row.supplier_id);
  return {
    supplierId: row.supplier_id,
    supplier: row.supplier,
    state: row.state,
    reference: row.reference,
    note: row.note,
    version: row.version,
    packs: row.packs.map(({ offerId, lineId, packs, packMg }) => ({
      offerId,
      lineId,
      packMg,
      ordered: packs,
      received:
        own.length === 0
          ? null
          : own.filter(({ offer_id, missing }) => offer_id === offerId && !missing).length,
    })),
  };
}

async function describeLines(
  actor: BuyActor,
  portions: readonly PortionRow[],
  tx?: Tx,
): Promise<SplitLine[]> {
  const terms = await loadSheetTerms(actor.buy.id, tx);
  const salts = await saltsByIds(
    actor.club.id,
    terms.lines.map(({ saltId }) => saltId),
    tx,
  );
  const notes = await select<{ id: string; note: string }>(
    'select id, unaccounted_note as note from lines where buy_id = :buyId',
    { buyId: actor.buy.id },
    tx,
  );
  const seesAll = canSeeHiddenGrams(actor);
  return terms.lines.map((line): SplitLine => {
    const salt = salts.get(line.saltId);
    const own = portions.filter(({ line_id, state }) => line_id === line.id && state !== 'void');
    return {
      id: line.id,
      saltId: line.saltId,
      name: line.salt.name,
      formula: line.salt.formula,
      signalWord: line.salt.signalWord,
      pictograms: line.salt.pictograms,
      hazards: line.salt.hazards,
      cautions: salt ? cautionsFor(factsOfSalt(salt), 'bench') : [],
      storage: line.salt.storage,
      stepMg: line.stepMg,
      shortage: line.shortage,
      surplus: line.surplus,
      hidden: line.totalsOnly && !seesAll,
      progress: { portions: own.length, done: own.filter(({ state }) => state === 'done').length },
      unaccountedNote: notes.find(({ id }) => id === line.id)?.note ?? '',
    };
  });
}

/** Bags, portions and progress of a buy; of a line whose grams are hidden only the reader's own portions. */
export async function readSplit(actor: BuyActor): Promise<SplitSheet> {
  const buyId = actor.buy.id;
  const [head] = await select<HeadRow>(
    `select state, terms_version, split_version, target_version, band_permille, excess_loss_at is not null as takes_excess
     from buys where id = :buyId`,
    { buyId },
  );
  if (!head) throw new Error('no such buy');
  const orders = await select<OrderRow>(
    `select o.id, o.supplier_id, s.name as supplier, o.state, o.reference, o.note, o.version, o.packs
     from supplier_orders o join suppliers s on s.id = o.supplier_id
     where o.buy_id = :buyId and o.state <> 'draft' order by lower(s.name), s.id`,
    { buyId },
  );
  const bags = await findBags(buyId);
  const portions = await findPortions(buyId);
  const lines = await describeLines(actor, portions);
  const hidden = new Set(lines.filter((line) => line.hidden).map(({ id }) => id));
  return {
    buyId,
    state: head.state,
    termsVersion: head.terms_version,
    splitVersion: head.split_version,
    targetVersion: head.target_version,
    bandPermille: head.band_permille,
    clubTakesExcess: head.takes_excess,
    lines,
    orders: orders.map((order) => presentOrder(order, bags)),
    bags: bags.map(presentBag),
    portions: portions
      .filter((row) => !hidden.has(row.line_id) || row.membership_id === actor.membershipId)
      .map(presentPortion),
  };
}
