import { fireEvent, render, screen, within } from '@testing-library/vue';
import { describe, expect, it } from 'vitest';
import type { ImportPreview } from '#shared/schemas/offerImport.ts';
import ImportRows from 'src/components/suppliers/ImportRows.vue';

const offer = {
  saltId: 'KNO3',
  label: '',
  packMg: 25_000_000,
  priceMinor: 9100,
  priceIncludesTax: true,
  taxRatePpm: 0,
  stockPacks: null,
  multipleOf: 1,
  link: '',
};
const preview: ImportPreview = {
  headers: ['Salt', 'Pack', 'Price'],
  delimiter: ';',
  rules: {
    columns: { salt: 0, pack: 1, price: 2 },
    decimalMark: 'comma',
    packUnit: 'kg',
    priceIncludesTax: true,
    taxRatePpm: 0,
  },
  missing: [],
  rows: [
    {
      line: 2,
      kind: 'change',
      cells: { salt: 'KNO3', pack: '25', price: '91,00' },
      errors: {},
      saltName: 'Potassium nitrate',
      offer,
      offerId: null,
      beforeMinor: 8400,
    },
    {
      line: 3,
      kind: 'bad',
      cells: { salt: 'sugar', pack: '25', price: 'x' },
      errors: { salt: '“sugar” is no salt.', price: 'This is no price.' },
      saltName: null,
      offer: null,
      offerId: null,
      beforeMinor: null,
    },
    {
      line: 4,
      kind: 'bad',
      cells: { salt: 'KNO3', pack: '25', price: '80' },
      errors: { row: 'The same pack as in line 2.' },
      saltName: 'Potassium nitrate',
      offer: null,
      offerId: null,
      beforeMinor: null,
    },
  ],
  counts: { new: 0, change: 1, same: 0, bad: 2 },
  seen: '',
};

const rowOf = (line: number) => {
  const row = screen.getByRole('rowheader', { name: String(line) }).closest('tr');
  if (!row) throw new Error('no row');
  return within(row);
};

describe('the rows of an import', () => {
  it('says in each what it becomes, what it was read as, and every mistake at its field', () => {
    render(ImportRows, { props: { preview } });
    expect(rowOf(2).getByText('Changes')).toBeTruthy();
    expect(rowOf(2).getByText('Potassium nitrate')).toBeTruthy();
    expect(rowOf(2).getByText(/84\.00.*→.*91\.00/)).toBeTruthy();
    expect(rowOf(3).getByText('“sugar” is no salt.').closest('td')?.dataset.label).toBe('Salt');
    expect(rowOf(3).getByText('This is no price.').closest('td')?.dataset.label).toBe('Price');
    expect(rowOf(4).getByText('The same pack as in line 2.')).toBeTruthy();
  });

  it('narrows to the mistakes', async () => {
    render(ImportRows, { props: { preview } });
    await fireEvent.click(screen.getByRole('combobox', { name: 'Show' }));
    await fireEvent.click(await screen.findByText('Mistake 2'));
    expect(screen.queryByRole('rowheader', { name: '2' })).toBeNull();
    expect(screen.getByRole('rowheader', { name: '3' })).toBeTruthy();
  });
});
