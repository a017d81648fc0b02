import type {
  BuyTerms,
  ChargeBody,
  HeadBody,
  LineBody,
  LineChange,
  LineChoices,
  LineOrder,
  TermsBody,
  TermsReply,
} from '#shared/schemas/buyTerms.ts';
import { api } from 'src/api/http.ts';

const at = (club: string, buy: string, rest: string) => `/clubs/${club}/buys/${buy}/${rest}`;

export const getTerms = (club: string, buy: string) => api.get<BuyTerms>(at(club, buy, 'terms'));

export const patchTerms = (club: string, buy: string, body: HeadBody) =>
  api.patch<TermsReply>(at(club, buy, 'terms'), body);

export const getLineChoices = (club: string, buy: string) =>
  api.get<LineChoices>(at(club, buy, 'line-choices'));

export const postLine = (club: string, buy: string, body: LineBody) =>
  api.post<TermsReply>(at(club, buy, 'lines'), body);

export const putLine = (club: string, buy: string, line: string, body: LineChange) =>
  api.put<TermsReply>(at(club, buy, `lines/${line}`), body);

export const putLineOrder = (club: string, buy: string, body: LineOrder) =>
  api.put<TermsReply>(at(club, buy, 'lines/order'), body);

export const deleteLine = (club: string, buy: string, line: string, body: TermsBody) =>
  api.del<TermsReply>(at(club, buy, `lines/${line}`), body);

export const postLineRestore = (club: string, buy: string, line: string, body: TermsBody) =>
  api.post<TermsReply>(at(club, buy, `lines/${line}/restore`), body);

export const postCharge = (club: string, buy: string, body: ChargeBody) =>
  api.post<TermsReply>(at(club, buy, 'charges'), body);

export const putCharge = (club: string, buy: string, charge: string, body: ChargeBody) =>
  api.put<TermsReply>(at(club, buy, `charges/${charge}`), body);

export const deleteCharge = (club: string, buy: string, charge: string, body: TermsBody) =>
  api.del<TermsReply>(at(club, buy, `charges/${charge}`), body);

export const postChargeRestore = (club: string, buy: string, charge: string, body: TermsBody) =>
  api.post<TermsReply>(at(club, buy, `charges/${charge}/restore`), body);
