import type { AnswerHandOnBody, HandOns, OfferHandOnBody } from '#shared/schemas/handOns.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import { deleteHandOn, getHandOns, postHandOn, postHandOnAnswer } from 'src/api/handOns.ts';
import { useBuysStore } from 'src/stores/buys.ts';

/** Lines handed on, or offered, from member to member, by buy. */
export const useHandOnsStore = defineStore('handOns', () => {
  const buys = useBuysStore();
  const byBuy = ref<Record<string, HandOns>>({});

  const of = (buy: string): HandOns | null => byBuy.value[buy] ?? null;

  async function load(club: string, buy: string) {
    byBuy.value[buy] = await getHandOns(club, buy);
  }

  /** Keeps the reply, and asks for the head anew: what is due may have moved. */
  async function take(club: string, buy: string, act: Promise<HandOns>) {
    byBuy.value[buy] = await act;
    buys.reloadSoon(club, buy);
  }

  const offer = (club: string, buy: string, body: OfferHandOnBody) =>
    take(club, buy, postHandOn(club, buy, body));
  const answer = (club: string, buy: string, handOn: string, body: AnswerHandOnBody) =>
    take(club, buy, postHandOnAnswer(club, buy, handOn, body));
  const withdraw = (club: string, buy: string, handOn: string) =>
    take(club, buy, deleteHandOn(club, buy, handOn));

  return { of, load, offer, answer, withdraw };
});
