import type { BuyChanged, BuyPlan, Looker } from '#shared/schemas/live.ts';
import type {
  ExtendBody,
  LineTotal,
  PacksBody,
  MySheet,
  PledgeChange,
  SheetPlan,
  SheetReply,
} from '#shared/schemas/sheet.ts';
import { defineStore } from 'pinia';
import { computed, ref, shallowRef } from 'vue';
import { asProblem, isProblem } from 'src/api/problem.ts';
import * as api from 'src/api/sheet.ts';
import { joinRoom, onConnection, onLive } from 'src/api/socket.ts';
import {
  cellKey,
  emptyCell,
  pledgesOf,
  rowsOf,
  withPledge,
  without,
  type Rows,
  type Wish,
  type Wishes,
} from 'src/stores/sheetRows.ts';
import { makeSheetSums } from 'src/stores/sheetSums.ts';

type SheetFrame = Pick<SheetReply, 'terms' | 'reader' | 'planOverride' | 'organisers'>;

const GLOW_MS = 1_700;
const CATCH_UP_MS = 60;

/** The sheet that is open: what the server said, what is being saved, and the sums of both. */
export const useSheetStore = defineStore('sheet', () => {
  const place = shallowRef<api.BuyPlace | null>(null);
  const sheet = shallowRef<SheetFrame | null>(null);
  const rows = shallowRef<Rows>(new Map());
  const totals = shallowRef<readonly LineTotal[]>([]);
  const mine = shallowRef<MySheet | null>(null);
  const plan = shallowRef<SheetPlan | null>(null);
  const wishes = shallowRef<Wishes>({});
  const problems = shallowRef<Readonly<Record<string, string>>>({});
  const glows = shallowRef<ReadonlySet<string>>(new Set());
  const lookers = ref<Looker[]>([]);
  const connected = ref(true);
  const savedAt = ref<number | null>(null);
  const version = ref(0);

  const me = computed(() => mine.value?.membershipId ?? '');
  const saving = computed(() => Object.keys(wishes.value).length > 0);
  const cellOf = (membershipId: string, lineId: string) =>
    rows.value.get(membershipId)?.cells[lineId] ?? emptyCell;

  function glow(key: string) {
    glows.value = new Set(glows.value).add(key);
    setTimeout(() => {
      const rest = new Set(glows.value);
      rest.delete(key);
      glows.value = rest;
    }, GLOW_MS);
  }

  const { sums, refresh, compare, clear } = makeSheetSums(
    () =>
      sheet.value && {
        terms: sheet.value.terms,
        pledges: pledgesOf(rows.value, wishes.value, totals.value),
        override: sheet.value.planOverride,
        me: me.value,
        version: version.value,
        settled: !saving.value,
        plan: plan.value,
      },
    (defect) => {
      if (!place.value) return;
      void api.postDefect(place.value, { kind: 'plan', ...defect }).catch(() => undefined);
    },
  );

  function receive(reply: SheetReply) {
    const { terms, reader, planOverride, organisers } = reply;
    sheet.value = { terms, reader, planOverride, organisers };
    rows.value = rowsOf(reply);
    totals.value = reply.totals;
    plan.value = reply.plan;
    version.value = reply.sheetVersion;
    keepOwnRow();
    refresh();
  }

  /** Own pledges on lines that show only totals come with one's own part. */
  function keepOwnRow() {
    for (const pledge of mine.value?.pledges ?? []) rows.value = withPledge(rows.value, pledge);
  }

  function receiveMine(reply: MySheet) {
    mine.value = reply;
    keepOwnRow();
    refresh();
  }

  async function loadMine() {
    if (place.value) receiveMine(await api.getMySheet(place.value));
  }

  async function load(to: api.BuyPlace) {
    if (place.value?.buy !== to.buy) forget();
    place.value = to;
    const [reply, part] = await Promise.all([api.getSheet(to), api.getMySheet(to)]);
    if (place.value !== to) return;
    mine.value = part;
    receive(reply);
  }

  function forget() {
    sheet.value = null;
    mine.value = null;
    clear();
    wishes.value = {};
    problems.value = {};
    lookers.value = [];
    savedAt.value = null;
  }

  function takePledge(change: PledgeChange) {
    const before = cellOf(change.membershipId, change.lineId);
    rows.value = withPledge(rows.value, change);
    const grew = before.wantedMg !== change.wantedMg || before.upToMg !== change.upToMg;
    if (grew) glow(cellKey(change.membershipId, change.lineId));
  }

  async function catchUp() {
    const to = place.value;
    if (!to || !sheet.value) return;
    const changes = await api.getChanges(to, version.value, sheet.value.terms.termsVersion);
    if (place.value !== to) return;
    if (changes.whole) {
      receive(changes.sheet);
      await loadMine();
      return;
    }
    changes.pledges.forEach(takePledge);
    version.value = Math.max(version.value, changes.sheetVersion);
    if (changes.plan && changes.plan.forVersion >= (plan.value?.forVersion ?? -1)) {
      plan.value = changes.plan;
    }
    refresh();
  }

  let timer: ReturnType<typeof setTimeout> | undefined;
  function catchUpSoon() {
    clearTimeout(timer);
    // What can't be had now is asked for again with the next message or at reconnecting.
    timer = setTimeout(() => void catchUp().catch(() => undefined), CATCH_UP_MS);
  }

  function hearChange(change: BuyChanged) {
    if (change.buyId !== place.value?.buy || change.sheetVersion <= version.value) return;
    const next = change.sheetVersion === version.value + 1;
    const single = change.kind === 'pledge' && next ? change : null;
    if (single?.pledge) takePledge(single.pledge);
    else if (single?.total && sheet.value?.reader === 'totals') takeTotal(single.total);
    else {
      catchUpSoon();
      return;
    }
    version.value = change.sheetVersion;
    refresh();
  }

  function takeTotal(total: LineTotal) {
    totals.value = totals.value.map((line) => (line.lineId === total.lineId ? total : line));
    glow(cellKey('', total.lineId));
    void loadMine().catch(() => undefined);
  }

  function hearPlan({ buyId, forVersion, plan: made }: BuyPlan) {
    if (buyId !== place.value?.buy || forVersion < (plan.value?.forVersion ?? -1)) return;
    plan.value = { forVersion, plan: made };
    if (forVersion !== version.value) return;
    compare({ forVersion, plan: made });
    refresh();
  }

  /** Sends one wish; its version is read when its turn comes. */
  async function send(to: api.BuyPlace, membershipId: string, lineId: string, wish: Wish) {
    const key = cellKey(membershipId, lineId);
    try {
      const body = { ...wish, version: cellOf(membershipId, lineId).version };
      const reply = await api.putPledge(to, lineId, membershipId, body);
      rows.value = withPledge(rows.value, reply.pledge);
      if (reply.sheetVersion === version.value + 1) version.value = reply.sheetVersion;
      else if (reply.sheetVersion > version.value) catchUpSoon();
      if (!reply.proposed) {
        glow(key);
        savedAt.value = Date.now();
      }
      return reply;
    } catch (error) {
      const problem = asProblem(error);
      if (isProblem(error, 'stale') && problem.current) {
        rows.value = withPledge(rows.value, problem.current as PledgeChange);
      }
      const reason = problem.errors.wantedMg ?? problem.errors.upToMg ?? problem.detail;
      problems.value = { ...problems.value, [key]: reason };
      if (['buy_locked', 'buy_frozen', 'wrong_state'].includes(problem.code)) catchUpSoon();
      throw error;
    }
  }

  const turns = new Map<string, Promise<unknown>>();
  /**
   * Saves a wish; the sheet shows it at once, and takes it back with the reason when it is refused. Wishes for one
   * cell go one after the other.
   */
  async function changePledge(membershipId: string, lineId: string, wish: Wish) {
    const to = place.value;
    if (!to) return null;
    const key = cellKey(membershipId, lineId);
    wishes.value = { ...wishes.value, [key]: wish };
    problems.value = without(problems.value, key);
    refresh();
    const before = turns.get(key) ?? Promise.resolve();
    const turn = before.catch(() => undefined).then(() => send(to, membershipId, lineId, wish));
    turns.set(key, turn);
    try {
      return await turn;
    } finally {
      if (turns.get(key) === turn) turns.delete(key);
      if (wishes.value[key] === wish) wishes.value = without(wishes.value, key);
      refresh();
    }
  }

  const clearProblem = (key: string) => {
    problems.value = without(problems.value, key);
  };

  async function confirmHazard(saltId: string) {
    if (!place.value || !mine.value) return;
    await api.postHazard(place.value, saltId);
    mine.value = { ...mine.value, confirmed: [...mine.value.confirmed, saltId] };
  }

  async function answerProposal(id: string, accept: boolean) {
    if (!place.value) return;
    await api.postProposal(place.value, id, accept);
    await Promise.all([loadMine(), catchUp()]);
  }

  async function signPaper(membershipId: string, saltId: string, signed: boolean) {
    if (!place.value) return;
    await api.putPaper(place.value, membershipId, { saltId, signed });
    await loadMine();
  }

  const act = <Result>(run: (to: api.BuyPlace) => Promise<Result>) =>
    place.value ? run(place.value) : Promise.reject(new Error('No buy is open.'));
  const lock = (termsVersion: number) => act((to) => api.postLock(to, termsVersion));
  const extend = (body: ExtendBody) => act((to) => api.postExtend(to, body));
  const choosePacks = (body: PacksBody) => act((to) => api.putPacks(to, body));

  let listening = false;
  /** Keeps the sheet live for as long as a page shows it; gives the function that stops it. */
  function enter(to: api.BuyPlace): () => void {
    if (!listening) {
      listening = true;
      onLive('buy:changed', hearChange);
      onLive('buy:plan', hearPlan);
      onLive('buy:lookers', ({ buyId, lookers: now }) => {
        if (buyId === place.value?.buy) lookers.value = now;
      });
    }
    const leave = joinRoom(to, (answer, again) => {
      if (!answer.ok) return;
      lookers.value = answer.lookers;
      if (sheet.value && (again || answer.sheetVersion > version.value)) catchUpSoon();
    });
    const stop = onConnection((now) => {
      connected.value = now;
    });
    return () => {
      leave();
      stop();
      clearTimeout(timer);
    };
  }

  return {
    place,
    sheet,
    rows,
    totals,
    mine,
    me,
    plan,
    wishes,
    problems,
    glows,
    sums,
    lookers,
    connected,
    saving,
    savedAt,
    version,
    cellOf,
    load,
    loadMine,
    receive,
    receiveMine,
    hearChange,
    hearPlan,
    changePledge,
    clearProblem,
    confirmHazard,
    answerProposal,
    signPaper,
    lock,
    extend,
    choosePacks,
    catchUp,
    enter,
  };
});
