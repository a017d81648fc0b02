import { termsBlocks } from '#shared/domain/buys/termsBlocks.ts';
import type {
  BuyTerms,
  DraftLine,
  DraftOffer,
  DraftSupplier,
  LineChoices,
} from '#shared/schemas/buyTerms.ts';
import { databaseNow, select, transact, type Tx } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import type { BuyActor } from '../actors.ts';
import { listSalts, saltsByIds } from '../salts/saltsOfClub.ts';
import { loadSheetTerms } from './loadSheetTerms.ts';

type LineRow = Omit<DraftLine, 'name' | 'formula' | 'classified' | 'reportable' | 'refusal'>;

async function findLines(buyId: string, tx: Tx): Promise<LineRow[]> {
  return select<LineRow>(
    `select l.id, l.salt_id as "saltId", l.step_mg as "stepMg", l.reserve_permyriad as "reservePermyriad",
        l.surplus, l.shortage, l.any_of_supplier_id as "anyOfSupplierId", l.note,
        array(select lo.offer_id::text from line_offers lo where lo.line_id = l.id order by lo.offer_id) as "offerIds",
        count(p.id)::int as pledgers, coalesce(sum(p.wanted_mg), 0)::bigint as "pledgedMg"
     from lines l left join pledges p on p.line_id = l.id and p.dropped_at is null and (p.wanted_mg > 0 or p.up_to_mg > 0)
     where l.buy_id = :buyId and l.removed_at is null
     group by l.id order by l.position, l.id`,
    { buyId },
    tx,
  );
}

/** Offers a club has for these salts: the living ones, and the gone ones that a line of the buy still names. */
async function findOffers(clubId: string, buyId: string, tx: Tx): Promise<DraftOffer[]> {
  return select<DraftOffer>(
    `select o.id, o.salt_id as "saltId", o.supplier_id as "supplierId", s.name as "supplierName", o.label,
        o.pack_mg as "packMg", o.price_minor as "priceMinor", o.price_includes_tax as "priceIncludesTax",
        o.tax_rate_ppm as "taxRatePpm", o.stock_packs as "stockPacks", o.multiple_of as "multipleOf",
        (o.archived_at is not null or s.archived_at is not null) as gone
     from offers o join suppliers s on s.id = o.supplier_id
     where o.club_id = :clubId
       and o.salt_id in (select salt_id from lines where buy_id = :buyId and removed_at is null)
       and ((o.archived_at is null and s.archived_at is null) or exists (
         select 1 from line_offers lo join lines l on l.id = lo.line_id and l.buy_id = :buyId and l.removed_at is null
         where lo.offer_id = o.id))
     order by s.is_shelf desc, lower(s.name), o.pack_mg, o.id`,
    { clubId, buyId },
    tx,
  );
}

/** All that the editor of a buy shows besides its head. */
export async function readTerms(actor: BuyActor): Promise<BuyTerms> {
  return transact(async (tx) => readTermsIn(actor.club.id, actor.buy.id, tx));
}

/** The same inside a transaction. */
export async function readTermsIn(clubId: string, buyId: string, tx: Tx): Promise<BuyTerms> {
  const buy = await Buy.findByPk(buyId, { transaction: tx.transaction, rejectOnEmpty: true });
  const rows = await findLines(buyId, tx);
  const salts = await saltsByIds(
    clubId,
    rows.map(({ saltId }) => saltId),
    tx,
  );
  const offers = await findOffers(clubId, buyId, tx);
  const suppliers = await select<DraftSupplier>(
    `select id, name, is_shelf as "isShelf" from suppliers
     where club_id = :clubId and archived_at is null order by is_shelf desc, lower(name)`,
    { clubId },
    tx,
  );
  const [club] = await select<{ limit: number }>(
    'select shelf_limit_minor as limit from clubs where id = :clubId',
    { clubId },
    tx,
  );
  const lines = rows.map((row): DraftLine => {
    const salt = salts.get(row.saltId);
    return {
      ...row,
      name: salt?.name ?? row.saltId,
      formula: salt?.formula ?? null,
      classified: salt?.classified ?? false,
      reportable: salt?.reportable ?? false,
      refusal: salt ? salt.lineRefusal : 'This salt is no longer on the list of the club.',
    };
  });
  const sheet = await loadSheetTerms(buyId, tx);
  const blocks = termsBlocks({
    nowMs: (await databaseNow(tx)).getTime(),
    closesAtMs: buy.closesAt?.getTime() ?? null,
    splitsAtMs: buy.splitsAt?.getTime() ?? null,
    splitEndsAtMs: buy.splitEndsAt?.getTime() ?? null,
    minimumKind: buy.minimumKind,
    minimumAmount: buy.minimumAmount,
    leftOverPayer: buy.leftOverPayer,
    shelfLimitMinor: buy.shelfLimitMinor,
    clubShelfLimitMinor: club?.limit ?? 0,
    lines: lines.map(({ id, name, refusal }) => ({
      id,
      name,
      refusal,
      livingOffers: sheet.offers.filter(({ lineId }) => lineId === id).length,
    })),
  });
  return {
    termsVersion: buy.termsVersion,
    lines,
    offers,
    suppliers,
    sheet,
    blocks: buy.state === 'draft' ? blocks : {},
  };
}

/** Salts of the club for a new line, with the reason where one can't be, those with offers first. */
export async function listLineChoices(actor: BuyActor): Promise<LineChoices> {
  const salts = await listSalts(actor.club.id);
  const counts = await select<{ salt_id: string; offers: number }>(
    `select o.salt_id, count(*)::int as offers from offers o join suppliers s on s.id = o.supplier_id
     where o.club_id = :clubId and o.archived_at is null and s.archived_at is null group by o.salt_id`,
    { clubId: actor.club.id },
  );
  const offers = new Map(counts.map((row) => [row.salt_id, row.offers]));
  return {
    salts: salts
      .filter(({ hidden, archivedAt }) => !hidden && !archivedAt)
      .map((salt) => ({
        saltId: salt.id,
        name: salt.name,
        otherNames: salt.otherNames,
        formula: salt.formula,
        classified: salt.classified,
        reportable: salt.reportable,
        refusal: salt.lineRefusal,
        offers: offers.get(salt.id) ?? 0,
      }))
      .sort((a, b) => Number(b.offers > 0) - Number(a.offers > 0)),
  };
}
