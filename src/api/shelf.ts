import type { PriceBody, SaleBody, Shelf } from '#shared/schemas/shelf.ts';
import { api } from 'src/api/http.ts';

export const getShelf = (club: string) => api.get<Shelf>(`/clubs/${club}/shelf`);
export const putStockPrice = (club: string, stock: string, body: PriceBody) =>
  api.put<Shelf>(`/clubs/${club}/shelf/${stock}`, body);
export const postSale = (club: string, stock: string, body: SaleBody) =>
  api.post<Shelf>(`/clubs/${club}/shelf/${stock}/sales`, body);
export const deleteSale = (club: string, sale: string) =>
  api.del<Shelf>(`/clubs/${club}/shelf/sales/${sale}`);
