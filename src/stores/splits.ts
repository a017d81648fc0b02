import type { BuyHeader } from '#shared/schemas/buys.ts';
import type {
  Bag,
  FinalPreview,
  MyShare,
  Portion,
  SplitChange,
  SplitSheet,
  TargetsPreview,
} from '#shared/schemas/splits.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import { joinRoom, onLive } from 'src/api/socket.ts';
import * as splits from 'src/api/splits.ts';
import type { BuyAt } from 'src/api/splits.ts';
import { useBuysStore } from 'src/stores/buys.ts';

const PAUSE_MS = 200;
/** The head says how many portions are left; it may lag behind the bench a little. */
const HEAD_PAUSE_MS = 1_000;

function merged<Row extends { id: string; version: number }>(
  rows: readonly Row[],
  changed: readonly Row[],
): Row[] {
  const news = new Map(changed.map((row) => [row.id, row]));
  const kept = rows.map((row) => {
    const other = news.get(row.id);
    news.delete(row.id);
    return other && other.version >= row.version ? other : row;
  });
  return [...kept, ...news.values()];
}

const byCode = (a: Portion, b: Portion) => Number(a.code) - Number(b.code);
const byNumber = (a: Bag, b: Bag) => a.number - b.number;

/** Bags and portions of the buys that were opened, with targets and final shares as they were last looked at. */
export const useSplitsStore = defineStore('splits', () => {
  const sheets = ref<Record<string, SplitSheet>>({});
  const targets = ref<Record<string, TargetsPreview>>({});
  const finals = ref<Record<string, FinalPreview>>({});
  const shares = ref<Record<string, MyShare>>({});
  const clubs = new Map<string, string>();
  const timers = new Map<string, ReturnType<typeof setTimeout>>();
  const heads = new Map<string, ReturnType<typeof setTimeout>>();
  const buys = useBuysStore();

  const sheetOf = (buy: string): SplitSheet | null => sheets.value[buy] ?? null;

  async function load(where: BuyAt) {
    clubs.set(where.buy, where.club);
    const sheet = await splits.getSplit(where);
    const shown = sheets.value[where.buy];
    if (!shown || shown.splitVersion <= sheet.splitVersion) sheets.value[where.buy] = sheet;
  }

  function reloadSoon(buy: string) {
    const club = clubs.get(buy);
    if (club === undefined) return;
    clearTimeout(timers.get(buy));
    timers.set(
      buy,
      setTimeout(() => {
        timers.delete(buy);
        // What can't be had now is asked for again with the next change.
        load({ club, buy }).catch(() => undefined);
      }, PAUSE_MS),
    );
  }

  function headSoon(buy: string) {
    const club = clubs.get(buy);
    if (club === undefined || heads.has(buy)) return;
    heads.set(
      buy,
      setTimeout(() => {
        heads.delete(buy);
        buys.reloadSoon(club, buy);
      }, HEAD_PAUSE_MS),
    );
  }

  /** Takes one change, from the reply to an act or from the socket; after a gap the whole is asked for. */
  function receive(change: SplitChange) {
    const sheet = sheets.value[change.buyId];
    if (!sheet) return;
    const gap = change.splitVersion > sheet.splitVersion + 1;
    sheets.value[change.buyId] = {
      ...sheet,
      splitVersion: gap ? sheet.splitVersion : Math.max(sheet.splitVersion, change.splitVersion),
      bags: merged(sheet.bags, change.bags).sort(byNumber),
      portions: merged(sheet.portions, change.portions).sort(byCode),
    };
    if (gap || change.partly) reloadSoon(change.buyId);
    if (change.portions.some(({ state }) => state !== 'claimed')) headSoon(change.buyId);
  }

  /** A buy moved on or its terms changed: what is shown of it is asked for again. */
  function hear(change: { buyId: string; kind: string }) {
    if (change.kind === 'terms' || change.kind === 'state') reloadSoon(change.buyId);
  }

  onLive('split:changed', receive);
  onLive('buy:changed', hear);

  async function act(change: Promise<SplitChange>): Promise<SplitChange> {
    const made = await change;
    receive(made);
    return made;
  }

  async function move(where: BuyAt, moved: Promise<BuyHeader>): Promise<BuyHeader> {
    const head = await moved;
    buys.receive(head);
    await load(where);
    return head;
  }

  /** Keeps a buy's split live for as long as a page shows it; gives the function that stops it. */
  function enter({ club, buy }: BuyAt): () => void {
    clubs.set(buy, club);
    return joinRoom({ club, buy }, (_answer, again) => {
      if (again) reloadSoon(buy);
    });
  }

  const loadTargets = async (where: BuyAt) => {
    targets.value[where.buy] = await splits.getTargets(where);
  };
  const loadFinal = async (where: BuyAt) => {
    finals.value[where.buy] = await splits.getFinal(where);
  };
  const loadShare = async (where: BuyAt) => {
    shares.value[where.buy] = await splits.getShare(where);
  };

  return {
    sheets,
    targets,
    finals,
    shares,
    sheetOf,
    load,
    reloadSoon,
    enter,
    receive,
    hear,
    act,
    move,
    loadTargets,
    loadFinal,
    loadShare,
  };
});
