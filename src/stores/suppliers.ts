import type {
  Offer,
  OfferBody,
  Supplier,
  SupplierBody,
  SupplierList,
  SupplierPage,
} from '#shared/schemas/suppliers.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import * as api from 'src/api/suppliers.ts';

/** The suppliers of each club that was opened, and the offers of those that were looked at. */
export const useSuppliersStore = defineStore('suppliers', () => {
  const lists = ref<Record<string, SupplierList>>({});
  const pages = ref<Record<string, SupplierPage>>({});

  const listOf = (club: string): SupplierList | null => lists.value[club] ?? null;
  const pageOf = (supplier: string): SupplierPage | null => pages.value[supplier] ?? null;

  async function loadList(club: string) {
    lists.value[club] = await api.getSuppliers(club);
  }

  async function load(club: string, supplier: string) {
    pages.value[supplier] = await api.getSupplier(club, supplier);
  }

  function receive(club: string, supplier: Supplier): Supplier {
    const list = lists.value[club];
    if (list) {
      const others = list.suppliers.filter(({ id }) => id !== supplier.id);
      const suppliers = [...others, supplier].sort(
        (a, b) => Number(a.isShelf) - Number(b.isShelf) || a.name.localeCompare(b.name, 'en'),
      );
      lists.value[club] = { ...list, suppliers };
    }
    const page = pages.value[supplier.id];
    if (page) pages.value[supplier.id] = { ...page, supplier };
    return supplier;
  }

  function receiveOffer(offer: Offer): Offer {
    const page = pages.value[offer.supplierId];
    if (!page) return offer;
    const known = page.offers.some(({ id }) => id === offer.id);
    const offers = known
      ? page.offers.map((one) => (one.id === offer.id ? offer : one))
      : [...page.offers, offer];
    pages.value[offer.supplierId] = { ...page, offers };
    return offer;
  }

  return {
    listOf,
    pageOf,
    loadList,
    load,
    add: async (club: string, body: SupplierBody) =>
      receive(club, await api.postSupplier(club, body)),
    change: async (club: string, supplier: Supplier, body: SupplierBody) =>
      receive(club, await api.putSupplier(club, supplier.id, supplier.version, body)),
    archive: async (club: string, supplier: Supplier, archived: boolean) =>
      receive(club, await api.postSupplierArchive(club, supplier.id, supplier.version, archived)),
    addOffer: async (club: string, supplier: string, body: OfferBody) =>
      receiveOffer(await api.postOffer(club, supplier, body)),
    changeOffer: async (club: string, offer: Offer, body: OfferBody) =>
      receiveOffer(await api.putOffer(club, offer.supplierId, offer.id, offer.version, body)),
    archiveOffer: async (club: string, offer: Offer, archived: boolean) =>
      receiveOffer(
        await api.postOfferArchive(club, offer.supplierId, offer.id, offer.version, archived),
      ),
    pricesOf: async (club: string, offer: Offer) =>
      (await api.getOfferPrices(club, offer.supplierId, offer.id)).prices,
    previewImport: api.postImportPreview,
    importOffers: api.postImport,
    csvUrl: api.offersCsvUrl,
    templateUrl: api.importTemplateUrl,
  };
});
