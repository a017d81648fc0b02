import type {
  SheetCharge,
  SheetOffer,
  SheetPledge,
  SheetSupplier,
  SheetTerms,
} from '#shared/domain/buys/sheetTerms.ts';
import { select, type Tx } from '../../config/database.ts';
import type { OwnSaltRow } from '../../presenters/salts.ts';
import { notFound } from '../problem.ts';
import { describeLineSalt } from './lineSalts.ts';

type LineRow = Omit<SheetTerms['lines'][number], 'salt' | 'totalsOnly'> & {
  own: OwnSaltRow | null;
};

/** A buy's terms as one row of JSON columns. */
export interface TermsRow {
  id: string;
  club_id: string;
  currency: string;
  terms_version: number;
  state: SheetTerms['state'];
  closes_at: Date | null;
  frozen_until: Date | null;
  lowering_freeze_hours: number;
  minimum_kind: SheetTerms['minimum']['kind'];
  minimum_amount: number;
  left_over_payer: SheetTerms['leftOverPayer'];
  shelf_limit_minor: number;
  spread_max_permille: number;
  hide_reportable_grams: boolean;
  lines: LineRow[] | null;
  offers: SheetOffer[] | null;
  suppliers: SheetSupplier[] | null;
  charges: SheetCharge[] | null;
  locked_terms: SheetTerms | null;
}

const offerRows = `lines l
  join offers o on o.club_id = b.club_id and o.salt_id = l.salt_id and o.archived_at is null
  join suppliers s on s.id = o.supplier_id and s.archived_at is null
  where l.buy_id = b.id and l.removed_at is null and (o.supplier_id = l.any_of_supplier_id
    or exists (select 1 from line_offers lo where lo.line_id = l.id and lo.offer_id = o.id))`;

/** Columns of TermsRow, for `from buys b join clubs c on c.id = b.club_id`. */
export const termsColumns = `b.id, b.club_id, c.currency, b.terms_version, b.state, b.closes_at, b.frozen_until,
  case when b.reopen_reason is null then b.lowering_freeze_hours else 0 end as lowering_freeze_hours, b.minimum_kind, b.minimum_amount, b.left_over_payer, b.shelf_limit_minor,
  b.spread_max_permille, c.hide_reportable_grams,
  (select json_agg(json_build_object('id', l.id, 'saltId', l.salt_id, 'stepMg', l.step_mg,
      'reservePermyriad', l.reserve_permyriad, 'surplus', l.surplus, 'shortage', l.shortage, 'note', l.note,
      'own', case when cs.id is not null then json_build_object('id', cs.id, 'kind', cs.kind, 'name', cs.name,
        'formula', cs.formula, 'cas', cs.cas, 'composition', cs.composition, 'hazardStatements', cs.hazard_statements,
        'signalWord', cs.signal_word, 'storage', cs.storage, 'note', cs.note, 'archivedAt', null,
        'version', cs.version) end) order by l.position, l.id)
    from lines l left join club_salts cs on cs.club_id = b.club_id and cs.id::text = l.salt_id
    where l.buy_id = b.id and l.removed_at is null) as lines,
  (select json_agg(json_build_object('id', o.id, 'lineId', l.id, 'supplierId', o.supplier_id, 'label', o.label,
      'packMg', o.pack_mg, 'priceMinor', o.price_minor, 'priceIncludesTax', o.price_includes_tax,
      'taxRatePpm', o.tax_rate_ppm, 'maxPacks', o.stock_packs, 'multipleOf', o.multiple_of) order by o.id)
    from ${offerRows}) as offers,
  (select json_agg(json_build_object('id', s.id, 'name', s.name, 'isShelf', s.is_shelf, 'shipping', s.shipping,
      'freeShippingFromMinor', s.free_shipping_from_minor, 'minimumOrderMinor', s.minimum_order_minor) order by s.id)
    from suppliers s where s.id in (select o.supplier_id from ${offerRows})) as suppliers,
  (select json_agg(json_build_object('id', ch.id, 'kind', ch.kind, 'name', ch.name, 'amountMinor', ch.amount_minor,
      'basis', ch.basis, 'supplierId', ch.supplier_id, 'lineIds', ch.line_ids, 'taxRatePpm', ch.tax_rate_ppm)
      order by ch.position, ch.id)
    from charges ch where ch.buy_id = b.id and ch.removed_at is null) as charges,
  case when b.state in ('draft', 'open') then null else (select sn.terms from snapshots sn
    where sn.buy_id = b.id and sn.kind = 'estimate' and sn.terms is not null
    order by sn.created_at desc limit 1) end as locked_terms`;

/** The terms of a row; from the lock on what stood at the lock, with the state and the texts of now. */
export function presentTerms(row: TermsRow): SheetTerms {
  const now: SheetTerms = {
    buyId: row.id,
    clubId: row.club_id,
    currency: row.currency,
    termsVersion: row.terms_version,
    state: row.state,
    closesAt: row.closes_at?.toISOString() ?? null,
    frozenUntil: row.frozen_until?.toISOString() ?? null,
    loweringFreezeHours: row.lowering_freeze_hours,
    minimum: { kind: row.minimum_kind, amount: row.minimum_amount },
    leftOverPayer: row.left_over_payer,
    shelfLimitMinor: row.shelf_limit_minor,
    spreadMaxPermille: row.spread_max_permille,
    lines: (row.lines ?? []).map(({ own, ...line }) => {
      const salt = describeLineSalt(line.saltId, own);
      return { ...line, salt, totalsOnly: row.hide_reportable_grams && salt.reportable };
    }),
    offers: row.offers ?? [],
    suppliers: row.suppliers ?? [],
    charges: row.charges ?? [],
  };
  if (!row.locked_terms) return now;
  const { lines, offers, suppliers, charges, leftOverPayer, spreadMaxPermille } = row.locked_terms;
  const hidden = new Map(now.lines.map(({ id, totalsOnly }) => [id, totalsOnly]));
  return {
    ...now,
    offers,
    suppliers,
    charges,
    leftOverPayer,
    spreadMaxPermille,
    lines: lines.map((line) => ({ ...line, totalsOnly: hidden.get(line.id) ?? line.totalsOnly })),
  };
}

/**
 * What a buy's sums depend on besides its pledges, in one statement. While it is a draft or open: the rows of now;
 * from the lock on: the terms that its newest estimate was made under.
 * @throws DomainProblem 404
 */
export async function loadSheetTerms(buyId: string, tx?: Tx): Promise<SheetTerms> {
  const [row] = await select<TermsRow>(
    `select ${termsColumns} from buys b join clubs c on c.id = b.club_id where b.id = :buyId`,
    { buyId },
    tx,
  );
  if (!row) throw notFound('This buy');
  return presentTerms(row);
}

/** Living pledges of a buy: neither dropped, nor empty, nor on a line that was removed. */
export async function loadPledges(buyId: string, tx?: Tx): Promise<SheetPledge[]> {
  const rows = await select<Omit<SheetPledge, 'at'> & { at: Date }>(
    `select p.membership_id as "membershipId", p.line_id as "lineId", p.wanted_mg as "wantedMg",
        p.up_to_mg as "upToMg", p.version, p.at
     from pledges p join lines l on l.id = p.line_id and l.removed_at is null
     where p.buy_id = :buyId and p.dropped_at is null and (p.wanted_mg > 0 or p.up_to_mg > 0)
     order by p.at, p.membership_id, p.line_id`,
    { buyId },
    tx,
  );
  return rows.map((row) => ({ ...row, at: row.at.toISOString() }));
}
