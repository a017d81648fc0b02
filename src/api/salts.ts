import type { ClubSalt, OwnSaltBody, OwnSaltChange, SaltList } from '#shared/schemas/salts.ts';
import { api } from 'src/api/http.ts';

const at = (club: string, salt?: string) =>
  `/clubs/${club}/salts${salt === undefined ? '' : `/${encodeURIComponent(salt)}`}`;

export const getSalts = (club: string) => api.get<SaltList>(at(club));

export const postSalt = (club: string, body: OwnSaltBody) => api.post<ClubSalt>(at(club), body);

export const putSalt = (club: string, salt: string, body: OwnSaltChange) =>
  api.put<ClubSalt>(at(club, salt), body);

export const postSaltArchive = (club: string, salt: string, version: number, archived: boolean) =>
  api.post<ClubSalt>(`${at(club, salt)}/${archived ? 'archive' : 'restore'}`, { version });

export const putSaltHidden = (club: string, salt: string, hidden: boolean) =>
  api.put<ClubSalt>(`${at(club, salt)}/hidden`, { hidden });
