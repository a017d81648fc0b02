import { select, type Tx } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import { publishToBuy } from '../../sockets/publish.ts';
import type { By } from '../actorName.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { requestPlan } from '../sheet/planning.ts';
import { changeTerms, pledgersOf } from './withBuy.ts';

/** One change of an offer, or with `offerId` null of a supplier's terms, in a plain sentence with its effect. */
export interface OfferChanged {
  readonly supplierId: string;
  readonly offerId: string | null;
  readonly summary: string;
  /** Only what is in stock moved: the plan follows, and nobody is written to. */
  readonly quiet?: boolean;
}

interface Touched {
  buy_id: string;
  club_slug: string;
  offer_id: string;
  supplier_id: string;
}

const sentences = 6;

/** Open buys with a line that draws on one of these suppliers, and the offers it draws on; one just archived counts. */
async function openBuysOf(changes: readonly OfferChanged[], tx: Tx): Promise<Touched[]> {
  return select<Touched>(
    `select distinct b.id as buy_id, c.slug as club_slug, o.id as offer_id, o.supplier_id
     from buys b join clubs c on c.id = b.club_id
     join lines l on l.buy_id = b.id and l.removed_at is null
     join offers o on o.club_id = b.club_id and o.salt_id = l.salt_id
     where b.state = 'open' and o.supplier_id in (:supplierIds)
       and (o.archived_at is null or o.id::text in (:offerIds))
       and (o.supplier_id = l.any_of_supplier_id
         or exists (select 1 from line_offers lo where lo.line_id = l.id and lo.offer_id = o.id))
     order by b.id`,
    {
      supplierIds: [...new Set(changes.map((change) => change.supplierId))],
      offerIds: ['', ...changes.flatMap(({ offerId }) => offerId ?? [])],
    },
    tx,
  );
}

/**
 * Tells every open buy that draws on these offers of their change: its terms count one change, everyone who pledged is
 * noticed, open sheets reload. Runs in the transaction of the change, under the supplier's lock; locks the buys in the
 * order of their ids.
 */
export async function offersChanged(
  tx: Tx,
  changes: readonly OfferChanged[],
  by: By,
): Promise<void> {
  if (changes.length === 0) return;
  const touched = await openBuysOf(changes, tx);
  for (const buyId of [...new Set(touched.map((row) => row.buy_id))]) {
    const rows = touched.filter((row) => row.buy_id === buyId);
    const mine = changes.filter(({ supplierId, offerId }) =>
      rows.some(
        (row) => row.supplier_id === supplierId && (offerId === null || row.offer_id === offerId),
      ),
    );
    if (mine.length > 0) await tellBuy(tx, buyId, rows[0]?.club_slug ?? '', mine, by);
  }
}

async function tellBuy(
  tx: Tx,
  buyId: string,
  clubSlug: string,
  changes: readonly OfferChanged[],
  by: By,
): Promise<void> {
  const buy = await Buy.lock(buyId, tx);
  if (buy.state !== 'open') return;
  const loud = changes.filter(({ quiet }) => !quiet);
  const shown = loud.length > 0 ? loud : changes;
  const said = shown.slice(0, sentences).map(({ summary }) => summary);
  const more = shown.length - said.length;
  if (more > 0) said.push(`${more} more ${more === 1 ? 'change' : 'changes'} of offers.`);
  await changeTerms(buy, said.join(' '), by, tx, {
    offers: changes.map((one) => ({ ...one })),
    ...(loud.length > 0 ? {} : { quiet: true }),
  });
  await writeAudit(tx, {
    clubId: buy.clubId,
    buyId,
    by,
    action: 'buys.offers_changed',
    subject: { type: 'buy', id: buyId },
    after: { changes: changes.map(({ summary }) => summary) },
  });
  if (loud.length > 0) await writeNotice(tx, buy, clubSlug, said);
  const { sheetVersion } = buy;
  tx.afterCommit(() => {
    publishToBuy(buyId, 'buy:changed', { kind: 'terms', buyId, sheetVersion });
    requestPlan(buyId);
  });
}

async function writeNotice(tx: Tx, buy: Buy, clubSlug: string, said: readonly string[]) {
  const buyId = buy.id;
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId,
    kind: 'terms_changed',
    eventKey: `buy:${buyId}:terms:${buy.termsVersion}`,
    to: await pledgersOf(buyId, tx),
    content: {
      subject: `${buy.name}: prices or packs changed`,
      paragraphs: [
        ...said,
        'Your estimate follows. You can change your pledges while the buy is open.',
      ],
      action: { label: 'Open the buy', path: `/c/${clubSlug}/buys/${buyId}` },
    },
  });
}
