import { stringify } from 'csv-stringify/sync';
import { minorToDecimal } from '#shared/domain/money/formatMoney.ts';
import type { ClubActor } from '../../actors.ts';
import { saltsByIds } from '../../salts/saltsOfClub.ts';
import { getSupplier, listOffers } from '../readSuppliers.ts';

const header = [
  'Salt',
  'CAS',
  'Pack',
  'Price',
  'Tax included',
  'Tax %',
  'Stock',
  'Multiple',
  'Label',
  'Link',
];

/** A table for spreadsheets: no cell is taken for a formula, lines end as RFC 4180 says. */
function toCsv(rows: readonly (readonly string[])[]): string {
  return stringify([header, ...rows], {
    escape_formulas: true,
    record_delimiter: 'windows',
    bom: true,
  });
}

/** An empty table with two rows as examples, which import reads. */
export function importTemplate(): string {
  return toCsv([
    ['KNO3', '7757-79-1', '25 kg', '84.00', 'yes', '19', '', '1', '', ''],
    [
      'MgSO4.7H2O',
      '10034-99-8',
      '5 kg',
      '12.50',
      'no',
      '19',
      '40',
      '2',
      'coarse',
      'https://supplier.example/epsom',
    ],
  ]);
}

/** "25 kg" or "0.25 g": exact, with a point, as import reads it. */
function packText(mg: number): string {
  const exact = (places: number) => {
    const digits = String(mg).padStart(places + 1, '0');
    return `${digits.slice(0, -places)}.${digits.slice(-places)}`.replace(/\.?0+$/, '');
  };
  return mg >= 1_000_000 ? `${exact(6)} kg` : `${exact(3)} g`;
}

/**
 * A supplier's offers as CSV, in the shape that import takes.
 * @throws DomainProblem 404
 */
export async function exportOffers(
  actor: ClubActor,
  supplierId: string,
): Promise<{ fileName: string; csv: string }> {
  const supplier = await getSupplier(actor.club.id, supplierId);
  const offers = (await listOffers(actor.club.id, supplierId)).filter((one) => !one.archivedAt);
  const salts = await saltsByIds(actor.club.id, [...new Set(offers.map((one) => one.saltId))]);
  const rows = offers.map((offer) => {
    const salt = salts.get(offer.saltId);
    return [
      salt?.formula ?? salt?.name ?? offer.saltId,
      salt?.cas ?? '',
      packText(offer.packMg),
      minorToDecimal(offer.priceMinor, actor.club.currency),
      offer.priceIncludesTax ? 'yes' : 'no',
      String(offer.taxRatePpm / 10_000),
      offer.stockPacks === null ? '' : String(offer.stockPacks),
      String(offer.multipleOf),
      offer.label,
      offer.link,
    ];
  });
  return { fileName: `${supplier.name} offers.csv`, csv: toCsv(rows) };
}
