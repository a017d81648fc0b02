import type { LossBody, RecordList } from '#shared/schemas/precursors.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import * as api from 'src/api/precursors.ts';

/** Records of reportable salts, of a whole club or of one buy, as far as the reader may see them. */
export const usePrecursorsStore = defineStore('precursors', () => {
  const lists = ref<Record<string, RecordList>>({});

  const listOf = (club: string, buy?: string): RecordList | null =>
    lists.value[buy ?? club] ?? null;

  async function load(club: string, buy?: string) {
    lists.value[buy ?? club] = await (buy
      ? api.getBuyRecords(club, buy)
      : api.getClubRecords(club));
  }

  /** Writes a loss down; `shown` is the buy whose page shows it, none for the club's. */
  async function writeLoss(club: string, buy: string, body: LossBody, shown?: string) {
    const list = await api.postLoss(club, buy, body);
    if (shown) lists.value[shown] = list;
    else await load(club);
  }

  return { listOf, load, writeLoss };
});
