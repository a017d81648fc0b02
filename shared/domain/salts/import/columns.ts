/** What a column of a supplier's table can mean. */
export const importFields = [
  'salt',
  'pack',
  'price',
  'includesTax',
  'taxRate',
  'stock',
  'multiple',
  'label',
  'link',
] as const;
export type ImportField = (typeof importFields)[number];

/** Fields without which no offer can be read. */
export const neededFields = ['salt', 'pack', 'price'] as const satisfies readonly ImportField[];

/** Which column, from 0, holds a field; fields that are absent have none. */
export type ColumnMap = Partial<Record<ImportField, number>>;

/** Words of headers as suppliers write them, the more telling first. */
const words: Record<ImportField, readonly string[]> = {
  price: ['price', 'preis', 'prix', 'cost', 'amount', 'betrag'],
  includesTax: ['incl', 'included', 'inclusive', 'gross', 'brutto'],
  taxRate: ['tax', 'vat', 'mwst', 'ust', 'tva', 'gst'],
  pack: [
    'pack',
    'package',
    'size',
    'bag',
    'gebinde',
    'packung',
    'inhalt',
    'weight',
    'mass',
    'gewicht',
    'poids',
    'kg',
    'g',
  ],
  stock: ['stock', 'available', 'bestand', 'lager', 'verfügbar'],
  multiple: ['multiple', 'multiples', 'vielfaches', 'unit'],
  label: ['label', 'grade', 'quality', 'variant', 'sorte', 'qualität', 'note', 'remark'],
  link: ['link', 'url', 'web', 'page'],
  salt: [
    'salt',
    'salz',
    'sel',
    'substance',
    'stoff',
    'chemical',
    'product',
    'produkt',
    'produit',
    'article',
    'artikel',
    'item',
    'formula',
    'cas',
    'name',
    'bezeichnung',
  ],
};

const order = Object.keys(words) as ImportField[];

const wordsIn = (header: string) =>
  header
    .toLowerCase()
    .split(/[^\p{L}\p{N}]+/u)
    .filter((word) => word !== '');

function score(field: ImportField, header: string): number {
  const inHeader = wordsIn(header);
  const place = words[field].findIndex((word) => inHeader.includes(word));
  if (place < 0) return 0;
  return (inHeader.length === 1 ? 200 : 100) - place;
}

/**
 * Which columns a table's headers seem to hold, each column at most once; a person corrects it.
 *
 * @example guessColumns(['Article', 'Size (kg)', 'Price incl. VAT']) // { salt: 0, pack: 1, price: 2 }
 */
export function guessColumns(headers: readonly string[]): ColumnMap {
  const map: ColumnMap = {};
  const used = new Set<number>();
  for (const field of order) {
    const scores = headers.map((header, index) => (used.has(index) ? 0 : score(field, header)));
    const best = Math.max(0, ...scores);
    if (best === 0) continue;
    const column = scores.indexOf(best);
    map[field] = column;
    used.add(column);
  }
  return map;
}

/** The unit that a header names for bare pack sizes, or null. */
export function unitInHeader(header: string): 'g' | 'kg' | null {
  const found = wordsIn(header);
  if (found.includes('kg') || found.includes('kilo') || found.includes('kilograms')) return 'kg';
  return found.includes('g') || found.includes('grams') ? 'g' : null;
}
