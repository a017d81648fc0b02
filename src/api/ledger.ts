import type {
  ConfirmCashBody,
  Journal,
  LedgerMembers,
  LedgerTasks,
  NoteCashBody,
  PaymentList,
  PaymentReply,
  RecordPaymentBody,
  RefundBody,
  Statement,
} from '#shared/schemas/ledger.ts';
import { api } from 'src/api/http.ts';

const at = (club: string, rest: string) => `/clubs/${club}${rest}`;

export const getOwnStatement = (club: string) => api.get<Statement>(at(club, '/ledger/statement'));
export const getStatement = (club: string, member: string) =>
  api.get<Statement>(at(club, `/ledger/members/${member}`));
export const getMemberPayments = (club: string, member: string) =>
  api.get<PaymentList>(at(club, `/ledger/members/${member}/payments`));
export const getLedgerMembers = (club: string) =>
  api.get<LedgerMembers>(at(club, '/ledger/members'));
export const getLedgerTasks = (club: string) => api.get<LedgerTasks>(at(club, '/ledger/tasks'));
export const getJournal = (club: string, before: string | null) =>
  api.get<Journal>(at(club, '/ledger/journal'), { before });

export const postPayment = (club: string, body: RecordPaymentBody) =>
  api.post<PaymentReply>(at(club, '/payments'), body);
export const postConfirmCash = (club: string, body: ConfirmCashBody) =>
  api.post<PaymentList>(at(club, '/payments/confirm'), body);
export const postReversal = (club: string, payment: string, reason: string) =>
  api.post<PaymentReply>(at(club, `/payments/${payment}/reverse`), { reason });
export const postRefund = (club: string, body: RefundBody) =>
  api.post<PaymentReply>(at(club, '/refunds'), body);

export const getBuyPayments = (club: string, buy: string) =>
  api.get<PaymentList>(at(club, `/buys/${buy}/payments`));
export const postCashNote = (club: string, buy: string, body: NoteCashBody) =>
  api.post<PaymentReply>(at(club, `/buys/${buy}/payments`), body);
export const postWithdrawNote = (club: string, buy: string, payment: string, reason: string) =>
  api.post<PaymentReply>(at(club, `/buys/${buy}/payments/${payment}/withdraw`), { reason });
