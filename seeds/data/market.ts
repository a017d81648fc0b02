import type { OfferBody, SupplierBody } from '#shared/schemas/suppliers.ts';

const kg = 1_000_000;

/** A supplier of the demo with what it sells; names, places and prices are invented. */
export interface DemoSupplier {
  readonly key: string;
  readonly supplier: SupplierBody;
  readonly offers: readonly (Pick<OfferBody, 'saltId' | 'packMg' | 'priceMinor'> &
    Partial<OfferBody>)[];
}

const nothingMore = { website: '', freeShippingFromMinor: null, minimumOrderMinor: null };

export const quillmereMarket: readonly DemoSupplier[] = [
  {
    key: 'grainmoor',
    supplier: {
      ...nothingMore,
      name: 'Grainmoor Salts',
      contact: 'Yard 4, Grainmoor. Ask for Hettie.',
      email: 'orders@grainmoor.example',
      note: 'Bulk bags; delivers on Tuesdays.',
      shipping: {
        kind: 'byMass',
        steps: [
          { upTo: 10 * kg, minor: 790 },
          { upTo: 31 * kg, minor: 1390 },
          { upTo: 62 * kg, minor: 2250 },
          { upTo: null, minor: 3600 },
        ],
      },
      freeShippingFromMinor: 40_000,
    },
    offers: [
      { saltId: 'KNO3', packMg: 25 * kg, priceMinor: 8250 },
      { saltId: 'KNO3', packMg: 5 * kg, priceMinor: 2390 },
      { saltId: 'KNO3', packMg: kg, priceMinor: 690 },
      { saltId: 'K2SO4', packMg: 25 * kg, priceMinor: 7100 },
      { saltId: 'K2SO4', packMg: 5 * kg, priceMinor: 1980 },
      { saltId: 'MgSO4.7H2O', packMg: 25 * kg, priceMinor: 3650 },
      { saltId: 'MgSO4.7H2O', packMg: 5 * kg, priceMinor: 1040 },
      { saltId: 'MgSO4.7H2O', packMg: kg, priceMinor: 340 },
    ],
  },
  {
    key: 'tidewell',
    supplier: {
      ...nothingMore,
      name: 'Tidewell Supply',
      contact: 'Counter open Fridays.',
      email: 'desk@tidewell.example',
      note: '',
      shipping: { kind: 'flat', minor: 690 },
      minimumOrderMinor: 1500,
    },
    offers: [
      { saltId: 'KH2PO4', packMg: kg, priceMinor: 880 },
      { saltId: 'KH2PO4', packMg: kg / 4, priceMinor: 310 },
      { saltId: 'K2SO4', packMg: 5 * kg, priceMinor: 1890 },
      { saltId: 'K2SO4', packMg: kg, priceMinor: 560 },
      { saltId: 'KNO3', packMg: 10 * kg, priceMinor: 4450, stockPacks: 6 },
    ],
  },
  {
    key: 'hollin',
    supplier: {
      ...nothingMore,
      name: 'Hollin Fine Chemicals',
      contact: '',
      email: 'hello@hollin.example',
      note: 'Trace mixes; prices are net of tax.',
      shipping: {
        kind: 'byValue',
        steps: [
          { upTo: 3000, minor: 550 },
          { upTo: 8000, minor: 350 },
          { upTo: null, minor: 0 },
        ],
      },
    },
    offers: [
      {
        saltId: 'trace',
        packMg: kg / 2,
        priceMinor: 1420,
        priceIncludesTax: false,
        label: 'Trace mix, 500 g jar',
      },
      { saltId: 'FeDTPA', packMg: kg / 2, priceMinor: 1150, priceIncludesTax: false },
    ],
  },
];

export const sedgeholmMarket: readonly DemoSupplier[] = [
  {
    key: 'marram',
    supplier: {
      ...nothingMore,
      name: 'Marram Garden Stores',
      contact: '',
      email: 'trade@marram.example',
      note: '',
      shipping: { kind: 'flat', minor: 495 },
    },
    offers: [
      { saltId: 'MgSO4.7H2O', packMg: 5 * kg, priceMinor: 980 },
      { saltId: 'KHCO3', packMg: kg, priceMinor: 620 },
    ],
  },
];
