import type { MySheet, SheetReply } from '#shared/schemas/sheet.ts';

const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;

/** Ids that a test names: two lines, three members (the first is the reader), one offer a line. */
export const ids = {
  buy: id(1),
  club: id(2),
  potash: id(10),
  epsom: id(11),
  me: id(20),
  noor: id(21),
  ravi: id(22),
  supplier: id(30),
  sack: id(31),
  bag: id(32),
};

const salt = (name: string, classified = false): SheetReply['terms']['lines'][number]['salt'] => ({
  name,
  formula: classified ? 'KNO3' : 'MgSO4·7H2O',
  classified,
  reportable: classified,
  signalWord: classified ? 'Warning' : null,
  hazards: classified ? ['May intensify fire; oxidiser.'] : [],
  pictograms: classified ? ['GHS03'] : [],
  cautions: classified
    ? [{ code: 'feeds_fire', tone: 'amber', text: 'It makes a fire burn harder. Keep it cool.' }]
    : [],
  storage: '',
  note: '',
});

const line = (lineId: string, name: string, classified: boolean) => ({
  id: lineId,
  saltId: name,
  salt: salt(name, classified),
  stepMg: 1000,
  reservePermyriad: 50,
  surplus: 'shelf' as const,
  shortage: 'scale' as const,
  note: '',
  totalsOnly: false,
});

const offer = (offerId: string, lineId: string, packMg: number, priceMinor: number) => ({
  id: offerId,
  lineId,
  supplierId: ids.supplier,
  label: '',
  packMg,
  priceMinor,
  priceIncludesTax: true,
  taxRatePpm: 0,
  maxPacks: null,
  multipleOf: 1,
});

/** A sheet of two lines and three members at version 7: potassium nitrate (classified) and Epsom salt. */
export function sheetReply(more: Partial<SheetReply> = {}): SheetReply {
  return {
    sheetVersion: 7,
    reader: 'full',
    terms: {
      buyId: ids.buy,
      clubId: ids.club,
      currency: 'EUR',
      termsVersion: 3,
      state: 'open',
      closesAt: new Date(Date.now() + 3 * 86_400_000).toISOString(),
      frozenUntil: null,
      loweringFreezeHours: 24,
      minimum: { kind: 'none', amount: 0 },
      leftOverPayer: 'members',
      shelfLimitMinor: 0,
      spreadMaxPermille: 100,
      lines: [line(ids.potash, 'Potassium nitrate', true), line(ids.epsom, 'Epsom salt', false)],
      offers: [
        offer(ids.sack, ids.potash, 25_000_000, 9500),
        offer(ids.bag, ids.epsom, 5_000_000, 1450),
      ],
      suppliers: [
        {
          id: ids.supplier,
          name: 'Salt mill',
          isShelf: false,
          shipping: { kind: 'flat', minor: 1000 },
          freeShippingFromMinor: null,
          minimumOrderMinor: null,
        },
      ],
      charges: [],
    },
    members: [
      { membershipId: ids.me, name: 'Imke', guest: false, pledges: [[1, 400_000, null, 1, 1000]] },
      {
        membershipId: ids.noor,
        name: 'Noor Valdane',
        guest: false,
        pledges: [
          [0, 600_000, 900_000, 2, 2000],
          [1, 500_000, null, 1, 3000],
        ],
      },
      {
        membershipId: ids.ravi,
        name: 'Ravi',
        guest: true,
        pledges: [[0, 1_000_000, null, 1, 500]],
      },
    ],
    totals: [],
    plan: null,
    planOverride: null,
    organisers: [{ membershipId: ids.noor, name: 'Noor Valdane' }],
    ...more,
  };
}

/** The reader's own part that goes with `sheetReply`. */
export function mySheet(more: Partial<MySheet> = {}): MySheet {
  return {
    sheetVersion: 7,
    membershipId: ids.me,
    pledges: [],
    confirmed: [],
    overdueIn: null,
    share: null,
    proposals: [],
    people: [],
    may: {
      pledge: true,
      pledgeForOthers: false,
      planPacks: false,
      lock: false,
      reopen: false,
      extend: false,
    },
    now: new Date().toISOString(),
    ...more,
  };
}
