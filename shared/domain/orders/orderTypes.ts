import type { ChargeBasis } from '../shares/shareTypes.ts';

/** Where an order with one supplier stands; `draft` until it is placed. */
export const orderStates = ['draft', 'placed', 'confirmed', 'arrived', 'short', 'failed'] as const;
export type OrderState = (typeof orderStates)[number];

/** Packs of one offer in an order, at the price that was last quoted, tax included. */
export interface OrderPack {
  readonly offerId: string;
  readonly lineId: string;
  readonly packs: number;
  readonly packMg: number;
  readonly priceMinor: number;
}

/** What the sums need of an order. */
export interface OrderFacts {
  readonly supplierId: string;
  /** The club's own shelf: nothing is billed, its price is the cost. */
  readonly isShelf: boolean;
  readonly state: OrderState;
  readonly packs: readonly OrderPack[];
  readonly shippingMinor: number;
  readonly shippingBasis: ChargeBasis;
}

/** Kinds of costs a bill may carry besides goods. */
export const billChargeKinds = ['freight', 'duty', 'bags', 'rebate', 'other'] as const;
export type BillChargeKind = (typeof billChargeKinds)[number];

export interface BillGoods {
  readonly offerId: string;
  readonly lineId: string;
  readonly packs: number;
  /** For all of these packs, tax included. */
  readonly amountMinor: number;
  readonly taxRatePpm: number;
}

export interface BillCharge {
  readonly kind: BillChargeKind;
  readonly name: string;
  readonly amountMinor: number;
  readonly taxRatePpm: number;
  readonly basis: ChargeBasis;
  /** Lines it belongs to when no supplier says so; null: all. */
  readonly lineIds: readonly string[] | null;
  /** The buy's planned charge that it makes real. */
  readonly chargeId: string | null;
}

/** A bill that counts: entered and not voided. `supplierId` null: a cost outside the suppliers' orders. */
export interface BillFacts {
  readonly id: string;
  readonly supplierId: string | null;
  readonly goods: readonly BillGoods[];
  readonly charges: readonly BillCharge[];
  readonly taxMinor: number;
}

/** Money a supplier gave back. */
export interface SupplierRefundFacts {
  readonly id: string;
  readonly supplierId: string;
  readonly amountMinor: number;
}

/** What the treasurer takes to the club's losses before the shares are final. */
export interface BuyLossFacts {
  readonly id: string;
  readonly supplierId: string | null;
  readonly amountMinor: number;
}

/** What packs cost together, in minor units. */
export function goodsOf(packs: readonly OrderPack[]): number {
  return packs.reduce((sum, pack) => sum + pack.packs * pack.priceMinor, 0);
}

/** States from which an order counts as placed. */
export function isPlaced(state: OrderState): boolean {
  return state !== 'draft' && state !== 'failed';
}

/** Whether nothing more is to come of the order. */
export function isIn(state: OrderState): boolean {
  return state === 'arrived' || state === 'short' || state === 'failed';
}

const moves: Record<OrderState, readonly OrderState[]> = {
  draft: ['placed', 'failed'],
  placed: ['confirmed', 'arrived', 'short', 'failed'],
  confirmed: ['arrived', 'short', 'failed'],
  arrived: ['short'],
  short: ['arrived'],
  failed: [],
};

/** The states that an order may take next. */
export function nextOrderStates(state: OrderState): readonly OrderState[] {
  return moves[state];
}
