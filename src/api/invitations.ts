import type {
  AcceptedReply,
  InvitationCard,
  InvitationList,
  InviteBody,
  InvitedReply,
} from '#shared/schemas/invitations.ts';
import { api } from 'src/api/http.ts';

export const getInvitation = (token: string) =>
  api.get<InvitationCard>(`/invitations/${encodeURIComponent(token)}`);

export const postAcceptance = (token: string, displayName: string) =>
  api.post<AcceptedReply>(`/invitations/${encodeURIComponent(token)}/accept`, { displayName });

export const getInvitations = (club: string) =>
  api.get<InvitationList>(`/clubs/${club}/invitations`);

export const postInvitation = (club: string, body: InviteBody) =>
  api.post<InvitedReply>(`/clubs/${club}/invitations`, body);

export const deleteInvitation = (club: string, invitation: string) =>
  api.del<InvitationList>(`/clubs/${club}/invitations/${invitation}`);

export const postResend = (club: string, invitation: string) =>
  api.post<InvitationList>(`/clubs/${club}/invitations/${invitation}/resend`);
