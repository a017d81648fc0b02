import { TokenParams } from '#shared/schemas/accounts.ts';
import {
  AcceptInvitationBody,
  AcceptedReply,
  InvitationCard,
  InvitationList,
  InvitationParams,
  InviteBody,
  InvitedReply,
} from '#shared/schemas/invitations.ts';
import { limit } from '../middlewares/limits.ts';
import { accountRoute, clubRoute, visitorRoute, type RouteDef } from '../middlewares/route.ts';
import { canManageMembers } from '../policies/clubs.ts';
import { acceptInvitation, readInvitation } from '../services/clubs/acceptInvitation.ts';
import { resendInvitation, revokeInvitation } from '../services/clubs/changeInvitation.ts';
import { listInvitations } from '../services/clubs/findInvitations.ts';
import { invite } from '../services/clubs/invite.ts';

/** Mail goes to strangers here, so one account sends only so much of it. */
const inviteLimit = limit({
  name: 'invite',
  windowMs: 3_600_000,
  max: 100,
  key: (req) => req.user?.id ?? req.ip ?? '',
});

export const invitationsRoutes: RouteDef[] = [
  visitorRoute({
    method: 'get',
    path: '/invitations/:token',
    summary: 'What an invitation leads to',
    before: [
      limit({ name: 'invitation-ip', windowMs: 3_600_000, max: 200, key: (req) => req.ip ?? '' }),
    ],
    params: TokenParams,
    reply: InvitationCard,
    run: ({ actor, params }) => readInvitation(params.token, actor),
  }),
  accountRoute({
    method: 'post',
    path: '/invitations/:token/accept',
    summary: 'Take an invitation',
    params: TokenParams,
    body: AcceptInvitationBody,
    reply: AcceptedReply,
    run: ({ actor, params, body }) => acceptInvitation(params.token, actor, body.displayName),
  }),
  clubRoute({
    method: 'get',
    path: '/invitations',
    summary: 'Invitations that nobody took yet',
    allow: canManageMembers,
    reply: InvitationList,
    run: ({ actor }) => listInvitations(actor),
  }),
  clubRoute({
    method: 'post',
    path: '/invitations',
    summary: 'Make a join link, told this once, or invite by e-mail',
    before: [inviteLimit],
    allow: canManageMembers,
    body: InviteBody,
    reply: InvitedReply,
    status: 201,
    run: ({ actor, body }) => invite(actor, body),
  }),
  clubRoute({
    method: 'delete',
    path: '/invitations/:invitation',
    summary: 'Revoke an invitation',
    allow: canManageMembers,
    params: InvitationParams,
    reply: InvitationList,
    run: async ({ actor, params }) => {
      await revokeInvitation(actor, params.invitation);
      return listInvitations(actor);
    },
  }),
  clubRoute({
    method: 'post',
    path: '/invitations/:invitation/resend',
    summary: 'Send an e-mailed invitation again under a new link',
    before: [inviteLimit],
    allow: canManageMembers,
    params: InvitationParams,
    reply: InvitationList,
    run: async ({ actor, params }) => {
      await resendInvitation(actor, params.invitation);
      return listInvitations(actor);
    },
  }),
];
