import type {
  ChangeRolesBody,
  GuestBody,
  MembersReply,
  UpdateGuestBody,
} from '#shared/schemas/members.ts';
import { api } from 'src/api/http.ts';

const at = (club: string, member?: string) =>
  `/clubs/${club}/members${member === undefined ? '' : `/${member}`}`;

export const getMembers = (club: string) => api.get<MembersReply>(at(club));

export const putRoles = (club: string, member: string, body: ChangeRolesBody) =>
  api.put<MembersReply>(`${at(club, member)}/roles`, body);

export const deleteMember = (club: string, member: string) =>
  api.del<MembersReply>(at(club, member));

export const postApproval = (club: string, member: string) =>
  api.post<MembersReply>(`${at(club, member)}/approve`);

export const postRefusal = (club: string, member: string) =>
  api.post<MembersReply>(`${at(club, member)}/refuse`);

export const postGuest = (club: string, body: GuestBody) =>
  api.post<MembersReply>(`/clubs/${club}/guests`, body);

export const putGuest = (club: string, guest: string, body: UpdateGuestBody) =>
  api.put<MembersReply>(`/clubs/${club}/guests/${guest}`, body);

export const patchOwnName = (club: string, displayName: string) =>
  api.patch<undefined>(`/clubs/${club}/me`, { displayName });

export const postLeave = (club: string) => api.post<undefined>(`/clubs/${club}/leave`);
