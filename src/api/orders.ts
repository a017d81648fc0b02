import type { BuyHeader } from '#shared/schemas/buys.ts';
import type {
  AgreementBody,
  BillBody,
  BillsReply,
  ConfirmBillBody,
  DropBody,
  LockedReply,
  LossBody,
  OrdersReply,
  OrderStateBody,
  PlaceOrderBody,
  QuoteBody,
  QuoteEffect,
  RestBody,
  SettlingReply,
  Slip,
  SupplierOrder,
  SupplierRefundBody,
  VoidBillBody,
} from '#shared/schemas/orders.ts';
import type { ReopenBody } from '#shared/schemas/sheet.ts';
import { api, apiUrl } from 'src/api/http.ts';

/** A buy by its club's address and its id. */
export type OrderPlace = { club: string; buy: string };

const at = ({ club, buy }: OrderPlace, rest: string) => `/clubs/${club}/buys/${buy}${rest}`;

export const getLocked = (place: OrderPlace) => api.get<LockedReply>(at(place, '/locked'));
export const getSlip = (place: OrderPlace, member: string) =>
  api.get<Slip>(at(place, `/slips/${member}`));
export const putVouch = (place: OrderPlace, member: string, reason: string) =>
  api.put<LockedReply>(at(place, `/vouched/${member}`), { reason });
export const deleteVouch = (place: OrderPlace, member: string) =>
  api.del<LockedReply>(at(place, `/vouched/${member}`));
export const postDropCheck = (place: OrderPlace, memberIds: string[]) =>
  api.post<QuoteEffect>(at(place, '/drop/check'), { memberIds });
export const postDrop = (place: OrderPlace, body: DropBody) =>
  api.post<LockedReply>(at(place, '/drop'), body);
export const postReminders = (place: OrderPlace, memberIds: string[]) =>
  api.post<{ told: number }>(at(place, '/due-reminders'), { memberIds });
export const postPriceAnswer = (place: OrderPlace, body: AgreementBody) =>
  api.post<undefined>(at(place, '/price-answer'), body);
export const postReopen = (place: OrderPlace, body: ReopenBody) =>
  api.post<BuyHeader>(at(place, '/reopen'), body);

export const getOrders = (place: OrderPlace) => api.get<OrdersReply>(at(place, '/orders'));
export const getOrder = (place: OrderPlace, supplier: string) =>
  api.get<SupplierOrder>(at(place, `/orders/${supplier}`));
export const orderCsvUrl = (place: OrderPlace, supplier: string) =>
  apiUrl(at(place, `/orders/${supplier}/csv`));
export const postQuoteCheck = (
  place: OrderPlace,
  supplier: string,
  body: Pick<QuoteBody, 'prices' | 'shippingMinor'>,
) => api.post<QuoteEffect>(at(place, `/orders/${supplier}/check`), body);
export const putQuote = (place: OrderPlace, supplier: string, body: QuoteBody) =>
  api.put<OrdersReply>(at(place, `/orders/${supplier}/prices`), body);
export const postPlace = (place: OrderPlace, supplier: string, body: PlaceOrderBody) =>
  api.post<OrdersReply>(at(place, `/orders/${supplier}/place`), body);
export const postOrderState = (place: OrderPlace, supplier: string, body: OrderStateBody) =>
  api.post<OrdersReply>(at(place, `/orders/${supplier}/state`), body);

export const getBills = (place: OrderPlace) => api.get<BillsReply>(at(place, '/bills'));
export const postBill = (place: OrderPlace, body: BillBody) =>
  api.post<BillsReply>(at(place, '/bills'), body);
export const putBill = (place: OrderPlace, bill: string, body: BillBody) =>
  api.put<BillsReply>(at(place, `/bills/${bill}`), body);
export const postBillVoid = (place: OrderPlace, bill: string, body: VoidBillBody) =>
  api.post<BillsReply>(at(place, `/bills/${bill}/void`), body);
export const postBillConfirm = (place: OrderPlace, bill: string, body: ConfirmBillBody) =>
  api.post<BillsReply>(at(place, `/bills/${bill}/confirm`), body);
export const postBillReversal = (place: OrderPlace, bill: string, body: VoidBillBody) =>
  api.post<BillsReply>(at(place, `/bills/${bill}/reverse`), body);
export const postSupplierRefund = (place: OrderPlace, body: SupplierRefundBody) =>
  api.post<BillsReply>(at(place, '/supplier-refunds'), body);
export const postLoss = (place: OrderPlace, body: LossBody) =>
  api.post<BillsReply>(at(place, '/losses'), body);
export const postEntryReversal = (
  place: OrderPlace,
  kind: 'supplier-refunds' | 'losses',
  entry: string,
  reason: string,
) => api.post<BillsReply>(at(place, `/${kind}/${entry}/reverse`), { reason });

export const getSettling = (place: OrderPlace) => api.get<SettlingReply>(at(place, '/settling'));
export const postRest = (place: OrderPlace, body: RestBody) =>
  api.post<SettlingReply>(at(place, '/rest'), body);
export const postSettle = (place: OrderPlace, termsVersion: number) =>
  api.post<SettlingReply>(at(place, '/settle'), { termsVersion });
