import type {
  ConfirmCashBody,
  Journal,
  LedgerMember,
  LedgerTasks,
  NoteCashBody,
  PaymentReply,
  RecordPaymentBody,
  RefundBody,
  Statement,
} from '#shared/schemas/ledger.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import * as ledger from 'src/api/ledger.ts';

/** The books as their reader may see them: one's own statement, and for treasurers everybody's. */
export const useLedgerStore = defineStore('ledger', () => {
  const own = ref<Record<string, Statement>>({});
  const statements = ref<Record<string, Statement>>({});
  const payments = ref<Record<string, PaymentReply[]>>({});
  const members = ref<Record<string, LedgerMember[]>>({});
  const tasks = ref<Record<string, LedgerTasks>>({});
  const journals = ref<Record<string, Journal>>({});

  async function loadOwn(club: string) {
    own.value[club] = await ledger.getOwnStatement(club);
  }
  async function loadMember(club: string, member: string) {
    const [statement, list] = await Promise.all([
      ledger.getStatement(club, member),
      ledger.getMemberPayments(club, member),
    ]);
    statements.value[member] = statement;
    payments.value[member] = list.payments;
  }
  async function loadMembers(club: string) {
    members.value[club] = (await ledger.getLedgerMembers(club)).members;
  }
  async function loadTasks(club: string) {
    tasks.value[club] = await ledger.getLedgerTasks(club);
  }
  async function loadJournal(club: string) {
    journals.value[club] = await ledger.getJournal(club, null);
  }
  async function loadMoreJournal(club: string) {
    const shown = journals.value[club];
    if (!shown?.next) return;
    const more = await ledger.getJournal(club, shown.next);
    journals.value[club] = { ...more, entries: [...shown.entries, ...more.entries] };
  }

  /** Reads again what is on the screen after something was posted. */
  async function refresh(club: string, member?: string) {
    const again: Promise<void>[] = [];
    if (tasks.value[club]) again.push(loadTasks(club));
    if (members.value[club]) again.push(loadMembers(club));
    if (own.value[club]) again.push(loadOwn(club));
    if (member && statements.value[member]) again.push(loadMember(club, member));
    await Promise.all(again);
  }

  async function then<T>(act: Promise<T>, club: string, member?: string): Promise<T> {
    const reply = await act;
    await refresh(club, member);
    return reply;
  }

  return {
    own,
    statements,
    payments,
    members,
    tasks,
    journals,
    loadOwn,
    loadMember,
    loadMembers,
    loadTasks,
    loadJournal,
    loadMoreJournal,
    record: (club: string, body: RecordPaymentBody) =>
      then(ledger.postPayment(club, body), club, body.memberId),
    refund: (club: string, body: RefundBody) =>
      then(ledger.postRefund(club, body), club, body.memberId),
    confirmCash: (club: string, body: ConfirmCashBody) =>
      then(ledger.postConfirmCash(club, body), club),
    reverse: (club: string, payment: PaymentReply, reason: string) =>
      then(ledger.postReversal(club, payment.id, reason), club, payment.member.id),
    noteCash: (club: string, buy: string, body: NoteCashBody) =>
      then(ledger.postCashNote(club, buy, body), club),
    withdrawNote: (club: string, buy: string, payment: string, reason: string) =>
      then(ledger.postWithdrawNote(club, buy, payment, reason), club),
    loadBuyPayments: async (club: string, buy: string) => {
      payments.value[buy] = (await ledger.getBuyPayments(club, buy)).payments;
    },
  };
});
