import type { BuyHeader, BuyList } from '#shared/schemas/buys.ts';
import { api } from 'src/api/http.ts';

export const getBuys = (club: string) => api.get<BuyList>(`/clubs/${club}/buys`);

export const getBuy = (club: string, buy: string) =>
  api.get<BuyHeader>(`/clubs/${club}/buys/${buy}`);
