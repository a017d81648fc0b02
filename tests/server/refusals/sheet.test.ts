import { describeRights } from '#tests/support/rights.ts';

const owned = [
  '/sheet',
  '/sheet/mine',
  '/changes',
  '/lock',
  '/reopen',
  '/extend',
  '/packs',
  '/defects',
].map((path) => `/clubs/:club/buys/:buy${path}`);

describeRights('sheet', (route) => owned.includes(route.path), {
  'GET /clubs/:club/buys/:buy/sheet': 'everyone',
  'GET /clubs/:club/buys/:buy/sheet/mine': 'everyone',
  'GET /clubs/:club/buys/:buy/changes': 'everyone',
  'POST /clubs/:club/buys/:buy/defects': 'everyone',
  'POST /clubs/:club/buys/:buy/lock': ['own'],
  'POST /clubs/:club/buys/:buy/reopen': ['own'],
  'POST /clubs/:club/buys/:buy/extend': ['own'],
  'PUT /clubs/:club/buys/:buy/packs': ['own'],
});
