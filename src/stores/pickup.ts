import type {
  HandoverBody,
  MyPickup,
  PickupDesk,
  PickupSlot,
  SlotBody,
} from '#shared/schemas/pickup.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import * as pickup from 'src/api/pickup.ts';
import { putPaper } from 'src/api/sheet.ts';
import { onLive } from 'src/api/socket.ts';
import type { BuyAt } from 'src/api/splits.ts';

const PAUSE_MS = 200;

/** Each buy's hand-over: the desk for those who run it, and one's own pickup. */
export const usePickupStore = defineStore('pickup', () => {
  const desks = ref<Record<string, PickupDesk>>({});
  const own = ref<Record<string, MyPickup>>({});
  const watched = new Map<string, () => Promise<unknown>>();
  const timers = new Map<string, ReturnType<typeof setTimeout>>();

  const deskOf = (buy: string): PickupDesk | null => desks.value[buy] ?? null;
  const mineOf = (buy: string): MyPickup | null => own.value[buy] ?? null;

  async function loadDesk(where: BuyAt) {
    desks.value[where.buy] = await pickup.getDesk(where);
  }
  async function loadMine(where: BuyAt) {
    own.value[where.buy] = await pickup.getMyPickup(where);
  }

  async function takeDesk(where: BuyAt, act: Promise<PickupDesk>): Promise<PickupDesk> {
    const desk = await act;
    desks.value[where.buy] = desk;
    return desk;
  }
  async function takeMine(where: BuyAt, act: Promise<MyPickup>) {
    own.value[where.buy] = await act;
  }
  async function takeSlots(where: BuyAt, act: Promise<PickupSlot[]>) {
    const slots = await act;
    const desk = desks.value[where.buy];
    const mine = own.value[where.buy];
    if (desk) desks.value[where.buy] = { ...desk, slots };
    if (mine) own.value[where.buy] = { ...mine, slots };
  }

  /** Something of a buy changed: what a page shows of it is asked for again shortly. */
  function hear({ buyId, kind }: { buyId: string; kind?: string }) {
    const load = watched.get(buyId);
    if (!load || kind === 'pledge' || kind === 'pledges') return;
    clearTimeout(timers.get(buyId));
    timers.set(
      buyId,
      setTimeout(() => {
        timers.delete(buyId);
        // What can't be had now is asked for again with the next change.
        load().catch(() => undefined);
      }, PAUSE_MS),
    );
  }

  onLive('split:changed', hear);
  onLive('buy:changed', hear);

  /** Keeps a buy's pickup fresh by `load` for as long as a page shows it; gives the function that stops it. */
  function follow(buy: string, load: () => Promise<unknown>): () => void {
    watched.set(buy, load);
    return () => {
      if (watched.get(buy) === load) watched.delete(buy);
      clearTimeout(timers.get(buy));
    };
  }

  return {
    desks,
    own,
    deskOf,
    mineOf,
    loadDesk,
    loadMine,
    hear,
    follow,
    chooseSlot: (where: BuyAt, slotId: string | null) =>
      takeMine(where, pickup.putMySlot(where, slotId)),
    nameProxy: (where: BuyAt, name: string | null) =>
      takeMine(where, pickup.putMyProxy(where, name)),
    findByPass: async (where: BuyAt, pass: string) =>
      (await pickup.postPass(where, pass)).membershipId,
    handOver: (where: BuyAt, body: HandoverBody) =>
      takeDesk(where, pickup.postHandover(where, body)),
    undo: (where: BuyAt, handover: string) =>
      takeDesk(where, pickup.deleteHandover(where, handover)),
    signPaper: async (where: BuyAt, member: string, saltId: string, signed: boolean) => {
      await putPaper(where, member, { saltId, signed });
      await loadDesk(where);
    },
    saveSlot: (where: BuyAt, slot: string | null, body: SlotBody) =>
      takeSlots(
        where,
        slot === null ? pickup.postSlot(where, body) : pickup.putSlot(where, slot, body),
      ),
    removeSlot: (where: BuyAt, slot: string) => takeSlots(where, pickup.deleteSlot(where, slot)),
    tell: async (where: BuyAt, body: { id: string; to: string[]; note: string }) =>
      (await pickup.postPickupNotice(where, body)).told,
    remind: (where: BuyAt, member: string) =>
      takeDesk(where, pickup.postPickupReminder(where, member)),
    putAway: (where: BuyAt, member: string) => takeDesk(where, pickup.postUnclaimed(where, member)),
  };
});
