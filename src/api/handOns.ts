import type { AnswerHandOnBody, HandOns, OfferHandOnBody } from '#shared/schemas/handOns.ts';
import { api } from 'src/api/http.ts';

const at = (club: string, buy: string, rest = '') => `/clubs/${club}/buys/${buy}/hand-ons${rest}`;

export const getHandOns = (club: string, buy: string) => api.get<HandOns>(at(club, buy));

export const postHandOn = (club: string, buy: string, body: OfferHandOnBody) =>
  api.post<HandOns>(at(club, buy), body);

export const postHandOnAnswer = (
  club: string,
  buy: string,
  handOn: string,
  body: AnswerHandOnBody,
) => api.post<HandOns>(at(club, buy, `/${handOn}/answer`), body);

export const deleteHandOn = (club: string, buy: string, handOn: string) =>
  api.del<HandOns>(at(club, buy, `/${handOn}`));
