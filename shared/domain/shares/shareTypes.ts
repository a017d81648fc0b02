/** One salt to be divided: what there is of it, what it costs, and the buy's policies for it. */
export type ShareLine = {
  id: string;
  availableMg: number;
  costMinor: number;
  /** 0.19 means that the cost contains 19 % tax. */
  taxRate?: number;
  stepMg: number;
  reserveMg?: number;
  surplus: 'spread' | 'shelf';
  spreadMaxPermille?: number;
  shortage: 'scale' | 'queue';
  /** Whether the club pays for what it keeps; absent means yes. */
  shelfPays?: boolean;
};

/** What one member asked for on one line; `at` is an instant, UTC with milliseconds. */
export type SharePledge = {
  memberId: string;
  lineId: string;
  wantedMg: number;
  upToMg?: number;
  at: string;
};

/** How a charge is divided. */
export type ChargeBasis = 'mass' | 'value' | 'member' | 'portion';

/** A cost or rebate that several lines share; without `lineIds` it belongs to all. */
export type ShareCharge = {
  id: string;
  amountMinor: number;
  basis: ChargeBasis;
  lineIds?: string[];
  taxRate?: number;
};

/** Everything `shareOut` needs; the order of its arrays doesn't matter. */
export type ShareRequest = {
  currency: string;
  lines: ShareLine[];
  pledges: SharePledge[];
  charges: ShareCharge[];
};

/** What somebody gets of a line and pays for it; the tax is contained in the cost. */
export type LineShare = { lineId: string; mg: number; costMinor: number; taxMinor: number };

/** Somebody's part of a charge; the tax is contained in it. */
export type ChargeShare = { id: string; minor: number; taxMinor: number };

/** One step of the arithmetic, for screens in any language. */
export type ShareStep = { code: string; values: Record<string, number | string> };

/** A member's part: lines they pledged on and all charges, by id, zeros included. */
export type MemberShare = {
  memberId: string;
  lines: LineShare[];
  charges: ChargeShare[];
  totalMinor: number;
  steps: ShareStep[];
  /** The same steps in plain English, one for one. */
  why: string[];
};

/** What the club itself keeps and pays: all lines and all charges, by id. */
export type ShelfShare = { lines: LineShare[]; charges: ChargeShare[]; totalMinor: number };

/** Who gets and pays what; all line costs and charges are the members' totals plus the shelf's. */
export type ShareSheet = { members: MemberShare[]; shelf: ShelfShare; totalMinor: number };
