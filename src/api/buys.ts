import type { BuyHeader, BuyList } from '#shared/schemas/buys.ts';
import type { BuyCandidates } from '#shared/schemas/buyPeople.ts';
import { api } from 'src/api/http.ts';

const at = (club: string, buy: string, rest = '') => `/clubs/${club}/buys/${buy}${rest}`;

export const getBuys = (club: string) => api.get<BuyList>(`/clubs/${club}/buys`);

export const postBuy = (club: string, body: { name?: string }) =>
  api.post<BuyHeader>(`/clubs/${club}/buys`, body);

export const getBuy = (club: string, buy: string) => api.get<BuyHeader>(at(club, buy));

export const postCopy = (club: string, buy: string) =>
  api.post<BuyHeader>(at(club, buy, '/copies'), {});

export const postOpen = (club: string, buy: string, termsVersion: number) =>
  api.post<BuyHeader>(at(club, buy, '/open'), { termsVersion });

export const postCancel = (
  club: string,
  buy: string,
  body: { termsVersion: number; reason: string },
) => api.post<BuyHeader>(at(club, buy, '/cancel'), body);

export const deleteDraft = (club: string, buy: string, termsVersion: number) =>
  api.del<BuyHeader>(at(club, buy), { termsVersion });

export const postRestore = (club: string, buy: string) =>
  api.post<BuyHeader>(at(club, buy, '/restore'), {});

export const getCandidates = (club: string, buy: string) =>
  api.get<BuyCandidates>(at(club, buy, '/candidates'));

export const putOrganiser = (club: string, buy: string, member: string) =>
  api.put<BuyHeader>(at(club, buy, `/organisers/${member}`), {});

export const deleteOrganiser = (club: string, buy: string, member: string) =>
  api.del<unknown>(at(club, buy, `/organisers/${member}`));

export const putHelper = (club: string, buy: string, member: string, takesCash: boolean) =>
  api.put<BuyHeader>(at(club, buy, `/helpers/${member}`), { takesCash });

export const deleteHelper = (club: string, buy: string, member: string) =>
  api.del<unknown>(at(club, buy, `/helpers/${member}`));

export const putOffer = (club: string, buy: string, toId: string) =>
  api.put<BuyHeader>(at(club, buy, '/responsibility/offer'), { toId });

export const deleteOffer = (club: string, buy: string) =>
  api.del<BuyHeader>(at(club, buy, '/responsibility/offer'));

export const postAnswer = (club: string, buy: string, accept: boolean) =>
  api.post<unknown>(at(club, buy, '/responsibility/answer'), { accept });

export const putResponsibility = (
  club: string,
  buy: string,
  body: { toId: string; reason: string },
) => api.put<BuyHeader>(at(club, buy, '/responsibility'), body);
