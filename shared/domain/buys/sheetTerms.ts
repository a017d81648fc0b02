import type { Caution } from '../salts/cautions.ts';
import type { Shipping } from '../packs/packTypes.ts';
import type { ChargeBasis } from '../shares/shareTypes.ts';
import type { BuyState } from './states.ts';

/** A salt as a buy's line shows it; hazards are in words, the codes' order kept. */
export type LineSalt = {
  name: string;
  /** Null for a trace mix. */
  formula: string | null;
  /** Needs a confirmation before the first pledge. */
  classified: boolean;
  /** On a list of explosives precursors: who received how much is recorded. */
  reportable: boolean;
  signalWord: 'Danger' | 'Warning' | null;
  hazards: string[];
  /** GHS codes such as GHS03. */
  pictograms: string[];
  /** One sentence of what can happen and one of what to do, the gravest first. */
  cautions: Caution[];
  storage: string;
  note: string;
};

/** One salt of a buy with its policies. */
export type SheetLine = {
  id: string;
  saltId: string;
  salt: LineSalt;
  stepMg: number;
  /** Hundredths of a per cent. */
  reservePermyriad: number;
  surplus: 'spread' | 'shelf';
  shortage: 'scale' | 'queue';
  note: string;
  /** Others' grams on it are shown only as a total to most members. */
  totalsOnly: boolean;
};

/** A pack that may be ordered for a line. */
export type SheetOffer = {
  id: string;
  lineId: string;
  supplierId: string;
  label: string;
  packMg: number;
  priceMinor: number;
  priceIncludesTax: boolean;
  taxRatePpm: number;
  maxPacks: number | null;
  multipleOf: number;
};

/** A supplier's terms; `isShelf`: the club's own stock. */
export type SheetSupplier = {
  id: string;
  name: string;
  isShelf: boolean;
  shipping: Shipping;
  freeShippingFromMinor: number | null;
  minimumOrderMinor: number | null;
};

/** A cost the organiser added; by `supplierId` it belongs to that supplier's lines, by `lineIds` to those. */
export type SheetCharge = {
  id: string;
  kind: 'freight' | 'duty' | 'bags' | 'rebate' | 'other';
  name: string;
  amountMinor: number;
  basis: ChargeBasis;
  supplierId: string | null;
  lineIds: string[] | null;
  taxRatePpm: number;
};

/** What a buy's sums depend on, besides its pledges. From the lock on it is what stood at the lock. */
export type SheetTerms = {
  buyId: string;
  clubId: string;
  currency: string;
  termsVersion: number;
  state: BuyState;
  closesAt: string | null;
  frozenUntil: string | null;
  loweringFreezeHours: number;
  minimum: { kind: 'none' | 'mass' | 'value' | 'members'; amount: number };
  leftOverPayer: 'members' | 'shelf';
  shelfLimitMinor: number;
  spreadMaxPermille: number;
  lines: SheetLine[];
  offers: SheetOffer[];
  suppliers: SheetSupplier[];
  charges: SheetCharge[];
};

/** A living pledge; `at` decides who comes first. */
export type SheetPledge = {
  membershipId: string;
  lineId: string;
  wantedMg: number;
  upToMg: number | null;
  version: number;
  at: string;
};
