import type { BuyCandidates } from '#shared/schemas/buyPeople.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import {
  deleteHelper,
  deleteOffer,
  deleteOrganiser,
  getCandidates,
  postAnswer,
  putHelper,
  putOffer,
  putOrganiser,
  putResponsibility,
} from 'src/api/buys.ts';
import { useBuysStore } from 'src/stores/buys.ts';

/** Who organises, helps and is responsible in a buy, and who else might. */
export const useBuyPeopleStore = defineStore('buyPeople', () => {
  const buys = useBuysStore();
  const candidates = ref<Record<string, BuyCandidates['people']>>({});

  const candidatesOf = (buy: string) => candidates.value[buy] ?? [];

  async function load(club: string, buy: string) {
    candidates.value[buy] = (await getCandidates(club, buy)).people;
  }

  const nameOrganiser = async (club: string, buy: string, member: string) =>
    buys.receive(await putOrganiser(club, buy, member));

  async function dropOrganiser(club: string, buy: string, member: string) {
    await deleteOrganiser(club, buy, member);
    await buys.load(club, buy);
  }

  const nameHelper = async (club: string, buy: string, member: string, takesCash: boolean) =>
    buys.receive(await putHelper(club, buy, member, takesCash));

  async function dropHelper(club: string, buy: string, member: string) {
    await deleteHelper(club, buy, member);
    await buys.load(club, buy);
  }

  const offer = async (club: string, buy: string, toId: string) =>
    buys.receive(await putOffer(club, buy, toId));

  const withdraw = async (club: string, buy: string) => buys.receive(await deleteOffer(club, buy));

  async function answer(club: string, buy: string, accept: boolean) {
    await postAnswer(club, buy, accept);
    await buys.load(club, buy);
  }

  const pass = async (club: string, buy: string, body: { toId: string; reason: string }) =>
    buys.receive(await putResponsibility(club, buy, body));

  return {
    candidatesOf,
    load,
    nameOrganiser,
    dropOrganiser,
    nameHelper,
    dropHelper,
    offer,
    withdraw,
    answer,
    pass,
  };
});
