import { z } from 'zod';
import { Id } from '#shared/schemas/fields.ts';
import {
  ConfirmCashBody,
  Journal,
  JournalQuery,
  LedgerMembers,
  LedgerTasks,
  NoteCashBody,
  PaymentList,
  PaymentReply,
  RecordPaymentBody,
  RefundBody,
  ReverseBody,
  Statement,
} from '#shared/schemas/ledger.ts';
import { buyRoute, clubRoute, type RouteDef } from '../middlewares/route.ts';
import {
  canKeepBooks,
  canNoteCash,
  canReadOwnStatement,
  canSeePaymentsOfBuy,
} from '../policies/ledger.ts';
import { confirmCash } from '../services/ledger/confirmCash.ts';
import { findPayments } from '../services/ledger/findPayments.ts';
import { readJournal } from '../services/ledger/readJournal.ts';
import { readMembersLedger } from '../services/ledger/readMembers.ts';
import { readStatement } from '../services/ledger/readStatement.ts';
import { readTasks } from '../services/ledger/readTasks.ts';
import { noteCash, recordPayment } from '../services/ledger/recordPayment.ts';
import { refundMember } from '../services/ledger/refundMember.ts';
import { reversePayment, withdrawCashNote } from '../services/ledger/reversePayment.ts';

const MemberParams = z.object({ member: Id });
const PaymentParams = z.object({ payment: Id });

export const ledgerRoutes: RouteDef[] = [
  clubRoute({
    method: 'get',
    path: '/ledger/statement',
    summary: "One's own statement: dues, payments, credit, and how to pay",
    former: true,
    reply: Statement,
    allow: canReadOwnStatement,
    run: ({ actor }) => readStatement(actor, actor.membershipId),
  }),
  clubRoute({
    method: 'get',
    path: '/ledger/members',
    summary: 'Who owes what',
    reply: LedgerMembers,
    allow: canKeepBooks,
    run: ({ actor }) => readMembersLedger(actor),
  }),
  clubRoute({
    method: 'get',
    path: '/ledger/members/:member',
    summary: "A member's statement",
    params: MemberParams,
    reply: Statement,
    allow: canKeepBooks,
    run: ({ actor, params }) => readStatement(actor, params.member),
  }),
  clubRoute({
    method: 'get',
    path: '/ledger/members/:member/payments',
    summary: "A member's payments and refunds",
    params: MemberParams,
    reply: PaymentList,
    allow: canKeepBooks,
    run: async ({ actor, params }) => ({
      payments: await findPayments(actor.club.id, 'member', params.member),
    }),
  }),
  clubRoute({
    method: 'get',
    path: '/ledger/tasks',
    summary: 'What waits for the treasurer',
    reply: LedgerTasks,
    allow: canKeepBooks,
    run: ({ actor }) => readTasks(actor),
  }),
  clubRoute({
    method: 'get',
    path: '/ledger/journal',
    summary: 'The journal and the accounts',
    query: JournalQuery,
    reply: Journal,
    allow: canKeepBooks,
    run: ({ actor, query }) => readJournal(actor, query.before),
  }),
  clubRoute({
    method: 'post',
    path: '/payments',
    summary: 'Record cash or a transfer that came in',
    body: RecordPaymentBody,
    reply: PaymentReply,
    status: 201,
    allow: canKeepBooks,
    run: ({ actor, body }) => recordPayment(actor, body),
  }),
  clubRoute({
    method: 'post',
    path: '/payments/confirm',
    summary: 'Confirm cash that organisers and helpers noted',
    body: ConfirmCashBody,
    reply: PaymentList,
    allow: canKeepBooks,
    run: ({ actor, body }) => confirmCash(actor, body),
  }),
  clubRoute({
    method: 'post',
    path: '/payments/:payment/reverse',
    summary: 'Take a mistaken payment or refund back',
    params: PaymentParams,
    body: ReverseBody,
    reply: PaymentReply,
    allow: canKeepBooks,
    run: ({ actor, params, body }) => reversePayment(actor, params.payment, body.reason),
  }),
  clubRoute({
    method: 'post',
    path: '/refunds',
    summary: 'Give credit back to a member',
    body: RefundBody,
    reply: PaymentReply,
    status: 201,
    allow: canKeepBooks,
    run: ({ actor, body }) => refundMember(actor, body),
  }),
  buyRoute({
    method: 'get',
    path: '/payments',
    summary: 'Payments for this buy',
    reply: PaymentList,
    allow: canSeePaymentsOfBuy,
    run: async ({ actor }) => ({
      payments: await findPayments(actor.club.id, 'buy', actor.buy.id),
    }),
  }),
  buyRoute({
    method: 'post',
    path: '/payments',
    summary: 'Note cash that was handed over for this buy',
    body: NoteCashBody,
    reply: PaymentReply,
    status: 201,
    allow: canNoteCash,
    run: ({ actor, body }) => noteCash(actor, body),
  }),
  buyRoute({
    method: 'post',
    path: '/payments/:payment/withdraw',
    summary: "Take back one's own note of cash before the treasurer confirms it",
    params: z.object({ payment: Id }),
    body: ReverseBody,
    reply: PaymentReply,
    allow: canNoteCash,
    run: ({ actor, params, body }) => withdrawCashNote(actor, params.payment, body.reason),
  }),
];
