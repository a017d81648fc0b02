import { CancelBody, NewBuyBody, OpenBody } from '#shared/schemas/buyTerms.ts';
import { BuyHeader, BuyList } from '#shared/schemas/buys.ts';
import { buyRoute, clubRoute, type RouteDef } from '../middlewares/route.ts';
import {
  canCopyBuy,
  canDraftBuy,
  canListBuys,
  canOrganiseBuy,
  canReadBuy,
} from '../policies/buys.ts';
import { cancelBuy, discardDraft, restoreDraft } from '../services/buys/cancelBuy.ts';
import { copyBuy } from '../services/buys/copyBuy.ts';
import { createBuy } from '../services/buys/createBuy.ts';
import { openBuy } from '../services/buys/openBuy.ts';
import { listBuys, readBuyHeader } from '../services/buys/readBuys.ts';

export const buysRoutes: RouteDef[] = [
  clubRoute({
    method: 'get',
    path: '/buys',
    summary: 'The buys of a club that the reader can see',
    former: true,
    reply: BuyList,
    allow: canListBuys,
    run: ({ actor }) => listBuys(actor),
  }),
  clubRoute({
    method: 'post',
    path: '/buys',
    summary: 'Draft a new buy with sensible defaults',
    body: NewBuyBody,
    reply: BuyHeader,
    status: 201,
    allow: canDraftBuy,
    run: ({ actor, body }) => createBuy(actor, body.name),
  }),
  buyRoute({
    method: 'get',
    path: '',
    summary: "A buy's head: state, terms, people, what changed, what is next",
    former: true,
    reply: BuyHeader,
    allow: canReadBuy,
    run: ({ actor }) => readBuyHeader(actor),
  }),
  buyRoute({
    method: 'post',
    path: '/copies',
    summary: 'Draft a new buy after this one: lines, living offers, charges, policies, new dates',
    body: NewBuyBody,
    reply: BuyHeader,
    status: 201,
    allow: canCopyBuy,
    run: ({ actor, body }) => copyBuy(actor, body.name),
  }),
  buyRoute({
    method: 'post',
    path: '/open',
    summary: 'Open a draft for pledges and tell every member',
    body: OpenBody,
    reply: BuyHeader,
    allow: canOrganiseBuy,
    run: ({ actor, body }) => openBuy(actor, body.termsVersion),
  }),
  buyRoute({
    method: 'post',
    path: '/cancel',
    summary: 'Cancel an open or locked buy; deposits stay as credit and everyone is told',
    body: CancelBody,
    reply: BuyHeader,
    allow: canOrganiseBuy,
    run: ({ actor, body }) => cancelBuy(actor, body),
  }),
  buyRoute({
    method: 'delete',
    path: '',
    summary: 'Discard a draft',
    body: OpenBody,
    reply: BuyHeader,
    allow: canOrganiseBuy,
    run: ({ actor, body }) => discardDraft(actor, body.termsVersion),
  }),
  buyRoute({
    method: 'post',
    path: '/restore',
    summary: 'Take a discarded draft up again',
    reply: BuyHeader,
    allow: canOrganiseBuy,
    run: ({ actor }) => restoreDraft(actor),
  }),
];
