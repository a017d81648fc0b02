import type {
  ClubReply,
  FirstSteps,
  FoundClubBody,
  UpdateClubBody,
} from '#shared/schemas/clubs.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import * as clubs from 'src/api/clubs.ts';
import { useSessionStore } from 'src/stores/session.ts';

/** The particulars of each club that was opened, and how far a new one has come. */
export const useClubStore = defineStore('club', () => {
  const session = useSessionStore();
  const loaded = ref<Record<string, ClubReply>>({});
  const steps = ref<Record<string, FirstSteps>>({});

  const clubOf = (slug: string): ClubReply | null => loaded.value[slug] ?? null;
  const stepsOf = (slug: string): FirstSteps | null => steps.value[slug] ?? null;

  function receive(club: ClubReply) {
    loaded.value[club.slug] = club;
  }

  async function load(slug: string) {
    receive(await clubs.getClub(slug));
  }

  async function loadSteps(slug: string) {
    steps.value[slug] = await clubs.getFirstSteps(slug);
  }

  /** Saves some settings over the version on the page; the frame takes up a new name, currency or zone. */
  async function save(slug: string, body: UpdateClubBody) {
    receive(await clubs.patchClub(slug, body));
    await session.load();
  }

  async function setShelfLimit(slug: string, version: number, shelfLimitMinor: number) {
    receive(await clubs.putShelfLimit(slug, { version, shelfLimitMinor }));
  }

  /** Founds a club and takes its membership into the session; gives the club's address. */
  async function found(body: FoundClubBody): Promise<string> {
    const { slug } = await clubs.postClub(body);
    await session.load();
    return slug;
  }

  return {
    clubOf,
    stepsOf,
    receive,
    load,
    loadSteps,
    save,
    setShelfLimit,
    found,
    readPublic: clubs.getPublicClub,
  };
});
