import { describe, expect, it } from 'vitest';
import { catalogue } from '#shared/domain/salts/data/catalogue.ts';
import { guessColumns, unitInHeader } from '#shared/domain/salts/import/columns.ts';
import { findSaltsByText } from '#shared/domain/salts/import/findSaltByText.ts';
import { findDecimalMark, readNumber } from '#shared/domain/salts/import/numbers.ts';
import { readOfferRow, type ReadingRules } from '#shared/domain/salts/import/readOfferRow.ts';

const salts = catalogue.map((salt) => ({
  id: salt.id,
  name: salt.name,
  otherNames: salt.commonNames,
  formula: salt.formula,
  cas: salt.cas.value,
}));

describe('guessColumns', () => {
  it.each([
    [
      [
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
      ],
      {
        salt: 0,
        pack: 2,
        price: 3,
        includesTax: 4,
        taxRate: 5,
        stock: 6,
        multiple: 7,
        label: 8,
        link: 9,
      },
    ],
    [['Artikel', 'Gebinde', 'Preis (EUR)', 'MwSt'], { salt: 0, pack: 1, price: 2, taxRate: 3 }],
    [['Product name', 'Size kg', 'Price incl. VAT'], { salt: 0, pack: 1, price: 2 }],
    [['Nr', 'Foo'], {}],
  ])('%j', (headers, expected) => {
    expect(guessColumns(headers)).toEqual(expected);
  });

  it.each([
    ['Size (kg)', 'kg'],
    ['Pack g', 'g'],
    ['Packaging', null],
  ])('%s names %s', (header, unit) => {
    expect(unitInHeader(header)).toBe(unit);
  });
});

describe('numbers of a table', () => {
  it.each([
    [['84,00', '1.200,50'], 'comma'],
    [['84.00', '1,200.50'], 'point'],
    [['84', '100'], null],
    [['1.200'], null],
    [['1.200.000'], 'comma'],
    [['84,00', '12.5'], null],
    [['25 kg', '0,5 kg'], 'comma'],
  ])('%j has the mark %s', (texts, mark) => {
    expect(findDecimalMark(texts)).toBe(mark);
  });

  it.each([
    ['1.200', 'comma', { digits: 1200n, places: 0 }],
    ['1.200', 'point', { digits: 1200n, places: 3 }],
    ['1,200', 'comma', { digits: 1200n, places: 3 }],
    ['84,00', 'comma', { digits: 8400n, places: 2 }],
  ] as const)('%s by %s', (text, mark, value) => {
    expect(readNumber(text, mark)).toEqual({ value });
  });

  it('leaves open what could be either', () => {
    expect(readNumber('1.200', null)).toEqual({ problem: 'ambiguous' });
    expect(readNumber('-5', null)).toEqual({ problem: 'negative' });
    expect(readNumber('x', null)).toEqual({ problem: 'unreadable' });
  });
});

describe('findSaltsByText', () => {
  it.each([
    ['KNO3', ['KNO3']],
    ['K NO₃', ['KNO3']],
    ['7757-79-1', ['KNO3']],
    ['potassium nitrate', ['KNO3']],
    ['Potassium Nitrate, prills 25kg', ['KNO3']],
    ['Epsom salt (MgSO4.7H2O)', ['MgSO4.7H2O']],
    ['MgSO4·7H2O', ['MgSO4.7H2O']],
    ['Ca(NO3)2*4H2O', ['Ca(NO3)2.4H2O']],
    ['MKP', ['KH2PO4']],
    ['CAS 10034-99-8', ['MgSO4.7H2O']],
    ['potash', ['K2CO3']],
    ['fine potash for soap', []],
    ['kno3', []],
    ['', []],
    ['sugar', []],
  ])('%j: %j', (text, ids) => {
    expect(findSaltsByText(text, salts).map(({ id }) => id)).toEqual(ids);
  });
});

describe('readOfferRow', () => {
  const rules: ReadingRules = {
    columns: {
      salt: 0,
      pack: 1,
      price: 2,
      includesTax: 3,
      taxRate: 4,
      stock: 5,
      multiple: 6,
      label: 7,
      link: 8,
    },
    decimalMark: 'comma',
    packUnit: 'kg',
    currency: 'EUR',
  };
  const read = (cells: string[], changed: Partial<ReadingRules> = {}) =>
    readOfferRow(cells, { ...rules, ...changed }, salts);

  it('reads a whole row', () => {
    expect(
      read([
        'KNO3',
        '25 kg',
        '84,00 €',
        'yes',
        '19 %',
        '12',
        '2',
        'Prills',
        'https://brook.example/kno3',
      ]),
    ).toEqual({
      errors: {},
      offer: {
        saltId: 'KNO3',
        packMg: 25_000_000,
        priceMinor: 8400,
        priceIncludesTax: true,
        taxRatePpm: 190_000,
        stockPacks: 12,
        multipleOf: 2,
        label: 'Prills',
        link: 'https://brook.example/kno3',
      },
    });
  });

  it('says everything that is wrong at once', () => {
    const { errors } = read([
      'sugar',
      'a sack',
      'EUR ?',
      'maybe',
      '0,19',
      '1,5',
      '0',
      'x'.repeat(81),
      'brook.example',
    ]);
    expect(Object.keys(errors).sort()).toEqual(
      [
        'includesTax',
        'label',
        'link',
        'multiple',
        'pack',
        'price',
        'salt',
        'stock',
        'taxRate',
      ].sort(),
    );
    expect(read([]).errors).toEqual({
      salt: 'The salt is missing.',
      pack: 'The pack size is missing.',
      price: 'The price is missing.',
    });
  });

  it.each([
    ['25', 'kg', 25_000_000],
    ['500', 'g', 500_000],
    ['0,5 kg', 'g', 500_000],
    ['500g', 'kg', 500_000],
    ['1.000 g', 'kg', 1_000_000],
    ['1 lb', 'kg', 453_592],
  ] as const)('a pack of %j with %s for bare numbers', (text, packUnit, packMg) => {
    expect(read(['KNO3', text, '1'], { packUnit }).offer.packMg).toBe(packMg);
  });

  it.each([
    ['1.200', 'comma', 120_000],
    ['1,200', 'comma', 120],
    ['1.200', null, 'can mean two numbers'],
    ['-5', 'comma', 'isn’t negative'],
    ['12,345', 'comma', 'Finer than EUR goes.'],
    ['84,00 USD', 'comma', 'Prices are in EUR'],
  ] as const)('a price of %j by %s', (text, decimalMark, expected) => {
    const { offer, errors } = read(['KNO3', '1', text], { decimalMark });
    if (typeof expected === 'number') expect(offer.priceMinor).toBe(expected);
    else expect(errors.price).toContain(expected);
  });

  it('takes the guard off text that a spreadsheet would take for a formula', () => {
    expect(read(['KNO3', '1', '1', '', '', '', '', "'=SUM(A1)"]).offer.label).toBe('=SUM(A1)');
  });

  it('leaves fields without a column untouched, and an empty stock means no limit', () => {
    expect(read(['KNO3', '1', '1'], { columns: { salt: 0, pack: 1, price: 2 } }).offer).toEqual({
      saltId: 'KNO3',
      packMg: 1_000_000,
      priceMinor: 100,
    });
    expect(read(['KNO3', '1', '1', '', '', '']).offer).toMatchObject({ stockPacks: null });
  });
});
