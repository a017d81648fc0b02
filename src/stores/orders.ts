import type {
  BillsReply,
  LockedReply,
  OrdersReply,
  SettlingReply,
  Slip,
  SupplierOrder,
} from '#shared/schemas/orders.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import * as orders from 'src/api/orders.ts';
import type { OrderPlace } from 'src/api/orders.ts';

/** Each buy from its lock to its end, as this reader sees it. */
export const useOrdersStore = defineStore('orders', () => {
  const locked = ref<Record<string, LockedReply>>({});
  const books = ref<Record<string, OrdersReply>>({});
  const bills = ref<Record<string, BillsReply>>({});
  const settling = ref<Record<string, SettlingReply>>({});
  const slips = ref<Record<string, Slip>>({});
  const sheets = ref<Record<string, SupplierOrder>>({});

  async function loadLocked(place: OrderPlace) {
    locked.value[place.buy] = await orders.getLocked(place);
  }
  async function loadOrders(place: OrderPlace) {
    books.value[place.buy] = await orders.getOrders(place);
  }
  async function loadBills(place: OrderPlace) {
    bills.value[place.buy] = await orders.getBills(place);
  }
  async function loadSettling(place: OrderPlace) {
    settling.value[place.buy] = await orders.getSettling(place);
  }
  async function loadSlip(place: OrderPlace, member: string) {
    slips.value[`${place.buy} ${member}`] = await orders.getSlip(place, member);
  }
  async function loadSheet(place: OrderPlace, supplier: string) {
    sheets.value[`${place.buy} ${supplier}`] = await orders.getOrder(place, supplier);
  }

  const take = {
    locked: async (place: OrderPlace, reply: Promise<LockedReply>) => {
      locked.value[place.buy] = await reply;
    },
    orders: async (place: OrderPlace, reply: Promise<OrdersReply>) => {
      books.value[place.buy] = await reply;
    },
    bills: async (place: OrderPlace, reply: Promise<BillsReply>) => {
      const shown = await reply;
      bills.value[place.buy] = shown;
      // What a bill says shows beside the orders too.
      if (books.value[place.buy]) await loadOrders(place);
      return shown;
    },
    settling: async (place: OrderPlace, reply: Promise<SettlingReply>) => {
      settling.value[place.buy] = await reply;
    },
  };

  return {
    locked,
    books,
    bills,
    settling,
    slips,
    sheets,
    loadLocked,
    loadOrders,
    loadBills,
    loadSettling,
    loadSlip,
    loadSheet,
    take,
  };
});
