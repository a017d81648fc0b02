import type { SheetPledge, SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import type { OrderPack, OrderState } from '#shared/domain/orders/orderTypes.ts';
import type { PackPlan } from '#shared/domain/packs/packTypes.ts';
import type { ShareSheet } from '#shared/domain/shares/shareTypes.ts';

/** One supplier's order; without a row yet (`version` 0) it is what the plan says, at the locked prices. */
export interface BookOrder {
  readonly id: string | null;
  readonly supplierId: string;
  readonly state: OrderState;
  readonly version: number;
  readonly packs: readonly OrderPack[];
  readonly shippingMinor: number;
  readonly quotedAt: Date | null;
  readonly reference: string;
  readonly note: string;
  readonly placedOn: string | null;
  readonly placedBy: string | null;
}

/** What a member has to do with a locked buy, by membership id. */
export interface BookMember {
  readonly id: string;
  readonly name: string;
  readonly guest: boolean;
  readonly lockedMinor: number;
  readonly dueMinor: number;
  readonly finalMinor: number | null;
  readonly dropped: boolean;
  readonly vouchedBy: string | null;
  readonly vouchedReason: string | null;
  readonly overLimitMinor: number | null;
  readonly agreed: boolean;
  readonly remindedAt: Date | null;
}

/** A locked buy's newest estimate, its orders and its members. */
export interface OrderBook {
  readonly terms: SheetTerms;
  readonly pledges: readonly SheetPledge[];
  readonly plan: PackPlan;
  readonly sheet: ShareSheet;
  readonly orders: readonly BookOrder[];
  readonly members: ReadonlyMap<string, BookMember>;
}
