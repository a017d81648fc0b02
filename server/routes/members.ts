import { Done } from '#shared/schemas/fields.ts';
import {
  ChangeRolesBody,
  GuestBody,
  MemberParams,
  MembersReply,
  RenameSelfBody,
  UpdateGuestBody,
} from '#shared/schemas/members.ts';
import { clubRoute, type RouteDef } from '../middlewares/route.ts';
import { canManageMembers, canReadClub } from '../policies/clubs.ts';
import { approveMember, refuseMember } from '../services/clubs/answerRequest.ts';
import { changeRoles } from '../services/clubs/changeRoles.ts';
import { listMembers } from '../services/clubs/listMembers.ts';
import { leaveClub, removeMember } from '../services/clubs/removeMember.ts';
import { renameSelf } from '../services/clubs/renameSelf.ts';
import { addGuest, updateGuest } from '../services/clubs/saveGuest.ts';

const done = { done: true } as const;

export const membersRoutes: RouteDef[] = [
  clubRoute({
    method: 'get',
    path: '/members',
    summary: 'Everyone in the club',
    allow: canReadClub,
    reply: MembersReply,
    run: ({ actor }) => listMembers(actor),
  }),
  clubRoute({
    method: 'put',
    path: '/members/:member/roles',
    summary: 'Give and take roles',
    allow: canManageMembers,
    params: MemberParams,
    body: ChangeRolesBody,
    reply: MembersReply,
    run: async ({ actor, params, body }) => {
      await changeRoles(actor, params.member, body);
      return listMembers(actor);
    },
  }),
  clubRoute({
    method: 'delete',
    path: '/members/:member',
    summary: 'Remove a member or a guest',
    allow: canManageMembers,
    params: MemberParams,
    reply: MembersReply,
    run: async ({ actor, params }) => {
      await removeMember(actor, params.member);
      return listMembers(actor);
    },
  }),
  clubRoute({
    method: 'post',
    path: '/members/:member/approve',
    summary: 'Let in somebody who asked to join',
    allow: canManageMembers,
    params: MemberParams,
    reply: MembersReply,
    run: async ({ actor, params }) => {
      await approveMember(actor, params.member);
      return listMembers(actor);
    },
  }),
  clubRoute({
    method: 'post',
    path: '/members/:member/refuse',
    summary: 'Turn down somebody who asked to join',
    allow: canManageMembers,
    params: MemberParams,
    reply: MembersReply,
    run: async ({ actor, params }) => {
      await refuseMember(actor, params.member);
      return listMembers(actor);
    },
  }),
  clubRoute({
    method: 'post',
    path: '/guests',
    summary: 'Add a guest: name, contact, who vouches',
    allow: canManageMembers,
    body: GuestBody,
    reply: MembersReply,
    status: 201,
    run: async ({ actor, body }) => {
      await addGuest(actor, body);
      return listMembers(actor);
    },
  }),
  clubRoute({
    method: 'put',
    path: '/guests/:member',
    summary: 'Change a guest',
    allow: canManageMembers,
    params: MemberParams,
    body: UpdateGuestBody,
    reply: MembersReply,
    run: async ({ actor, params, body }) => {
      await updateGuest(actor, params.member, body);
      return listMembers(actor);
    },
  }),
  clubRoute({
    method: 'patch',
    path: '/me',
    summary: 'Change your name in this club',
    allow: canReadClub,
    body: RenameSelfBody,
    reply: Done,
    run: async ({ actor, body }) => {
      await renameSelf(actor, body.displayName);
      return done;
    },
  }),
  clubRoute({
    method: 'post',
    path: '/leave',
    summary: 'Leave the club; pledges in open buys are withdrawn',
    allow: canReadClub,
    reply: Done,
    run: async ({ actor }) => {
      await leaveClub(actor);
      return done;
    },
  }),
];
