import type { ImportDone, ImportPreview, ImportRules } from '#shared/schemas/offerImport.ts';
import type {
  Offer,
  OfferBody,
  OfferPrice,
  Supplier,
  SupplierBody,
  SupplierList,
  SupplierPage,
} from '#shared/schemas/suppliers.ts';
import { api, apiUrl } from 'src/api/http.ts';

const at = (club: string, supplier?: string) =>
  `/clubs/${club}/suppliers${supplier === undefined ? '' : `/${supplier}`}`;
const offerAt = (club: string, supplier: string, offer: string) =>
  `${at(club, supplier)}/offers/${offer}`;
const act = (archived: boolean) => (archived ? 'archive' : 'restore');

export const getSuppliers = (club: string) => api.get<SupplierList>(at(club));

export const getSupplier = (club: string, supplier: string) =>
  api.get<SupplierPage>(at(club, supplier));

export const postSupplier = (club: string, body: SupplierBody) =>
  api.post<Supplier>(at(club), body);

export const putSupplier = (club: string, supplier: string, version: number, body: SupplierBody) =>
  api.put<Supplier>(at(club, supplier), { ...body, version });

export const postSupplierArchive = (
  club: string,
  supplier: string,
  version: number,
  archived: boolean,
) => api.post<Supplier>(`${at(club, supplier)}/${act(archived)}`, { version });

export const postOffer = (club: string, supplier: string, body: OfferBody) =>
  api.post<Offer>(`${at(club, supplier)}/offers`, body);

export const putOffer = (
  club: string,
  supplier: string,
  offer: string,
  version: number,
  body: OfferBody,
) => api.put<Offer>(offerAt(club, supplier, offer), { ...body, version });

export const postOfferArchive = (
  club: string,
  supplier: string,
  offer: string,
  version: number,
  archived: boolean,
) => api.post<Offer>(`${offerAt(club, supplier, offer)}/${act(archived)}`, { version });

export const getOfferPrices = (club: string, supplier: string, offer: string) =>
  api.get<{ prices: OfferPrice[] }>(`${offerAt(club, supplier, offer)}/prices`);

function importForm(file: File, fields: Record<string, string>): FormData {
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) form.set(name, value);
  form.set('file', file);
  return form;
}

export const postImportPreview = (club: string, supplier: string, file: File, rules: ImportRules) =>
  api.post<ImportPreview>(
    `${at(club, supplier)}/import/preview`,
    importForm(file, { rules: JSON.stringify(rules) }),
  );

export const postImport = (
  club: string,
  supplier: string,
  file: File,
  choice: { rules: ImportRules; seen: string; leaveOutBad: boolean },
) =>
  api.post<ImportDone>(
    `${at(club, supplier)}/import`,
    importForm(file, {
      rules: JSON.stringify(choice.rules),
      seen: choice.seen,
      leaveOutBad: choice.leaveOutBad ? 'yes' : 'no',
    }),
  );

/** Where a supplier's offers are to be had as CSV. */
export const offersCsvUrl = (club: string, supplier: string) =>
  apiUrl(`${at(club, supplier)}/offers.csv`);

/** Where the table to fill in for an import is. */
export const importTemplateUrl = (club: string) => apiUrl(`${at(club)}/import-template.csv`);
