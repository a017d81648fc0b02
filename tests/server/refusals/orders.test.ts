import { describeRights } from '#tests/support/rights.ts';
import { billsRoutes } from '#server/routes/bills.ts';
import { ordersRoutes } from '#server/routes/orders.ts';

const buy = '/clubs/:club/buys/:buy';
const money = ['own', 'treasurer'] as const;

describeRights('orders', (route) => ordersRoutes.includes(route), {
  [`GET ${buy}/locked`]: 'everyone',
  [`GET ${buy}/slips/:member`]: money,
  [`PUT ${buy}/vouched/:member`]: money,
  [`DELETE ${buy}/vouched/:member`]: money,
  [`POST ${buy}/drop/check`]: ['own'],
  [`POST ${buy}/drop`]: ['own'],
  [`POST ${buy}/due-reminders`]: money,
  [`POST ${buy}/price-answer`]: [],
  [`GET ${buy}/orders`]: 'everyone',
  [`GET ${buy}/orders/:supplier`]: money,
  [`GET ${buy}/orders/:supplier/csv`]: money,
  [`POST ${buy}/orders/:supplier/check`]: ['own'],
  [`PUT ${buy}/orders/:supplier/prices`]: ['own'],
  [`POST ${buy}/orders/:supplier/place`]: ['own'],
  [`POST ${buy}/orders/:supplier/state`]: ['own'],
});

describeRights(
  'bills',
  (route) => billsRoutes.includes(route),
  {
    [`GET ${buy}/bills`]: money,
    [`POST ${buy}/bills`]: ['own'],
    [`PUT ${buy}/bills/:bill`]: ['own'],
    [`POST ${buy}/bills/:bill/void`]: ['own'],
    [`POST ${buy}/bills/:bill/confirm`]: ['treasurer'],
    [`POST ${buy}/bills/:bill/reverse`]: ['treasurer'],
    [`POST ${buy}/supplier-refunds`]: ['treasurer'],
    [`POST ${buy}/supplier-refunds/:entry/reverse`]: ['treasurer'],
    [`POST ${buy}/losses`]: ['treasurer'],
    [`POST ${buy}/losses/:entry/reverse`]: ['treasurer'],
    [`GET ${buy}/settling`]: 'everyone',
    [`POST ${buy}/rest`]: ['treasurer'],
    [`POST ${buy}/settle`]: ['treasurer'],
  },
  'pickup',
);
