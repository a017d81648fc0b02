import type {
  ClubReply,
  FirstSteps,
  FoundClubBody,
  FoundedReply,
  PublicClub,
  ShelfLimitBody,
  UpdateClubBody,
} from '#shared/schemas/clubs.ts';
import { api } from 'src/api/http.ts';

export const postClub = (body: FoundClubBody) => api.post<FoundedReply>('/clubs', body);

export const getPublicClub = (club: string) => api.get<PublicClub>(`/public/${club}`);

export const getClub = (club: string) => api.get<ClubReply>(`/clubs/${club}`);

export const patchClub = (club: string, body: UpdateClubBody) =>
  api.patch<ClubReply>(`/clubs/${club}`, body);

export const putShelfLimit = (club: string, body: ShelfLimitBody) =>
  api.put<ClubReply>(`/clubs/${club}/shelf-limit`, body);

export const getFirstSteps = (club: string) => api.get<FirstSteps>(`/clubs/${club}/first-steps`);
