import type { BuyHeader, BuyList } from '#shared/schemas/buys.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import {
  deleteDraft,
  getBuy,
  getBuys,
  postBuy,
  postCancel,
  postCopy,
  postOpen,
  postRestore,
} from 'src/api/buys.ts';
import { joinRoom } from 'src/api/socket.ts';

const PAUSE_MS = 250;

/** Kinds of `buy:changed` that leave a buy's head as it was, but for its sums. */
const small = new Set(['pledge', 'pledges', 'plan']);

/** The buys of each club, and the heads of those that were opened. */
export const useBuysStore = defineStore('buys', () => {
  const lists = ref<Record<string, BuyList>>({});
  const heads = ref<Record<string, BuyHeader>>({});
  const entered = new Map<string, { club: string; holders: number }>();
  const timers = new Map<string, ReturnType<typeof setTimeout>>();

  const headOf = (buy: string): BuyHeader | null => heads.value[buy] ?? null;
  const listOf = (club: string): BuyList | null => lists.value[club] ?? null;

  /** Takes a head from a load or from the reply of an act; an older one than is shown is dropped. */
  function receive(head: BuyHeader) {
    const shown = heads.value[head.id];
    if (!shown || shown.now <= head.now) heads.value[head.id] = head;
  }

  async function loadList(club: string) {
    lists.value[club] = await getBuys(club);
  }

  async function load(club: string, buy: string) {
    receive(await getBuy(club, buy));
  }

  /** Asks for the head anew shortly, once for any number of events. */
  function reloadSoon(club: string, buy: string) {
    clearTimeout(timers.get(buy));
    timers.set(
      buy,
      setTimeout(() => {
        timers.delete(buy);
        // A head that can't be had now is asked for again with the next event or at reconnecting.
        load(club, buy).catch(() => undefined);
      }, PAUSE_MS),
    );
  }

  /** A live event of a buy: `hear` reloads the head of the buy it names, when that is open on this page. */
  function hear(change: unknown) {
    const { buyId, kind } = (change ?? {}) as { buyId?: unknown; kind?: unknown };
    if (typeof kind === 'string' && small.has(kind)) return;
    for (const [buy, { club }] of entered) {
      if (buyId === undefined || buyId === buy) reloadSoon(club, buy);
    }
  }

  /** Keeps a buy's head live for as long as a page shows it; gives the function that stops it. */
  function enter(club: string, buy: string): () => void {
    const held = entered.get(buy) ?? { club, holders: 0 };
    held.holders += 1;
    entered.set(buy, held);
    const leave = joinRoom({ club, buy }, (_answer, again) => {
      if (again) reloadSoon(club, buy);
    });
    return () => {
      leave();
      held.holders -= 1;
      if (held.holders === 0) entered.delete(buy);
    };
  }

  async function take(act: Promise<BuyHeader>): Promise<BuyHeader> {
    const head = await act;
    receive(head);
    return head;
  }

  const create = (club: string) => take(postBuy(club, {}));
  const copy = (club: string, buy: string) => take(postCopy(club, buy));
  const open = (club: string, buy: string, termsVersion: number) =>
    take(postOpen(club, buy, termsVersion));
  const cancel = (club: string, buy: string, body: { termsVersion: number; reason: string }) =>
    take(postCancel(club, buy, body));
  const discard = (club: string, buy: string, termsVersion: number) =>
    take(deleteDraft(club, buy, termsVersion));
  const restore = (club: string, buy: string) => take(postRestore(club, buy));

  return {
    create,
    copy,
    open,
    cancel,
    discard,
    restore,
    lists,
    heads,
    headOf,
    listOf,
    receive,
    loadList,
    load,
    reloadSoon,
    hear,
    enter,
  };
});
