import {
  AnswerHandOnBody,
  HandOnParams,
  HandOns,
  OfferHandOnBody,
} from '#shared/schemas/handOns.ts';
import { buyRoute, type RouteDef } from '../middlewares/route.ts';
import { canAnswerHandOn, canHandOn, canReadBuy } from '../policies/buys.ts';
import { answerHandOn, withdrawHandOn } from '../services/handOns/answerHandOn.ts';
import { listHandOns } from '../services/handOns/listHandOns.ts';
import { offerHandOn } from '../services/handOns/offerHandOn.ts';

const reply = HandOns;

export const handOnsRoutes: RouteDef[] = [
  buyRoute({
    method: 'get',
    path: '/hand-ons',
    summary: 'Lines that were offered from member to member, as far as they concern the reader',
    former: true,
    reply,
    allow: canReadBuy,
    run: ({ actor }) => listHandOns(actor),
  }),
  buyRoute({
    method: 'post',
    path: '/hand-ons',
    summary: 'Offer an own line to another member',
    former: true,
    body: OfferHandOnBody,
    reply,
    status: 201,
    allow: canHandOn,
    run: ({ actor, body }) => offerHandOn(actor, body),
  }),
  buyRoute({
    method: 'post',
    path: '/hand-ons/:handOn/answer',
    summary: 'Accept or decline a line that was offered',
    params: HandOnParams,
    body: AnswerHandOnBody,
    reply,
    allow: canAnswerHandOn,
    run: ({ actor, params, body }) => answerHandOn(actor, params.handOn, body),
  }),
  buyRoute({
    method: 'delete',
    path: '/hand-ons/:handOn',
    summary: 'Take back an offer that nobody has answered',
    former: true,
    params: HandOnParams,
    reply,
    allow: canHandOn,
    run: ({ actor, params }) => withdrawHandOn(actor, params.handOn),
  }),
];
