import { z } from 'zod';
import { Done, Id } from '#shared/schemas/fields.ts';
import {
  AgreementBody,
  DropBody,
  DropCheckBody,
  LockedReply,
  OrdersReply,
  OrderStateBody,
  PlaceOrderBody,
  QuoteBody,
  QuoteEffect,
  RemindBody,
  Reminded,
  Slip,
  SupplierOrder,
  VouchBody,
} from '#shared/schemas/orders.ts';
import { buyRoute, FileReply, type RouteDef } from '../middlewares/route.ts';
import {
  canAnswerPrice,
  canOrder,
  canReadOrders,
  canRemind,
  canSeeMoneyOfBuy,
  canVouch,
} from '../policies/orders.ts';
import type { BuyActor } from '../services/actors.ts';
import { answerPriceLimit } from '../services/orders/answerPriceLimit.ts';
import { markOrder } from '../services/orders/changeOrderState.ts';
import { checkDrop, dropMembers } from '../services/orders/dropMembers.ts';
import { orderCsv, readOrder } from '../services/orders/orderSheet.ts';
import { placeOrder } from '../services/orders/placeOrder.ts';
import { checkQuote, setQuote } from '../services/orders/quoteOrder.ts';
import { readLocked, readSlip } from '../services/orders/readLocked.ts';
import { readOrders } from '../services/orders/readOrders.ts';
import { remindDues } from '../services/orders/remindDues.ts';
import { unvouch, vouchFor } from '../services/orders/vouch.ts';

const SupplierParams = z.object({ supplier: Id });
const MemberParams = z.object({ member: Id });

/** The orders as they are after an act. */
const thenOrders = async (actor: BuyActor, act: Promise<unknown>): Promise<OrdersReply> => {
  await act;
  return readOrders(actor);
};
const thenLocked = async (actor: BuyActor, act: Promise<unknown>): Promise<LockedReply> => {
  await act;
  return readLocked(actor);
};

const lockedRoutes: RouteDef[] = [
  buyRoute({
    method: 'get',
    path: '/locked',
    summary: 'The locked buy: frozen shares, amounts due, who has paid for those who may know',
    former: true,
    reply: LockedReply,
    allow: canReadOrders,
    run: ({ actor }) => readLocked(actor),
  }),
  buyRoute({
    method: 'get',
    path: '/slips/:member',
    summary: "A member's frozen share with its arithmetic",
    params: MemberParams,
    reply: Slip,
    allow: canSeeMoneyOfBuy,
    run: ({ actor, params }) => readSlip(actor, params.member),
  }),
  buyRoute({
    method: 'put',
    path: '/vouched/:member',
    summary: 'Vouch for a member who has not paid',
    params: MemberParams,
    body: VouchBody,
    reply: LockedReply,
    allow: canVouch,
    run: ({ actor, params, body }) =>
      thenLocked(actor, vouchFor(actor, params.member, body.reason)),
  }),
  buyRoute({
    method: 'delete',
    path: '/vouched/:member',
    summary: 'Take a word for a member back',
    params: MemberParams,
    reply: LockedReply,
    allow: canVouch,
    run: ({ actor, params }) => thenLocked(actor, unvouch(actor, params.member)),
  }),
  buyRoute({
    method: 'post',
    path: '/drop/check',
    summary: 'What dropping members would do to the other shares',
    body: DropCheckBody,
    reply: QuoteEffect,
    allow: canOrder,
    run: ({ actor, body }) => checkDrop(actor, body.memberIds),
  }),
  buyRoute({
    method: 'post',
    path: '/drop',
    summary: 'Drop members who have not paid; the order is planned anew',
    body: DropBody,
    reply: LockedReply,
    allow: canOrder,
    run: ({ actor, body }) => thenLocked(actor, dropMembers(actor, body)),
  }),
  buyRoute({
    method: 'post',
    path: '/due-reminders',
    summary: 'Remind those who still owe; without names, all of them',
    body: RemindBody,
    reply: Reminded,
    allow: canRemind,
    run: ({ actor, body }) => remindDues(actor, body.memberIds),
  }),
  buyRoute({
    method: 'post',
    path: '/price-answer',
    summary: 'Agree to a share past the price limit, or leave free of charge',
    former: true,
    body: AgreementBody,
    reply: Done,
    allow: canAnswerPrice,
    run: async ({ actor, body }) => {
      await answerPriceLimit(actor, body);
      return { done: true as const };
    },
  }),
];

const supplierRoutes: RouteDef[] = [
  buyRoute({
    method: 'get',
    path: '/orders',
    summary: 'The orders of a buy, one a supplier',
    former: true,
    reply: OrdersReply,
    allow: canReadOrders,
    run: ({ actor }) => readOrders(actor),
  }),
  buyRoute({
    method: 'get',
    path: '/orders/:supplier',
    summary: "One supplier's order sheet",
    params: SupplierParams,
    reply: SupplierOrder,
    allow: canSeeMoneyOfBuy,
    run: ({ actor, params }) => readOrder(actor, params.supplier),
  }),
  buyRoute({
    method: 'get',
    path: '/orders/:supplier/csv',
    summary: "One supplier's order as CSV",
    params: SupplierParams,
    reply: 'file',
    allow: canSeeMoneyOfBuy,
    run: async ({ actor, params }) => {
      const { fileName, csv } = await orderCsv(actor, params.supplier);
      return new FileReply('text/csv; charset=utf-8', csv, { fileName });
    },
  }),
  buyRoute({
    method: 'post',
    path: '/orders/:supplier/check',
    summary: "What a supplier's real prices would do to every share",
    params: SupplierParams,
    body: QuoteBody.pick({ prices: true, shippingMinor: true }),
    reply: QuoteEffect,
    allow: canOrder,
    run: ({ actor, params, body }) => checkQuote(actor, params.supplier, body),
  }),
  buyRoute({
    method: 'put',
    path: '/orders/:supplier/prices',
    summary: "Take a supplier's real prices over before the order goes out",
    params: SupplierParams,
    body: QuoteBody,
    reply: OrdersReply,
    allow: canOrder,
    run: ({ actor, params, body }) => thenOrders(actor, setQuote(actor, params.supplier, body)),
  }),
  buyRoute({
    method: 'post',
    path: '/orders/:supplier/place',
    summary: 'Place the order; with the last one the buy is ordered',
    params: SupplierParams,
    body: PlaceOrderBody,
    reply: OrdersReply,
    allow: canOrder,
    run: ({ actor, params, body }) => thenOrders(actor, placeOrder(actor, params.supplier, body)),
  }),
  buyRoute({
    method: 'post',
    path: '/orders/:supplier/state',
    summary: 'Mark an order as confirmed or failed',
    params: SupplierParams,
    body: OrderStateBody,
    reply: OrdersReply,
    allow: canOrder,
    run: ({ actor, params, body }) => thenOrders(actor, markOrder(actor, params.supplier, body)),
  }),
];

export const ordersRoutes: RouteDef[] = [...lockedRoutes, ...supplierRoutes];
