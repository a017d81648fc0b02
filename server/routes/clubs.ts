import {
  ClubReply,
  FirstSteps,
  FoundClubBody,
  FoundedReply,
  PublicClub,
  ShelfLimitBody,
  UpdateClubBody,
} from '#shared/schemas/clubs.ts';
import { limit } from '../middlewares/limits.ts';
import { accountRoute, clubRoute, visitorRoute, type RouteDef } from '../middlewares/route.ts';
import { canChangeClub, canReadClub, canSetShelfLimit } from '../policies/clubs.ts';
import { foundClub } from '../services/clubs/foundClub.ts';
import { readClub, readFirstSteps, readPublicClub } from '../services/clubs/readClub.ts';
import { setShelfLimit, updateClub } from '../services/clubs/updateClub.ts';

const day = 86_400_000;

export const clubsRoutes: RouteDef[] = [
  accountRoute({
    method: 'post',
    path: '/clubs',
    summary: 'Found a club; you are its organiser, treasurer and steward',
    before: [limit({ name: 'found', windowMs: day, max: 20, key: (req) => req.user?.id ?? '' })],
    body: FoundClubBody,
    reply: FoundedReply,
    status: 201,
    run: ({ actor, body }) => foundClub(actor, body),
  }),
  visitorRoute({
    method: 'get',
    path: '/public/:club',
    summary: "A club's public page: name, note, contact",
    reply: PublicClub,
    run: ({ req }) => readPublicClub(String(req.params.club)),
  }),
  clubRoute({
    method: 'get',
    path: '',
    summary: "The club's settings",
    allow: canReadClub,
    reply: ClubReply,
    run: ({ actor }) => readClub(actor),
  }),
  clubRoute({
    method: 'patch',
    path: '',
    summary: 'Change some settings of the club',
    allow: canChangeClub,
    body: UpdateClubBody,
    reply: ClubReply,
    run: async ({ actor, body }) => {
      await updateClub(actor, body);
      return readClub(actor);
    },
  }),
  clubRoute({
    method: 'put',
    path: '/shelf-limit',
    summary: 'Set how much of what is left over the shelf may pay for',
    allow: canSetShelfLimit,
    body: ShelfLimitBody,
    reply: ClubReply,
    run: async ({ actor, body }) => {
      await setShelfLimit(actor, body);
      return readClub(actor);
    },
  }),
  clubRoute({
    method: 'get',
    path: '/first-steps',
    summary: 'How far the club has come on the way to its first buy',
    allow: canReadClub,
    reply: FirstSteps,
    run: ({ actor }) => readFirstSteps(actor),
  }),
];
