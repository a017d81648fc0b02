import { describe, expect, it } from 'vitest';
import { SupplierBody, type Offer, type Supplier } from '#shared/schemas/suppliers.ts';
import {
  bodyOfOfferForm,
  errorsOfOfferForm,
  makeOfferForm,
  pricePerGram,
} from 'src/components/suppliers/offerForm.ts';
import { saveLabel } from 'src/components/suppliers/importFields.ts';
import { shippingEnd, shippingLine, shippingRows } from 'src/components/suppliers/shippingWords.ts';
import {
  bodyOfSupplierForm,
  errorsOfSupplierForm,
  makeSupplierForm,
  withScheme,
} from 'src/components/suppliers/supplierForm.ts';

const supplier: Supplier = {
  id: '8c9c3f0e-6c0e-4b7f-9a43-1f3a7f0f8d11',
  name: 'Brook & Stone',
  contact: '',
  email: '',
  website: '',
  note: '',
  shipping: {
    kind: 'byMass',
    steps: [
      { upTo: 5_000_000, minor: 690 },
      { upTo: null, minor: 1290 },
    ],
  },
  freeShippingFromMinor: 20_000,
  minimumOrderMinor: null,
  isShelf: false,
  archivedAt: null,
  version: 3,
  offers: 2,
};
const words = {
  money: (minor: number) => `€${(minor / 100).toFixed(2)}`,
  pack: (mg: number) => `${mg / 1e6} kg`,
};

describe('a supplier’s form', () => {
  it('sends back what it was filled in from', () => {
    const form = makeSupplierForm(supplier);
    expect(errorsOfSupplierForm(form)).toEqual({});
    const body = bodyOfSupplierForm(form);
    expect(SupplierBody.parse(body)).toEqual(body);
    expect(supplier).toMatchObject(body);
  });

  it('says what is missing by the paths that the server uses', () => {
    const form = makeSupplierForm(null);
    expect(errorsOfSupplierForm(form)).toEqual({ name: 'Write a name.' });
    form.name = 'New';
    form.shipping.minor = null;
    expect(Object.keys(errorsOfSupplierForm(form))).toEqual(['shipping.minor']);
    form.shipping.kind = 'byValue';
    form.shipping.steps = [
      { upTo: 500, minor: 1, endless: false },
      { upTo: 500, minor: null, endless: false },
      { upTo: null, minor: 3, endless: true },
    ];
    expect(Object.keys(errorsOfSupplierForm(form))).toEqual([
      'shipping.steps.1.minor',
      'shipping.steps.1.upTo',
    ]);
  });

  it('sends only what the server takes', () => {
    const form = makeSupplierForm(null);
    Object.assign(form, { name: 'New', website: 'brook.example' });
    form.shipping.kind = 'byMass';
    form.shipping.steps = [{ upTo: 1_000_000, minor: 500, endless: false }];
    expect(errorsOfSupplierForm(form)).toEqual({});
    expect(SupplierBody.parse(bodyOfSupplierForm(form))).toMatchObject({
      website: 'https://brook.example',
      shipping: { kind: 'byMass', steps: [{ upTo: 1_000_000, minor: 500 }] },
    });
  });

  it.each([
    ['brook.example', 'https://brook.example'],
    ['http://x.example', 'http://x.example'],
    ['', ''],
    ['javascript:x', 'javascript:x'],
  ])('writes %j as %j', (text, link) => expect(withScheme(text)).toBe(link));
});

describe('shipping in words', () => {
  it('says each step, what lies above and where it ends', () => {
    expect(shippingRows(supplier.shipping, words)).toEqual([
      { reach: 'up to 5 kg', minor: 690 },
      { reach: 'above 5 kg', minor: 1290 },
    ]);
    expect(shippingEnd(supplier.shipping, words)).toBeNull();
    expect(shippingEnd({ kind: 'byMass', steps: [{ upTo: 2_000_000, minor: 1 }] }, words)).toBe(
      'Nothing above 2 kg is delivered.',
    );
    expect(shippingLine(supplier.shipping, 20_000, words)).toBe(
      'from €6.90 by weight, free from €200.00',
    );
    expect(shippingLine({ kind: 'flat', minor: 0 }, null, words)).toBe('free');
  });
});

describe('an offer’s form', () => {
  const offer: Offer = {
    id: '8c9c3f0e-6c0e-4b7f-9a43-1f3a7f0f8d12',
    supplierId: supplier.id,
    saltId: 'KNO3',
    label: '',
    packMg: 25_000_000,
    priceMinor: 7059,
    priceIncludesTax: false,
    taxRatePpm: 190_000,
    stockPacks: 3,
    multipleOf: 2,
    link: '',
    openBuys: 0,
    archivedAt: null,
    updatedAt: '2026-01-01T00:00:00.000Z',
    version: 1,
  };

  it('starts a new one with the tax of the last, and nothing else', () => {
    expect(makeOfferForm(null, offer)).toMatchObject({
      saltId: '',
      packMg: null,
      priceIncludesTax: false,
      taxRatePpm: 190_000,
      stockPacks: null,
    });
    expect(Object.keys(errorsOfOfferForm(makeOfferForm(null)))).toEqual([
      'saltId',
      'packMg',
      'priceMinor',
    ]);
    expect(bodyOfOfferForm(makeOfferForm(offer))).toMatchObject({
      priceMinor: 7059,
      multipleOf: 2,
    });
  });

  it('prices a gram with tax', () => {
    // 8400 minor units for 25 000 g
    expect(pricePerGram(offer)).toBeCloseTo(0.336, 6);
    expect(pricePerGram({ ...offer, priceMinor: null })).toBeNull();
    expect(pricePerGram({ ...offer, packMg: 0 })).toBeNull();
  });
});

describe('the button of an import', () => {
  it.each([
    [{ new: 1, change: 0 }, 'Save 1 new offer'],
    [{ new: 3, change: 0 }, 'Save 3 new offers'],
    [{ new: 0, change: 1 }, 'Save 1 changed offer'],
    [{ new: 2, change: 5 }, 'Save 2 new and 5 changed offers'],
  ])('%j: %s', (counts, label) => expect(saveLabel(counts)).toBe(label));
});
