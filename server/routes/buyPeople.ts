import {
  AnswerResponsibilityBody,
  BuyCandidates,
  HelperBody,
  MemberParams,
  OfferResponsibilityBody,
  PassResponsibilityBody,
} from '#shared/schemas/buyPeople.ts';
import { BuyHeader } from '#shared/schemas/buys.ts';
import { Done } from '#shared/schemas/fields.ts';
import { buyRoute, type RouteDef } from '../middlewares/route.ts';
import {
  canAnswerResponsibility,
  canOfferResponsibility,
  canOrganiseBuy,
  canPassResponsibility,
  canReadBuy,
} from '../policies/buys.ts';
import {
  dropPerson,
  listCandidates,
  nameCoOrganiser,
  nameHelper,
} from '../services/buys/buyPeople.ts';
import {
  answerResponsibility,
  offerResponsibility,
  passResponsibility,
  withdrawResponsibility,
} from '../services/buys/responsibility.ts';

const reply = BuyHeader;

export const buyPeopleRoutes: RouteDef[] = [
  buyRoute({
    method: 'get',
    path: '/candidates',
    summary: 'Members who may be named in a buy, or be handed a line',
    former: true,
    reply: BuyCandidates,
    allow: canReadBuy,
    run: ({ actor }) => listCandidates(actor),
  }),
  buyRoute({
    method: 'put',
    path: '/organisers/:member',
    summary: 'Name a co-organiser',
    params: MemberParams,
    reply,
    allow: canOrganiseBuy,
    run: ({ actor, params }) => nameCoOrganiser(actor, params.member),
  }),
  buyRoute({
    method: 'delete',
    path: '/organisers/:member',
    summary: 'Take a co-organiser off a buy',
    params: MemberParams,
    reply: Done,
    allow: canOrganiseBuy,
    run: async ({ actor, params }) => {
      await dropPerson(actor, 'organiser', params.member);
      return { done: true as const };
    },
  }),
  buyRoute({
    method: 'put',
    path: '/helpers/:member',
    summary: 'Name a helper, who may note cash or not',
    params: MemberParams,
    body: HelperBody,
    reply,
    allow: canOrganiseBuy,
    run: ({ actor, params, body }) => nameHelper(actor, params.member, body.takesCash),
  }),
  buyRoute({
    method: 'delete',
    path: '/helpers/:member',
    summary: 'Take a helper off a buy',
    params: MemberParams,
    reply: Done,
    allow: canOrganiseBuy,
    run: async ({ actor, params }) => {
      await dropPerson(actor, 'helper', params.member);
      return { done: true as const };
    },
  }),
  buyRoute({
    method: 'put',
    path: '/responsibility/offer',
    summary: 'Offer responsibility for a buy to another organiser',
    body: OfferResponsibilityBody,
    reply,
    allow: canOfferResponsibility,
    run: ({ actor, body }) => offerResponsibility(actor, body.toId),
  }),
  buyRoute({
    method: 'delete',
    path: '/responsibility/offer',
    summary: 'Take an offer of responsibility back',
    reply,
    allow: canOfferResponsibility,
    run: ({ actor }) => withdrawResponsibility(actor),
  }),
  buyRoute({
    method: 'post',
    path: '/responsibility/answer',
    summary: 'Accept or decline responsibility that was offered',
    body: AnswerResponsibilityBody,
    reply: Done,
    allow: canAnswerResponsibility,
    run: async ({ actor, body }) => {
      await answerResponsibility(actor, body.accept);
      return { done: true as const };
    },
  }),
  buyRoute({
    method: 'put',
    path: '/responsibility',
    summary: "Pass a buy to another organiser when its holder can't act",
    body: PassResponsibilityBody,
    reply,
    allow: canPassResponsibility,
    run: ({ actor, body }) => passResponsibility(actor, body),
  }),
];
