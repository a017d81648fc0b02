import { createHash } from 'node:crypto';
import {
  guessColumns,
  importFields,
  neededFields,
  unitInHeader,
  type ImportField,
} from '#shared/domain/salts/import/columns.ts';
import { findDecimalMark } from '#shared/domain/salts/import/numbers.ts';
import { readOfferRow, type ReadingRules } from '#shared/domain/salts/import/readOfferRow.ts';
import type { ImportPreview, ImportRow, ImportRules } from '#shared/schemas/offerImport.ts';
import { OfferBody, type Offer } from '#shared/schemas/suppliers.ts';
import type { ClubSalt } from '#shared/schemas/salts.ts';
import { invalid } from '../../problem.ts';
import { offerFields } from '../../../presenters/suppliers.ts';
import type { Table } from './readTable.ts';

/** What an import is planned against: the salts that may have offers and the supplier's offers of now. */
export interface ImportGround {
  readonly currency: string;
  readonly salts: readonly ClubSalt[];
  readonly offers: readonly Offer[];
}

/** Names the state of the offers, so that a confirmed import is the one that was previewed. */
export function stateOfOffers(offers: readonly Offer[]): string {
  const state = offers.map(({ id, version }) => `${id}:${version}`).sort();
  return createHash('sha256').update(state.join()).digest('hex');
}

const keyOf = (offer: { saltId: string; packMg: number; label: string }) =>
  JSON.stringify([offer.saltId, offer.packMg, offer.label.toLowerCase()]);

function useRules(table: Table, chosen: ImportRules, currency: string): ReadingRules {
  const columns = chosen.columns ?? guessColumns(table.headers);
  if (Object.values(columns).some((column) => column >= table.headers.length)) {
    throw invalid({ columns: 'The table has no such column. Choose the columns again.' });
  }
  const cellsOf = (field: ImportField) => {
    const column = columns[field];
    return column === undefined ? [] : table.rows.map(({ cells }) => cells[column] ?? '');
  };
  const header = columns.pack === undefined ? '' : (table.headers[columns.pack] ?? '');
  return {
    columns,
    decimalMark:
      chosen.decimalMark ??
      findDecimalMark([...cellsOf('price'), ...cellsOf('pack'), ...cellsOf('taxRate')]),
    packUnit: chosen.packUnit ?? unitInHeader(header) ?? 'kg',
    currency,
  };
}

/** Reads every row of a table against the offers of now; nothing is written. */
export function planImport(table: Table, chosen: ImportRules, ground: ImportGround): ImportPreview {
  const rules = useRules(table, chosen, ground.currency);
  const existing = new Map(
    ground.offers.filter(({ archivedAt }) => archivedAt === null).map((one) => [keyOf(one), one]),
  );
  const salts = ground.salts.filter((salt) => salt.archivedAt === null && !salt.hidden);
  const names = new Map(salts.map(({ id, name }) => [id, name]));
  const firstLine = new Map<string, number>();

  const rows = table.rows.map(({ line, cells }): ImportRow => {
    const { offer: read, errors: problems } = readOfferRow(cells, rules, salts);
    const errors: ImportRow['errors'] = { ...problems };
    if (cells.length > table.headers.length) {
      errors.row = `This row has ${cells.length} cells, the header ${table.headers.length}: a mark inside a number or text parts it?`;
    }
    const shown = Object.fromEntries(
      importFields.flatMap((field) => {
        const column = rules.columns[field];
        return column === undefined ? [] : [[field, (cells[column] ?? '').slice(0, 200)]];
      }),
    );
    const base = {
      line,
      cells: shown,
      errors,
      saltName: read.saltId === undefined ? null : (names.get(read.saltId) ?? null),
    };
    const bad: ImportRow = { ...base, kind: 'bad', offer: null, offerId: null, beforeMinor: null };
    if (read.saltId === undefined || read.packMg === undefined) return bad;
    const key = keyOf({ saltId: read.saltId, packMg: read.packMg, label: read.label ?? '' });
    const twin = firstLine.get(key);
    if (twin !== undefined) errors.row = `The same pack as in line ${twin}. Keep one of them.`;
    else firstLine.set(key, line);
    if (Object.keys(errors).length > 0 || read.priceMinor === undefined) return bad;

    const now = existing.get(key);
    const offer = OfferBody.parse({
      label: '',
      priceIncludesTax: chosen.priceIncludesTax,
      taxRatePpm: chosen.taxRatePpm,
      stockPacks: null,
      multipleOf: 1,
      link: '',
      ...(now ? offerFields(now) : {}),
      ...read,
    });
    if (!now) return { ...base, kind: 'new', offer, offerId: null, beforeMinor: null };
    const before = offerFields(now);
    const same = (Object.keys(offer) as (keyof OfferBody)[]).every(
      (field) => field === 'label' || offer[field] === before[field],
    );
    return {
      ...base,
      kind: same ? 'same' : 'change',
      offer: { ...offer, label: before.label },
      offerId: now.id,
      beforeMinor: now.priceMinor,
    };
  });

  const count = (kind: ImportRow['kind']) => rows.filter((row) => row.kind === kind).length;
  return {
    headers: table.headers,
    delimiter: table.delimiter,
    rules: {
      columns: rules.columns,
      decimalMark: rules.decimalMark,
      packUnit: rules.packUnit,
      priceIncludesTax: chosen.priceIncludesTax,
      taxRatePpm: chosen.taxRatePpm,
    },
    missing: neededFields.filter((field) => rules.columns[field] === undefined),
    rows,
    counts: { new: count('new'), change: count('change'), same: count('same'), bad: count('bad') },
    seen: stateOfOffers(ground.offers),
  };
}
