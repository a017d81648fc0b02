import type { BuyHeader } from '#shared/schemas/buys.ts';
import type {
  DefectBody,
  ExtendBody,
  MySheet,
  PacksBody,
  PledgeBody,
  PledgeReply,
  SheetChanges,
  SheetReply,
} from '#shared/schemas/sheet.ts';
import { api } from 'src/api/http.ts';

export type BuyPlace = { club: string; buy: string };

const at = ({ club, buy }: BuyPlace, rest: string) => `/clubs/${club}/buys/${buy}${rest}`;

export const getSheet = (place: BuyPlace) => api.get<SheetReply>(at(place, '/sheet'));

export const getMySheet = (place: BuyPlace) => api.get<MySheet>(at(place, '/sheet/mine'));

export const getChanges = (place: BuyPlace, since: number, terms: number) =>
  api.get<SheetChanges>(at(place, '/changes'), { since, terms });

export const putPledge = (place: BuyPlace, line: string, member: string, body: PledgeBody) =>
  api.put<PledgeReply>(at(place, `/lines/${line}/pledges/${member}`), body);

export const postHazard = (place: BuyPlace, saltId: string) =>
  api.post<unknown>(at(place, '/hazards'), { saltId });

export const putPaper = (
  place: BuyPlace,
  member: string,
  body: { saltId: string; signed: boolean },
) => api.put<unknown>(at(place, `/members/${member}/paper`), body);

export const postProposal = (place: BuyPlace, proposal: string, accept: boolean) =>
  api.post<unknown>(at(place, `/proposals/${proposal}`), { accept });

export const postLock = (place: BuyPlace, termsVersion: number) =>
  api.post<BuyHeader>(at(place, '/lock'), { termsVersion });

export const postExtend = (place: BuyPlace, body: ExtendBody) =>
  api.post<BuyHeader>(at(place, '/extend'), body);

export const putPacks = (place: BuyPlace, body: PacksBody) =>
  api.put<BuyHeader>(at(place, '/packs'), body);

export const postDefect = (place: BuyPlace, body: DefectBody) =>
  api.post<unknown>(at(place, '/defects'), body);
