import { BuyHeader, BuyList } from '#shared/schemas/buys.ts';
import { buyRoute, clubRoute, type RouteDef } from '../middlewares/route.ts';
import { canListBuys, canReadBuy } from '../policies/buys.ts';
import { listBuys, readBuyHeader } from '../services/buys/readBuys.ts';

export const buysRoutes: RouteDef[] = [
  clubRoute({
    method: 'get',
    path: '/buys',
    summary: 'The buys of a club that the reader can see',
    reply: BuyList,
    allow: canListBuys,
    run: ({ actor }) => listBuys(actor),
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
];
