import type { PriceBody, SaleBody, Shelf } from '#shared/schemas/shelf.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import * as api from 'src/api/shelf.ts';

/** What lies on the shelf of each club that was looked at, with the latest sales for those who sell. */
export const useShelfStore = defineStore('shelf', () => {
  const shelves = ref<Record<string, Shelf>>({});

  const shelfOf = (club: string): Shelf | null => shelves.value[club] ?? null;
  async function take(club: string, act: Promise<Shelf>) {
    shelves.value[club] = await act;
  }

  return {
    shelfOf,
    load: (club: string) => take(club, api.getShelf(club)),
    price: (club: string, stock: string, body: PriceBody) =>
      take(club, api.putStockPrice(club, stock, body)),
    sell: (club: string, stock: string, body: SaleBody) =>
      take(club, api.postSale(club, stock, body)),
    undo: (club: string, sale: string) => take(club, api.deleteSale(club, sale)),
  };
});
