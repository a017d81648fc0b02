import type { BuyHeader } from '#shared/schemas/buys.ts';
import type {
  ApplyTargetsBody,
  ArrivalBody,
  BagBody,
  CloseBagBody,
  CutBody,
  FinalPreview,
  FinishBody,
  MyShare,
  SpillBody,
  SplitChange,
  SplitSheet,
  TargetsPreview,
  VoidBody,
  WeighingBody,
} from '#shared/schemas/splits.ts';
import { api } from 'src/api/http.ts';

/** A buy by its club's address and its id. */
export type BuyAt = { club: string; buy: string };

const at = ({ club, buy }: BuyAt, rest: string) => `/clubs/${club}/buys/${buy}${rest}`;
const change = (where: BuyAt, rest: string, body: object = {}) =>
  api.post<SplitChange>(at(where, rest), body);
const move = (where: BuyAt, rest: string, body: object) =>
  api.post<BuyHeader>(at(where, rest), body);

export const getSplit = (where: BuyAt) => api.get<SplitSheet>(at(where, '/split'));
export const getShare = (where: BuyAt) => api.get<MyShare>(at(where, '/share'));
export const getTargets = (where: BuyAt) => api.get<TargetsPreview>(at(where, '/targets'));
export const getFinal = (where: BuyAt) => api.get<FinalPreview>(at(where, '/final'));

export const postArrival = (where: BuyAt, supplier: string, body: ArrivalBody) =>
  change(where, `/orders/${supplier}/arrival`, body);
export const putBag = (where: BuyAt, bag: string, body: BagBody) =>
  api.put<SplitChange>(at(where, `/bags/${bag}`), body);
export const postArrive = (where: BuyAt, termsVersion: number) =>
  move(where, '/arrive', { termsVersion });
export const postTargets = (where: BuyAt, body: ApplyTargetsBody) => move(where, '/targets', body);
export const postStart = (where: BuyAt, termsVersion: number) =>
  move(where, '/start-splitting', { termsVersion });

export const postClaim = (where: BuyAt, portion: string, station: string) =>
  change(where, `/portions/${portion}/claim`, { station });
export const postRelease = (where: BuyAt, portion: string) =>
  change(where, `/portions/${portion}/release`);
export const postCut = (where: BuyAt, portion: string, body: CutBody) =>
  change(where, `/portions/${portion}/cut`, body);
export const postJoin = (where: BuyAt, portion: string, version: number) =>
  change(where, `/portions/${portion}/join`, { version });
export const postVoid = (where: BuyAt, portion: string, body: VoidBody) =>
  change(where, `/portions/${portion}/void`, body);
export const postRestorePortion = (where: BuyAt, portion: string, version: number) =>
  change(where, `/portions/${portion}/restore`, { version });
export const postWeighing = (where: BuyAt, body: WeighingBody) => change(where, '/weighings', body);
export const postUndoWeighing = (where: BuyAt, weighing: string) =>
  change(where, `/weighings/${weighing}/undo`);

export const postSpill = (where: BuyAt, bag: string, body: SpillBody) =>
  change(where, `/bags/${bag}/spills`, body);
export const postUndoSpill = (where: BuyAt, spill: string) =>
  change(where, `/spills/${spill}/undo`);
export const postCloseBag = (where: BuyAt, bag: string, body: CloseBagBody) =>
  change(where, `/bags/${bag}/close`, body);
export const postReopenBag = (where: BuyAt, bag: string, version: number) =>
  change(where, `/bags/${bag}/reopen`, { version });

export const putLineNote = (where: BuyAt, line: string, note: string) =>
  api.put<SplitChange>(at(where, `/lines/${line}/unaccounted-note`), { note });
export const putExcess = (where: BuyAt, clubTakesExcess: boolean) =>
  api.put<BuyHeader>(at(where, '/excess-loss'), { clubTakesExcess });
export const postFinish = (where: BuyAt, body: FinishBody) =>
  move(where, '/finish-splitting', body);
