import type { ClubSalt, OwnSaltBody, SaltList } from '#shared/schemas/salts.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import * as api from 'src/api/salts.ts';

/** The salts of each club that was opened: the shipped ones and the club's own. */
export const useSaltsStore = defineStore('salts', () => {
  const lists = ref<Record<string, SaltList>>({});

  const listOf = (club: string): SaltList | null => lists.value[club] ?? null;
  const saltOf = (club: string, id: string): ClubSalt | null =>
    lists.value[club]?.salts.find((salt) => salt.id === id) ?? null;
  /** Salts that may be chosen for something new. */
  const choicesOf = (club: string): ClubSalt[] =>
    (lists.value[club]?.salts ?? []).filter(({ hidden, archivedAt }) => !hidden && !archivedAt);

  async function load(club: string) {
    lists.value[club] = await api.getSalts(club);
  }

  function receive(club: string, salt: ClubSalt): ClubSalt {
    const list = lists.value[club];
    if (!list) return salt;
    const others = list.salts.filter(({ id }) => id !== salt.id);
    const salts = [...others, salt].sort((a, b) => a.name.localeCompare(b.name, 'en'));
    lists.value[club] = { ...list, salts };
    return salt;
  }

  return {
    listOf,
    saltOf,
    choicesOf,
    load,
    add: async (club: string, body: OwnSaltBody) => receive(club, await api.postSalt(club, body)),
    change: async (club: string, salt: ClubSalt, body: OwnSaltBody) =>
      receive(club, await api.putSalt(club, salt.id, { ...body, version: salt.version })),
    archive: async (club: string, salt: ClubSalt, archived: boolean) =>
      receive(club, await api.postSaltArchive(club, salt.id, salt.version, archived)),
    hide: async (club: string, id: string, hidden: boolean) =>
      receive(club, await api.putSaltHidden(club, id, hidden)),
  };
});
