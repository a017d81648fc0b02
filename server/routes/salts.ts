import {
  ClubSalt,
  HiddenBody,
  OwnSaltBody,
  OwnSaltChange,
  SaltList,
  SaltParams,
  VersionBody,
} from '#shared/schemas/salts.ts';
import { clubRoute, type RouteDef } from '../middlewares/route.ts';
import { canEditSalts, canReadSalts } from '../policies/salts.ts';
import { addOwnSalt, archiveOwnSalt, changeOwnSalt } from '../services/salts/changeOwnSalt.ts';
import { hideSalt } from '../services/salts/hideSalt.ts';
import { listSalts } from '../services/salts/saltsOfClub.ts';

export const saltsRoutes: RouteDef[] = [
  clubRoute({
    method: 'get',
    path: '/salts',
    summary: 'The shipped salts and the club’s own, with hazards and what may be a line',
    allow: canReadSalts,
    reply: SaltList,
    run: async ({ actor }) => ({
      salts: await listSalts(actor.club.id),
      may: { edit: canEditSalts(actor) },
    }),
  }),
  clubRoute({
    method: 'post',
    path: '/salts',
    summary: 'Add a salt or trace mix of the club’s own',
    allow: canEditSalts,
    body: OwnSaltBody,
    reply: ClubSalt,
    status: 201,
    run: ({ actor, body }) => addOwnSalt(actor, body),
  }),
  clubRoute({
    method: 'put',
    path: '/salts/:salt',
    summary: 'Change one of the club’s own salts',
    allow: canEditSalts,
    params: SaltParams,
    body: OwnSaltChange,
    reply: ClubSalt,
    run: ({ actor, params, body: { version, ...fields } }) =>
      changeOwnSalt(actor, params.salt, version, fields),
  }),
  clubRoute({
    method: 'post',
    path: '/salts/:salt/archive',
    summary: 'Archive one of the club’s own salts',
    allow: canEditSalts,
    params: SaltParams,
    body: VersionBody,
    reply: ClubSalt,
    run: ({ actor, params, body }) => archiveOwnSalt(actor, params.salt, body.version, true),
  }),
  clubRoute({
    method: 'post',
    path: '/salts/:salt/restore',
    summary: 'Bring an archived salt back',
    allow: canEditSalts,
    params: SaltParams,
    body: VersionBody,
    reply: ClubSalt,
    run: ({ actor, params, body }) => archiveOwnSalt(actor, params.salt, body.version, false),
  }),
  clubRoute({
    method: 'put',
    path: '/salts/:salt/hidden',
    summary: 'Hide a salt from the club’s list, or show it again',
    allow: canEditSalts,
    params: SaltParams,
    body: HiddenBody,
    reply: ClubSalt,
    run: ({ actor, params, body }) => hideSalt(actor, params.salt, body.hidden),
  }),
];
