import type {
  DeliveryList,
  NoticeDraft,
  NoticeKind,
  NoticeList,
  SendNoticeBody,
  UnsubscribeReply,
} from '#shared/schemas/notices.ts';
import type { OutboxList } from '#shared/schemas/outbox.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import {
  getDeliveries,
  getNoticeDraft,
  getNotices,
  getOutbox,
  getPreferences,
  getUnsubscribe,
  mailHtmlUrl,
  postNotice,
  postNoticesRead,
  postUnsubscribe,
  putPreferences,
} from 'src/api/notices.ts';

/** A member's notices by club, their choice of mail, and how a buy's notices fared. */
export const useNoticesStore = defineStore('notices', () => {
  const lists = ref<Record<string, NoticeList>>({});
  const off = ref<Record<string, NoticeKind[]>>({});
  const deliveries = ref<Record<string, DeliveryList>>({});
  const drafts = ref<Record<string, NoticeDraft>>({});
  const unsubscribing = ref<UnsubscribeReply | null>(null);
  const outbox = ref<OutboxList | null>(null);

  async function load(club: string) {
    const [list, preferences] = await Promise.all([getNotices(club), getPreferences(club)]);
    lists.value[club] = list;
    off.value[club] = preferences.off;
  }

  async function markRead(club: string) {
    lists.value[club] = await postNoticesRead(club);
  }

  async function saveOff(club: string, kinds: NoticeKind[]) {
    const before = off.value[club] ?? [];
    off.value[club] = kinds;
    try {
      off.value[club] = (await putPreferences(club, { off: kinds })).off;
    } catch (error) {
      off.value[club] = before;
      throw error;
    }
  }

  async function loadUnsubscribe(token: string) {
    unsubscribing.value = await getUnsubscribe(token);
  }

  async function unsubscribe(token: string) {
    unsubscribing.value = await postUnsubscribe(token);
  }

  async function loadDeliveries(club: string, buy: string) {
    deliveries.value[buy] = await getDeliveries(club, buy);
  }

  async function loadDraft(club: string, buy: string) {
    drafts.value[buy] = await getNoticeDraft(club, buy);
  }

  async function send(club: string, buy: string, body: SendNoticeBody) {
    const reply = await postNotice(club, buy, body);
    await loadDeliveries(club, buy);
    return reply.sent;
  }

  async function loadOutbox() {
    outbox.value = await getOutbox();
  }

  return {
    lists,
    off,
    deliveries,
    drafts,
    unsubscribing,
    outbox,
    load,
    markRead,
    saveOff,
    loadUnsubscribe,
    unsubscribe,
    loadDeliveries,
    loadDraft,
    send,
    loadOutbox,
    mailUrl: mailHtmlUrl,
  };
});
