import { describeRights } from '#tests/support/rights.ts';

describeRights(
  'notices',
  (route) => /(?<!\/pickup)\/(notices|unsubscribe)(\/|$)/.test(route.path),
  {
    'GET /clubs/:club/notices': 'everyone',
    'POST /clubs/:club/notices/read': 'everyone',
    'GET /clubs/:club/notices/preferences': 'everyone',
    'PUT /clubs/:club/notices/preferences': 'everyone',
    'GET /unsubscribe/:token': 'anyone',
    'POST /unsubscribe/:token': 'anyone',
    'GET /clubs/:club/buys/:buy/notices': ['own', 'treasurer'],
    'GET /clubs/:club/buys/:buy/notices/draft': ['own'],
    'POST /clubs/:club/buys/:buy/notices': ['own'],
  },
);
