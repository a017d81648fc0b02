import type { LossBody, RecordList } from '#shared/schemas/precursors.ts';
import { api } from 'src/api/http.ts';

const of = (club: string, buy: string) => `/clubs/${club}/buys/${buy}/precursors`;

export const getClubRecords = (club: string) => api.get<RecordList>(`/clubs/${club}/precursors`);
export const getBuyRecords = (club: string, buy: string) => api.get<RecordList>(of(club, buy));
export const postLoss = (club: string, buy: string, body: LossBody) =>
  api.post<RecordList>(`${of(club, buy)}/losses`, body);
