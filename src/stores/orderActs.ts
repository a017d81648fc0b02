import type {
  BillBody,
  ConfirmBillBody,
  DropBody,
  LossBody,
  OrderStateBody,
  PlaceOrderBody,
  QuoteBody,
  RestBody,
  SupplierRefundBody,
  VoidBillBody,
} from '#shared/schemas/orders.ts';
import type { ReopenBody } from '#shared/schemas/sheet.ts';
import * as orders from 'src/api/orders.ts';
import type { OrderPlace } from 'src/api/orders.ts';
import { useBuysStore } from 'src/stores/buys.ts';
import { useOrdersStore } from 'src/stores/orders.ts';

type Quote = Pick<QuoteBody, 'prices' | 'shippingMinor'>;

/** What is done with a locked buy until it settles; when an act's promise resolves the stores show it. */
export function orderActs(place: OrderPlace) {
  const store = useOrdersStore();
  const buys = useBuysStore();
  const { take } = store;
  /** The head's state, versions and next step follow every act. */
  const withHead = async <T>(act: Promise<T>): Promise<T> => {
    const done = await act;
    await buys.load(place.club, place.buy);
    return done;
  };

  return {
    csvUrl: (supplier: string) => orders.orderCsvUrl(place, supplier),
    vouch: (member: string, reason: string) =>
      withHead(take.locked(place, orders.putVouch(place, member, reason))),
    unvouch: (member: string) => withHead(take.locked(place, orders.deleteVouch(place, member))),
    checkDrop: (memberIds: string[]) => orders.postDropCheck(place, memberIds),
    drop: (body: DropBody) => withHead(take.locked(place, orders.postDrop(place, body))),
    remind: async (memberIds: string[]) => {
      const { told } = await orders.postReminders(place, memberIds);
      await store.loadLocked(place);
      return told;
    },
    answerPrice: (agree: boolean, shareMinor: number) =>
      withHead(orders.postPriceAnswer(place, { agree, shareMinor })),
    reopen: async (body: ReopenBody) => buys.receive(await orders.postReopen(place, body)),
    checkQuote: (supplier: string, body: Quote) => orders.postQuoteCheck(place, supplier, body),
    quote: (supplier: string, body: QuoteBody) =>
      withHead(take.orders(place, orders.putQuote(place, supplier, body))),
    place: (supplier: string, body: PlaceOrderBody) =>
      withHead(take.orders(place, orders.postPlace(place, supplier, body))),
    mark: (supplier: string, body: OrderStateBody) =>
      withHead(take.orders(place, orders.postOrderState(place, supplier, body))),
    saveBill: (bill: string | null, body: BillBody) =>
      withHead(
        take.bills(
          place,
          bill === null ? orders.postBill(place, body) : orders.putBill(place, bill, body),
        ),
      ),
    voidBill: (bill: string, body: VoidBillBody) =>
      withHead(take.bills(place, orders.postBillVoid(place, bill, body))),
    confirmBill: (bill: string, body: ConfirmBillBody) =>
      withHead(take.bills(place, orders.postBillConfirm(place, bill, body))),
    reverseBill: (bill: string, body: VoidBillBody) =>
      withHead(take.bills(place, orders.postBillReversal(place, bill, body))),
    refundOfSupplier: (body: SupplierRefundBody) =>
      withHead(take.bills(place, orders.postSupplierRefund(place, body))),
    bookLoss: (body: LossBody) => withHead(take.bills(place, orders.postLoss(place, body))),
    reverseEntry: (kind: 'supplier-refunds' | 'losses', entry: string, reason: string) =>
      withHead(take.bills(place, orders.postEntryReversal(place, kind, entry, reason))),
    bookRest: (body: RestBody) => withHead(take.settling(place, orders.postRest(place, body))),
    settle: (termsVersion: number) =>
      withHead(take.settling(place, orders.postSettle(place, termsVersion))),
  };
}

export type OrderActs = ReturnType<typeof orderActs>;
