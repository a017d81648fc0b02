import { z } from 'zod';
import { Id } from '#shared/schemas/fields.ts';
import { ReverseBody } from '#shared/schemas/ledger.ts';
import {
  BillBody,
  BillsReply,
  ConfirmBillBody,
  LossBody,
  RestBody,
  SettleBody,
  SettlingReply,
  SupplierRefundBody,
  VoidBillBody,
} from '#shared/schemas/orders.ts';
import { buyRoute, type RouteDef } from '../middlewares/route.ts';
import { canCloseBuy, canEnterBills, canReadOrders, canSeeMoneyOfBuy } from '../policies/orders.ts';
import type { BuyActor } from '../services/actors.ts';
import { bookRest } from '../services/orders/bookRest.ts';
import { confirmBill, reverseBill, voidBill } from '../services/orders/confirmBill.ts';
import { changeBill, enterBill } from '../services/orders/enterBill.ts';
import { readBills } from '../services/orders/readBills.ts';
import { readSettling } from '../services/orders/readSettling.ts';
import { settleBuy } from '../services/orders/settleBuy.ts';
import {
  bookLoss,
  recordSupplierRefund,
  reverseSupplierMoney,
} from '../services/orders/supplierMoney.ts';

const BillParams = z.object({ bill: Id });
const EntryParams = z.object({ entry: Id });

const thenBills = async (actor: BuyActor, act: Promise<unknown>): Promise<BillsReply> => {
  await act;
  return readBills(actor);
};
const thenSettling = async (actor: BuyActor, act: Promise<unknown>): Promise<SettlingReply> => {
  await act;
  return readSettling(actor);
};

export const billsRoutes: RouteDef[] = [
  buyRoute({
    method: 'get',
    path: '/bills',
    summary: 'Bills, supplier refunds and losses, and what they make of each share',
    reply: BillsReply,
    allow: canSeeMoneyOfBuy,
    run: ({ actor }) => readBills(actor),
  }),
  buyRoute({
    method: 'post',
    path: '/bills',
    summary: 'Enter a bill',
    body: BillBody,
    reply: BillsReply,
    status: 201,
    allow: canEnterBills,
    run: ({ actor, body }) => thenBills(actor, enterBill(actor, body)),
  }),
  buyRoute({
    method: 'put',
    path: '/bills/:bill',
    summary: 'Correct a bill before it is confirmed',
    params: BillParams,
    body: BillBody,
    reply: BillsReply,
    allow: canEnterBills,
    run: ({ actor, params, body }) => thenBills(actor, changeBill(actor, params.bill, body)),
  }),
  buyRoute({
    method: 'post',
    path: '/bills/:bill/void',
    summary: 'Take a bill back before it is confirmed',
    params: BillParams,
    body: VoidBillBody,
    reply: BillsReply,
    allow: canEnterBills,
    run: ({ actor, params, body }) => thenBills(actor, voidBill(actor, params.bill, body)),
  }),
  buyRoute({
    method: 'post',
    path: '/bills/:bill/confirm',
    summary: 'Confirm a bill, which posts it',
    params: BillParams,
    body: ConfirmBillBody,
    reply: BillsReply,
    allow: canCloseBuy,
    run: ({ actor, params, body }) => thenBills(actor, confirmBill(actor, params.bill, body)),
  }),
  buyRoute({
    method: 'post',
    path: '/bills/:bill/reverse',
    summary: 'Reverse a confirmed bill',
    params: BillParams,
    body: VoidBillBody,
    reply: BillsReply,
    allow: canCloseBuy,
    run: ({ actor, params, body }) => thenBills(actor, reverseBill(actor, params.bill, body)),
  }),
  buyRoute({
    method: 'post',
    path: '/supplier-refunds',
    summary: 'Record money that a supplier gave back',
    body: SupplierRefundBody,
    reply: BillsReply,
    status: 201,
    allow: canCloseBuy,
    run: ({ actor, body }) => thenBills(actor, recordSupplierRefund(actor, body)),
  }),
  buyRoute({
    method: 'post',
    path: '/supplier-refunds/:entry/reverse',
    summary: "Take a supplier's refund back",
    params: EntryParams,
    body: ReverseBody,
    reply: BillsReply,
    allow: canCloseBuy,
    run: ({ actor, params, body }) =>
      thenBills(actor, reverseSupplierMoney(actor, 'supplier_refunds', params.entry, body.reason)),
  }),
  buyRoute({
    method: 'post',
    path: '/losses',
    summary: "Take part of the costs to the club's losses",
    body: LossBody,
    reply: BillsReply,
    status: 201,
    allow: canCloseBuy,
    run: ({ actor, body }) => thenBills(actor, bookLoss(actor, body)),
  }),
  buyRoute({
    method: 'post',
    path: '/losses/:entry/reverse',
    summary: 'Take a loss back',
    params: EntryParams,
    body: ReverseBody,
    reply: BillsReply,
    allow: canCloseBuy,
    run: ({ actor, params, body }) =>
      thenBills(actor, reverseSupplierMoney(actor, 'buy_losses', params.entry, body.reason)),
  }),
  buyRoute({
    method: 'get',
    path: '/settling',
    summary: "What stands open before the buy settles, and one's own receipt",
    former: true,
    reply: SettlingReply,
    allow: canReadOrders,
    run: ({ actor }) => readSettling(actor),
  }),
  buyRoute({
    method: 'post',
    path: '/rest',
    summary: "Clear what is left on the buy's account",
    body: RestBody,
    reply: SettlingReply,
    allow: canCloseBuy,
    run: ({ actor, body }) => thenSettling(actor, bookRest(actor, body)),
  }),
  buyRoute({
    method: 'post',
    path: '/settle',
    summary: 'Close the buy for good',
    body: SettleBody,
    reply: SettlingReply,
    allow: canCloseBuy,
    run: ({ actor, body }) => thenSettling(actor, settleBuy(actor, body.termsVersion)),
  }),
];
