import type { SessionReply } from '#shared/schemas/session.ts';
import { defineStore } from 'pinia';
import { computed, ref } from 'vue';
import { deleteSession, getSession, postDemoSession, postSession } from 'src/api/session.ts';

const LAST_CLUB = 'tarewell.lastClub';

/** Who is signed in, their clubs, and which club the page is about. */
export const useSessionStore = defineStore('session', () => {
  const account = ref<SessionReply['account']>(null);
  const memberships = ref<SessionReply['memberships']>([]);
  const demo = ref(false);
  const firstRun = ref(false);
  const loaded = ref(false);
  const clubSlug = ref<string | null>(null);

  const signedIn = computed(() => account.value !== null);
  const currentClub = computed(() => findMembership(clubSlug.value));
  const homeClub = computed(
    () =>
      findMembership(localStorage.getItem(LAST_CLUB)) ??
      memberships.value.find(({ status }) => status === 'active') ??
      memberships.value.find(({ status }) => status !== 'pending') ??
      null,
  );

  /** A membership that opens the club's pages: one that waits for approval doesn't. */
  function findMembership(slug: string | null) {
    return (
      memberships.value.find(({ clubSlug: own, status }) => own === slug && status !== 'pending') ??
      null
    );
  }

  function receive(reply: SessionReply) {
    account.value = reply.account;
    memberships.value = reply.memberships;
    demo.value = reply.demo;
    firstRun.value = reply.firstRun;
    loaded.value = true;
  }

  async function load() {
    receive(await getSession());
  }

  async function signIn(credentials: { email: string; password: string }) {
    await postSession(credentials);
    await load();
  }

  async function signInToDemo(email: string) {
    await postDemoSession({ email });
    await load();
  }

  async function signOut() {
    await deleteSession();
    clear();
  }

  /** Forgets the account without asking the server, which has already ended the session. */
  function clear() {
    account.value = null;
    memberships.value = [];
    clubSlug.value = null;
  }

  function enterClub(slug: string | null) {
    clubSlug.value = slug;
    if (findMembership(slug)) localStorage.setItem(LAST_CLUB, slug ?? '');
  }

  const hasRole = (role: 'organiser' | 'treasurer' | 'steward') =>
    currentClub.value?.roles[role] ?? false;

  return {
    account,
    memberships,
    demo,
    firstRun,
    loaded,
    clubSlug,
    signedIn,
    currentClub,
    homeClub,
    findMembership,
    hasRole,
    receive,
    load,
    signIn,
    signInToDemo,
    signOut,
    clear,
    enterClub,
  };
});
